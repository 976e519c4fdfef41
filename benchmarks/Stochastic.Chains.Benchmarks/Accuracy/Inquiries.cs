using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Benchmarks.Accuracy;

/// <summary>The questions whose methods are held against exact arithmetic.</summary>
internal static class Inquiries
{
    internal const string Shares = "Long-run shares";

    private const int Steps = 64;
    private const string Library = "library";
    private const string Textbook = "textbook inverse";

    internal static IReadOnlyList<Inquiry> All { get; } =
    [
        new(Shares, AccuracyFamily.Recurrent, exact => exact.Stationary(), [.. StationaryMethods().Select(Stationary)]),
        new(
            "Mean first passage times, all pairs",
            AccuracyFamily.Recurrent,
            exact => [.. exact.MeanFirstPassage().Cast<Rational?>().Select(time => time!.Value)],
            [
                new Trial(Library, (chain, _) => chain.MeanFirstPassage() is var table ? (table.Values.ToArray(), table.Certificate) : null),
                new Trial(Textbook, (_, matrix) => (TextbookFirstPassage(matrix), null)),
            ]),
        new(
            "Mean steps until absorption",
            AccuracyFamily.Ending,
            exact => exact.AbsorptionMean(),
            [
                new Trial(Library, (chain, _) => chain.Absorption() is var ends ? (ends.MeanStepsValues.ToArray(), ends.Certificate) : null),
                new Trial(Textbook, (_, matrix) => (TextbookAbsorption(matrix), null)),
            ]),
        new(
            $"Matrix of {Steps} steps",
            AccuracyFamily.Moderate,
            exact => [.. RoundedSteps.NStepMatrix(exact, Steps).Cast<Rational>()],
            [NStep("squaring", new SquaringMethod()), NStep("propagation", new PropagationMethod()), NStep("spectral", new SpectralMethod())]),
    ];

    private static IStationaryMethod[] StationaryMethods() =>
    [
        new EliminationMethod(), new AggregationMethod(), new GaussSeidelMethod(), new PowerMethod(), new LinearSystemMethod(), new EigenMethod(),
        new PolishedMethod(new LinearSystemMethod()),
    ];

    /// <summary>What did not converge is no answer, whatever its certificate says.</summary>
    private static Trial Stationary(IStationaryMethod method) => new(
        method.Name,
        (chain, _) => chain.TryStationary(method, new SolveOptions(), out var shares) ? (shares.ToArray(), shares.Certificate) : null);

    private static Trial NStep(string name, NStepMethod method) => new(
        name, (chain, _) => chain.NStep(Steps, method) is var power ? (power.Values.ToArray(), power.Certificate) : null);

    /// <summary>The table from the fundamental matrix (Kemeny and Snell, Finite Markov Chains, 1960), by MathNet.Numerics.</summary>
    private static double[] TextbookFirstPassage(double[,] matrix)
    {
        var size = matrix.GetLength(0);
        var inverse = (Matrix<double>.Build.DenseIdentity(size) - Matrix<double>.Build.DenseOfArray(matrix) + (1.0 / size)).Inverse();
        var shares = inverse.ColumnSums() / size;
        return
        [
            .. from i in Enumerable.Range(0, size)
               from j in Enumerable.Range(0, size)
               select ((i == j ? 1 : inverse[j, j]) - (i == j ? 0 : inverse[i, j])) / shares[j],
        ];
    }

    /// <summary>Row sums of the inverse of what is left of the identity among the states that do not end; zero in the ends.</summary>
    private static double[] TextbookAbsorption(double[,] matrix)
    {
        var size = matrix.GetLength(0);
        int[] transient = [.. Enumerable.Range(0, size).Where(state => matrix[state, state] < 1)];
        var inverse = Matrix<double>.Build.Dense(transient.Length, transient.Length, (row, column) =>
            (row == column ? 1 : 0) - matrix[transient[row], transient[column]]).Inverse();
        var result = new double[size];
        for (var k = 0; k < transient.Length; k++)
        {
            result[transient[k]] = inverse.Row(k).Sum();
        }

        return result;
    }
}
