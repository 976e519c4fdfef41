using Stochastic.Chains;

namespace Snippets;

internal static class AllStartsAtOnce
{
    public static void Table()
    {
        var pool = InventedChains.Pool;
        #region table
        NStepMatrix<string> inEightWeeks = pool.NStep(8);

        Console.WriteLine(inEightWeeks);
        Console.WriteLine($"From dirty to lost: {inEightWeeks["dirty", "lost"]:P1}");
        #endregion
    }

    public static void Rows()
    {
        var pool = InventedChains.Pool;
        #region rows
        StepDistribution<string> fromDirty = pool.NStep(8).Require(relativeError: 1e-12).Row("dirty");

        Console.WriteLine(fromDirty);
        #endregion
    }

    public static void Methods()
    {
        var pump = InventedChains.Pump;
        #region methods
        foreach (NStepMethod method in new NStepMethod[] { new SquaringMethod(), new PropagationMethod(), new SpectralMethod() })
        {
            Certificate proof = pump.NStep(52, method).Certificate;
            Console.WriteLine($"{proof.Method}: proved to twelve digits: {proof is { IsProof: true, RelativeErrorBound: <= 1e-12 }}");
        }
        #endregion
    }

    public static void Spectrum()
    {
        var pump = InventedChains.Pump;
        #region spectrum
        SpectralDecomposition<Stage> spectrum = pump.Spectrum();

        Console.WriteLine($"Second eigenvalue: {spectrum.SubdominantEigenvalue?.Real:F4}");
        Console.WriteLine($"Relaxation time: {spectrum.RelaxationTime:F2} weeks");
        Console.WriteLine($"Full set of vectors: {spectrum.IsDiagonalizable}, condition number {spectrum.ConditionNumber:F1}");

        foreach (long weeks in new long[] { 4, 52, 1_000_000_000 })
        {
            Console.WriteLine($"Failed after {weeks} weeks: {spectrum.NStep(Stage.New, weeks)[Stage.Failed]:F6}");
        }
        #endregion
    }

    public static void Defective()
    {
        #region defective
        // Three stages of wear, each left with the same probability: one eigenvalue for all three, and a single vector.
        Chain<string> wear = Chain.Build<string>(rows => rows
            .Row("new", ("new", 0.5), ("used", 0.5))
            .Row("used", ("used", 0.5), ("old", 0.5))
            .Row("old", ("old", 0.5), ("gone", 0.5))
            .Row("gone", ("gone", 1.0)));

        Console.WriteLine($"Full set of vectors: {wear.Spectrum().IsDiagonalizable}");
        Console.WriteLine($"Spectrum proves something: {wear.NStep(52, new SpectralMethod()).Certificate.IsProof}");
        Console.WriteLine($"Squaring to twelve digits: {wear.NStep(52, new SquaringMethod()).Certificate.RelativeErrorBound <= 1e-12}");
        #endregion
    }
}
