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
        var (basis, relative) = level == CertificateLevel.Proof ? BestBound(problem, vector, shares) : (ErrorBasis.None, double.PositiveInfinity);
        return new Certificate
        {
            Method = method.Name,
            Reason = $"{choice} {vector.Reason}",
            Residual = level >= CertificateLevel.Residual ? FlowResidual.Of(problem, shares) : double.PositiveInfinity,
            RelativeErrorBound = relative,
            AbsoluteErrorBound = basis == ErrorBasis.None ? double.PositiveInfinity : Math.Min(1, AbsoluteBound.From(relative, shares.Max())),
            Basis = basis,
            IsProof = basis != ErrorBasis.None,
            Iterations = vector.Iterations,
        };
    }

    /// <summary>What the method proves, or what balancing the flows proves where that is better and the method's proof is not tight.</summary>
    private static (ErrorBasis Basis, double Relative) BestBound(StationaryProblem problem, StationaryVector vector, double[] shares)
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

    private readonly struct FlowBalanceProof(StationaryProblem problem, double[] shares) : IRateAlgorithm<double>
    {
        public double Run<TRows>(TRows rows)
            where TRows : struct, IRateRows
        {
            var values = new double[problem.Matrix.Size];
            for (var k = 0; k < shares.Length; k++)
            {
                values[problem.Members[k]] = shares[k];
            }

            return FlowBalance.RelativeErrorBound(rows, problem.Members, values, problem.Options.MemoryLimit, problem.Options.CancellationToken);
        }
    }
}
