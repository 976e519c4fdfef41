using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>
/// The variance of a time in two ways, each good where the other fails, with a bound on the error of each; for every state the better one is
/// taken.
/// </summary>
/// <remarks>
/// From squared deviations: A · V = s, see <see cref="SquaredDeviations{TState}"/>. Exact where times hardly vary, but rounding of large means turns up as
/// deviations of its own, in every step of the way. From moments: V = m − h², the mean square from A · m = 2 h − 2 + (row sum), in
/// continuous time 2 h. Exact where the deviation is of the size of the mean, as with rare targets, and useless where it is far
/// below. With |ŝ − s| ≤ σ and A⁻¹ non-negative, |V̂ − V| ≤ β V̂ + A⁻¹ σ, where β bounds the relative error of solving, and A⁻¹ σ is itself one
/// substitution without subtraction. With relative errors η of h and β of solving, the second way is off by at most (2 η + β) m + 2 η h².
/// </remarks>
internal sealed class VarianceCandidates<TState>
    where TState : notnull
{
    private const double SecondOrder = 1.01;
    private const double Operations = 8 * ScaledDoubleDouble.OperationError;

    private readonly Chain<TState> _chain;
    private readonly ExitSystem<TState> _system;
    private readonly int[] _members;
    private readonly WideSolution _means;

    internal VarianceCandidates(Chain<TState> chain, ExitSystem<TState> system, int[] members)
    {
        _chain = chain;
        _system = system;
        _members = members;
        _means = system.Solve(Array.ConvertAll(members, _ => (ScaledDoubleDouble)1 / (chain.UniformizationRate ?? 1)));
    }

    /// <summary>The better variance of each member, with a bound on its absolute error, and what that rests on.</summary>
    internal (ScaledDoubleDouble[] Values, ScaledDoubleDouble[] Errors, ErrorBasis Basis) Best()
    {
        var (values, errors) = FromMoments();
        var (others, otherErrors) = FromDeviations();
        for (var k = 0; k < values.Length; k++)
        {
            if (ScaledDoubleDouble.Difference(errors[k], otherErrors[k]).IsZero)
            {
                continue;
            }

            (values[k], errors[k]) = (others[k], otherErrors[k]);
        }

        return (values, errors, _means.Basis);
    }

    private (ScaledDoubleDouble[] Values, ScaledDoubleDouble[] Errors) FromMoments()
    {
        var given = _members.Select((member, k) => SquareGiven(member, _means.Values[k])).ToArray();
        var squares = _system.Solve(given);
        var (values, errors) = (new ScaledDoubleDouble[_members.Length], new ScaledDoubleDouble[_members.Length]);
        for (var k = 0; k < values.Length; k++)
        {
            var square = _means.Values[k] * _means.Values[k];
            values[k] = ScaledDoubleDouble.Difference(squares.Values[k], square);
            errors[k] = (squares.Values[k] * ((2 * _means.WideErrorBound) + squares.WideErrorBound + Operations) * SecondOrder) +
                (square * ((2 * _means.WideErrorBound) + Operations) * SecondOrder);
        }

        return (values, errors);
    }

    private (ScaledDoubleDouble[] Values, ScaledDoubleDouble[] Errors) FromDeviations()
    {
        var means = new double[_chain.StateCount];
        for (var k = 0; k < _members.Length; k++)
        {
            means[_members[k]] = Math.Min(_means.Values[k].ToDouble(), double.MaxValue);
        }

        var deviations = new SquaredDeviations<TState>(_chain, means, _means.RelativeErrorBound);
        var sides = Array.ConvertAll(_members, deviations.Of);
        var solution = _system.Solve([.. sides.Select(side => side.Sum)]);
        var spread = _system.SolveUpper([.. sides.Select(side => side.Error)]);
        var inflation = SecondOrder / Math.Max(1 - _system.SolveError, double.Epsilon);
        return (solution.Values, [.. spread.Select((error, k) => (error * inflation) + (solution.Values[k] * solution.WideErrorBound * SecondOrder))]);
    }

    /// <summary>2 h − 2 + the sum of the row as a step takes it; in continuous time 2 h over the steps per unit of time.</summary>
    private ScaledDoubleDouble SquareGiven(int member, ScaledDoubleDouble mean)
    {
        if (_chain.UniformizationRate is { } rate)
        {
            return (mean + mean) / rate;
        }

        var (sum, canStay) = (default(ScaledDoubleDouble), false);
        foreach (var (to, probability) in _chain.Matrix.Row(member))
        {
            canStay |= to == member;
            sum += to == member ? 0 : probability;
        }

        // A stay that was given fills the row up to one.
        sum = canStay && ScaledDoubleDouble.Difference(sum, 1).IsZero ? 1 : sum;
        return ScaledDoubleDouble.Difference(mean + mean + sum, 2);
    }
}
