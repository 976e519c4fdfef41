using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.Providers.LinearAlgebra;

namespace Stochastic.Chains.Benchmarks.Stationary;

/// <summary>What one would write with MathNet.Numerics alone, by its managed provider; buffers are kept between calls.</summary>
internal sealed class BalanceEquations(double[,] matrix)
{
    private readonly int _states = matrix.GetLength(0);
    private readonly double[] _system = new double[matrix.Length];
    private readonly double[] _shares = new double[matrix.GetLength(0)];
    private readonly int[] _pivots = new int[matrix.GetLength(0)];

    /// <summary>The balance equations with the last one replaced by the sum, by LU decomposition.</summary>
    internal double[] ByDecomposition()
    {
        // Column-major: column "from" holds the balance of every state but the last, whose equation is the sum of all shares.
        for (var from = 0; from < _states; from++)
        {
            for (var to = 0; to < _states; to++)
            {
                _system[(from * _states) + to] = to == _states - 1 ? 1 : (to == from ? 1 : 0) - matrix[from, to];
            }
        }

        Array.Clear(_shares);
        _shares[^1] = 1;
        var provider = ManagedLinearAlgebraProvider.Instance;
        provider.LUFactor(_system, _states, _pivots);
        provider.LUSolveFactored(1, _system, _states, _pivots, _shares);
        return _shares;
    }

    /// <summary>The eigenvector of the transposed matrix whose eigenvalue is closest to one, divided by its sum.</summary>
    internal double[] ByEigenvector()
    {
        var decomposition = Matrix<double>.Build.DenseOfArray(matrix).Transpose().Evd();
        var closest = decomposition.EigenValues.Select((value, index) => ((value - 1).Magnitude, index)).Min().index;
        var vector = decomposition.EigenVectors.Column(closest);
        return (vector / vector.Sum()).ToArray();
    }

    /// <summary>Refuses to time solves that do not agree.</summary>
    internal static void RequireAgreement(IEnumerable<double> rival, IEnumerable<double> shares)
    {
        const double Agreement = 1e-9;
        var difference = rival.Zip(shares, (first, second) => Math.Abs((first / second) - 1)).Max();
        if (difference > Agreement)
        {
            throw new InvalidOperationException($"The two solves differ by {difference}, so their times mean nothing.");
        }
    }
}
