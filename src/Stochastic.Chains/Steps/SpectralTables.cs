using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>Products of square row-major tables.</summary>
internal static class SpectralTables
{
    internal static double[] Product(double[] left, double[] right, int order, WorkSharing sharing)
    {
        var product = new double[order * order];
        var (leftView, rightView, target) = (new MatrixView(left, 0, order), new MatrixView(right, 0, order), new MatrixView(product, 0, order));
        MatrixMultiply.Add(leftView, rightView, target, order, order, order, InstructionSet.Widest, sharing);
        return product;
    }
}
