using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Stationary;

/// <summary>Solves one recurrent class by a method, checks what comes back, and certifies it.</summary>
internal static class StationarySolve<TState>
    where TState : notnull
{
    /// <summary>The result, and the advice of the method when it has not converged.</summary>
    internal static (StationaryDistribution<TState> Result, string? Advice) Run(
        Chain<TState> chain, CommunicatingClass<TState> group, IStationaryMethod? given, SolveOptions options)
    {
        var members = group.Members;
        var values = new double[chain.StateCount];
        if (members.Length == 1)
        {
            values[members[0]] = 1;
            return (new StationaryDistribution<TState>(chain.States, values, StationaryCertificate.OfSingleState), null);
        }

        var problem = new StationaryProblem(chain.Matrix, members, group.Period, options);
        var (method, choice) = given is null ? StationaryChoice.For(problem) : (given, "Asked for.");
        var vector = method.Solve(problem);
        var shares = Normalize(chain, members, method.Name, vector);
        for (var k = 0; k < members.Length; k++)
        {
            values[members[k]] = shares[k];
        }

        var certificate = StationaryCertificate.Of(problem, method, vector, choice, shares);
        return (new StationaryDistribution<TState>(chain.States, values, certificate), vector.HasConverged ? null : vector.Advice);
    }

    /// <summary>Divides the vector by its sum, refusing what cannot be a stationary vector: nothing is clipped.</summary>
    private static double[] Normalize(Chain<TState> chain, int[] members, string method, StationaryVector vector)
    {
        var raw = vector.Values.Span;
        if (raw.Length != members.Length)
        {
            throw new ArgumentException(Messages.WrongLength(method, raw.Length, members.Length), nameof(vector));
        }

        var isProved = vector.ProvedBasis != ErrorBasis.None;
        for (var k = 0; k < raw.Length; k++)
        {
            if (!(raw[k] > 0) || !double.IsFinite(raw[k]))
            {
                throw Refuse(chain.States[members[k]], method, raw[k], isProved);
            }
        }

        var sum = isProved ? 1 : CompensatedSum.Of(raw);
        var shares = new double[raw.Length];
        for (var k = 0; k < shares.Length; k++)
        {
            shares[k] = raw[k] / sum;
            if (!double.IsNormal(shares[k]))
            {
                throw Refuse(chain.States[members[k]], method, raw[k], isProved);
            }
        }

        return shares;
    }

    private static NumericalRangeException Refuse(TState state, string method, double value, bool isProved) => new(
        (value > 0 && double.IsFinite(value)) || (value == 0 && isProved)
            ? Messages.ShareTooSmall(state)
            : Messages.NotPositive(method, state, value),
        Text.Label(state));
}
