using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Stationary;

/// <summary>Writes the certificate of a stationary vector: the residual of what is returned, and the best bound that can be proved.</summary>
internal static class StationaryCertificate
{
    internal static Certificate OfSingleState { get; } = new()
    {
        Method = "structure",
        Reason = "The only recurrent state holds everything in the long run.",
        Residual = 0,
        RelativeErrorBound = 0,
        AbsoluteErrorBound = 0,
        Basis = ErrorBasis.Structure,
        IsProof = true,
    };

    internal static Certificate Of(StationaryProblem problem, IStationaryMethod method, StationaryVector vector, string choice, double[] shares)
    {
        var level = problem.Options.CertificateLevel;
        var nothing = (Basis: ErrorBasis.None, Bound: double.PositiveInfinity);
        var relative = level == CertificateLevel.Proof ? BestRelative(problem, vector, shares) : nothing;
        var absolute = level == CertificateLevel.Proof ? BestAbsolute(problem, shares, relative) : nothing;
        return new Certificate
        {
            Method = method.Name,
            Reason = $"{choice} {vector.Reason}",
            Residual = level >= CertificateLevel.Residual ? FlowResidual.Of(problem, shares) : double.PositiveInfinity,
            RelativeErrorBound = relative.Bound,
            AbsoluteErrorBound = absolute.Bound,
            Basis = relative.Basis == ErrorBasis.None ? absolute.Basis : relative.Basis,
            AbsoluteBasis = absolute.Basis,
            IsProof = absolute.Basis != ErrorBasis.None,
            Iterations = vector.Iterations,
        };
    }

    /// <summary>What the method proves, or what balancing the flows proves where that is better and the method's proof is not tight.</summary>
    private static (ErrorBasis Basis, double Bound) BestRelative(StationaryProblem problem, StationaryVector vector, double[] shares)
    {
        if (vector.ProvedBound <= DoubledElimination.GoodEnough)
        {
            return (vector.ProvedBasis, vector.ProvedBound);
        }

        var balanced = problem.Matrix.OnRates<double, FlowBalanceProof>(new FlowBalanceProof(problem, shares));
        return balanced < vector.ProvedBound ? (ErrorBasis.FlowBalance, balanced)
            : double.IsFinite(vector.ProvedBound) ? (vector.ProvedBasis, vector.ProvedBound)
            : (ErrorBasis.None, double.PositiveInfinity);
    }

    /// <summary>What the bound on relative errors says about absolute ones, or a bound on the sum of all errors where that is better.</summary>
    private static (ErrorBasis Basis, double Bound) BestAbsolute(StationaryProblem problem, double[] shares, (ErrorBasis Basis, double Bound) relative)
    {
        var known = Math.Min(1, AbsoluteBound.From(relative.Bound, shares.Max()));
        var (basis, bound) = relative.Bound <= DoubledElimination.GoodEnough
            ? (relative.Basis, known)
            : SumOfErrors.Improve(problem, shares, relative.Basis, known);
        return basis == ErrorBasis.None ? (basis, double.PositiveInfinity) : (basis, bound);
    }

    private readonly struct FlowBalanceProof(StationaryProblem problem, double[] shares) : IRateAlgorithm<double>
    {
        public double Run<TRows>(TRows rows)
            where TRows : struct, IRateRows => FlowBalance.RelativeErrorBound(
            rows, problem.Members, problem.Spread(shares), problem.Options.MemoryLimit, problem.Options.CancellationToken);
    }
}
