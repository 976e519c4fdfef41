using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Stationary;

/// <summary>The direct solve of one recurrent class by state reduction.</summary>
internal static class StationarySolve<TState>
    where TState : notnull
{
    private const string Method = "state reduction";

    internal static StationaryDistribution<TState> OfClass(Chain<TState> chain, CommunicatingClass<TState> group, SolveOptions options)
    {
        var members = group.Members;
        var values = new double[chain.StateCount];
        if (members.Length == 1)
        {
            values[members[0]] = 1;
            return new StationaryDistribution<TState>(chain.States, values, StructureCertificate);
        }

        var shares = Solve(chain, members, options);
        for (var k = 0; k < members.Length; k++)
        {
            values[members[k]] = shares[k];
        }

        return new StationaryDistribution<TState>(chain.States, values, Certify(chain, members, values, options));
    }

    private static Certificate StructureCertificate { get; } = new()
    {
        Method = Method,
        Reason = "The only recurrent state holds everything in the long run.",
        Residual = 0,
        RelativeErrorBound = 0,
        AbsoluteErrorBound = 0,
        Basis = ErrorBasis.Structure,
        IsProof = true,
    };

    private static double[] Solve(Chain<TState> chain, int[] members, SolveOptions options)
    {
        var table = RateTable.Square(chain.Matrix, members, options);
        var reduction = new GeneralReduction<ScaledDouble>(table, members.Length, members.Length, members.Length - 1);
        reduction.Eliminate(options.Report("elimination"), options.CancellationToken);
        var weights = new ScaledDouble[members.Length];
        weights[^1] = ScaledDouble.One;
        reduction.ExtendLeft(weights);
        var total = default(ScaledDouble);
        foreach (var weight in weights)
        {
            total += weight;
        }

        var shares = new double[members.Length];
        for (var k = 0; k < shares.Length; k++)
        {
            shares[k] = (weights[k] / total).ToDouble();
            if (!double.IsNormal(shares[k]))
            {
                var state = chain.States[members[k]];
                throw new NumericalRangeException(Messages.ShareOutOfRange(state, (weights[k] / total).Exponent), Text.Label(state));
            }
        }

        return shares;
    }

    private static Certificate Certify(Chain<TState> chain, int[] members, double[] values, SolveOptions options)
    {
        var isBounded = options.CertificateLevel == CertificateLevel.Proof;
        var bound = isBounded ? SubtractionFreeBound.OfElimination(members.Length - 1, members.Length, merges: 0) : double.PositiveInfinity;
        return new Certificate
        {
            Method = Method,
            Reason = "Direct and free of subtraction: every share keeps its digits.",
            Residual = options.CertificateLevel >= CertificateLevel.Residual ? FlowResidual.Of(chain.Matrix, members, values) : double.PositiveInfinity,
            RelativeErrorBound = bound,
            AbsoluteErrorBound = bound,
            Basis = double.IsFinite(bound) ? ErrorBasis.SubtractionFree : ErrorBasis.None,
            IsProof = double.IsFinite(bound),
        };
    }
}
