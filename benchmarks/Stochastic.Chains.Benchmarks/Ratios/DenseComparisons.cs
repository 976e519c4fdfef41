using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Benchmarks.Stationary;

namespace Stochastic.Chains.Benchmarks.Ratios;

/// <summary>Questions of full random chains. A rival of n³ operations that would take many seconds is left out at the largest sizes.</summary>
internal static class DenseComparisons
{
    private const int Steps = 1000;
    private const int Ends = 10;
    private const int LargestForMathNet = 1000;

    internal static IReadOnlyList<Comparison> All { get; } =
    [
        Stationary(100, numpy: 0.45, mathNet: double.NaN),
        Stationary(500, numpy: 0.72, mathNet: 1.0 / 20),
        Stationary(1000, numpy: 0.8, mathNet: 1.0 / 25),
        Stationary(2000, numpy: 0.97, mathNet: double.NaN),
        Stationary(3000, numpy: 0.9, mathNet: double.NaN),
        Eigenvector(100),
        FirstPassage(100, numpy: double.NaN),
        FirstPassage(500, numpy: 0.5),
        FirstPassage(1000, numpy: 0.5),
        FirstPassage(2000, numpy: 0.7),
        Hitting(100),
        Hitting(500),
        Absorption(100),
        Absorption(500),
        Power(100, numpy: 1, mathNet: double.NaN),
        Power(500, numpy: 0.9, mathNet: 1.0 / 30),
        Power(1000, numpy: 0.9, mathNet: double.NaN),
    ];

    private static Comparison Stationary(int states, double numpy, double mathNet) => new("Long-run shares", Full(states), () =>
    {
        var matrix = InventedMatrices.Dense(states);
        var chain = Chain.FromMatrix(matrix);
        var equations = new BalanceEquations(matrix);
        return new Contest(
            () => chain.Stationary(Comparisons.WithoutEvidence).Values[0],
            () => chain.Stationary().Values[0],
            [
                Rival.InPython("numpy.linalg.solve", "stationary", [matrix], numpy),
                .. MathNetUpTo(states, "MathNet.Numerics LU", () => equations.ByDecomposition()[0], mathNet),
            ]);
    });

    private static Comparison Eigenvector(int states) => new("Long-run shares", $"full, {states} states, as an eigenvector", () =>
    {
        var matrix = InventedMatrices.Dense(states);
        var chain = Chain.FromMatrix(matrix);
        var equations = new BalanceEquations(matrix);
        return new Contest(
            () => chain.Stationary(new EigenMethod(), Comparisons.WithoutEvidence).Values[0],
            () => chain.Stationary(new EigenMethod()).Values[0],
            [
                Rival.InPython("numpy.linalg.eig", "eigenvector", [matrix]),
                Rival.Here("MathNet.Numerics Evd", () => equations.ByEigenvector()[0]),
            ]);
    });

    /// <summary>The rivals invert and take one figure of the table from the inverse: the rest would still have to be assembled.</summary>
    private static Comparison FirstPassage(int states, double numpy) => new("Mean first passage times, all pairs", Full(states), () =>
    {
        var matrix = InventedMatrices.Dense(states);
        var chain = Chain.FromMatrix(matrix);
        var system = Matrix<double>.Build.DenseIdentity(states) - Matrix<double>.Build.DenseOfArray(matrix) + (1.0 / states);
        var last = states - 1;
        return new Contest(
            () => chain.MeanFirstPassage(Comparisons.WithoutEvidence).Values[last],
            () => chain.MeanFirstPassage().Values[last],
            [
                Rival.InPython("numpy.linalg.inv", "fundamental", [matrix], numpy),
                .. MathNetUpTo(states, "MathNet.Numerics inverse", () => OneFigure(system.Inverse()), double.NaN),
            ]);

        // The column averages of this inverse are the long-run shares.
        double OneFigure(Matrix<double> inverse) => (inverse[last, last] - inverse[0, last]) / (inverse.Column(last).Sum() / states);
    });

    private static Comparison Hitting(int states) => new("Mean times to one state", Full(states), () =>
    {
        var matrix = InventedMatrices.Dense(states);
        var chain = Chain.FromMatrix(matrix);
        var target = states - 1;
        return new Contest(
            () => chain.TimeTo(target, Comparisons.WithoutEvidence).Values[0],
            () => chain.TimeTo(target).Values[0],
            [
                Rival.InPython("numpy.linalg.solve", "hitting", [matrix]),
                Rival.Here("MathNet.Numerics LU", () => Matrix<double>.Build
                    .Dense(target, target, (row, column) => (row == column ? 1 : 0) - matrix[row, column]).Solve(Vector<double>.Build.Dense(target, 1))[0]),
            ]);
    });

    private static Comparison Absorption(int states) => new("Ends and times of absorption", $"full, {states} states, {Ends} of them ends", () =>
    {
        var matrix = InventedMatrices.WithEnds(states, Ends);
        var chain = Chain.FromMatrix(matrix);
        var whole = Matrix<double>.Build.DenseOfArray(matrix);
        var inside = states - Ends;
        return new Contest(
            () => chain.Absorption(Comparisons.WithoutEvidence).Values[0],
            () => chain.Absorption().Values[0],
            [
                Rival.InPython("numpy.linalg.solve", "absorption", [matrix, new[] { Ends }]),
                Rival.Here("MathNet.Numerics LU", () => (Matrix<double>.Build.DenseIdentity(inside) - whole.SubMatrix(0, inside, 0, inside))
                    .Solve(whole.SubMatrix(0, inside, inside, Ends).Append(Matrix<double>.Build.Dense(inside, 1, 1)))[0, 0]),
            ]);
    });

    private static Comparison Power(int states, double numpy, double mathNet) => new($"Matrix of {Steps} steps", Full(states), () =>
    {
        var matrix = InventedMatrices.Dense(states);
        var chain = Chain.FromMatrix(matrix);
        var whole = Matrix<double>.Build.DenseOfArray(matrix);
        return new Contest(
            () => chain.NStep(Steps, new SquaringMethod(), Comparisons.WithoutEvidence).Values[0],
            () => chain.NStep(Steps, new SquaringMethod()).Values[0],
            [
                Rival.InPython("numpy.linalg.matrix_power", "power", [matrix, new[] { Steps }], numpy),
                .. MathNetUpTo(2 * states, "MathNet.Numerics power", () => whole.Power(Steps)[0, 0], mathNet),
            ]);
    });

    private static string Full(int states) => FormattableString.Invariant($"full, {states} states");

    private static IEnumerable<Rival> MathNetUpTo(int states, string name, Func<double> run, double target) =>
        states <= LargestForMathNet ? [Rival.Here(name, run, target)] : [];
}
