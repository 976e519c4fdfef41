using MathNet.Numerics.Distributions;
using Stochastic.Chains.Confidence;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Confidence;

/// <summary>Intervals for answers. All counts are invented.</summary>
public sealed class ConfidenceTests
{
    private static readonly SolveOptions Plain = new() { CertificateLevel = CertificateLevel.None };

    private static TransitionCounts<string> Pump() => TransitionCounts.FromCounts(["runs", "fails"], new long[,] { { 180, 20 }, { 45, 5 } });

    private static TransitionCounts<string> Crates() => TransitionCounts.FromCounts(
        ["clean", "at shop", "lost"], new long[,] { { 100, 300, 0 }, { 200, 570, 30 }, { 0, 0, 0 } });

    private static ConfidenceOptions<string> Ends => new() { Estimate = new() { UnseenMoves = UnseenMoves.Impossible, Unobserved = UnobservedStates.Absorbing } };

    [Fact]
    public void A_single_probability_has_the_interval_of_its_beta_law()
    {
        var law = new Beta(20.5, 180.5);
        var confidence = Pump().Confidence(chain => chain["runs", "fails"], new ConfidenceOptions<string> { Draws = 20_000 });

        confidence.Estimate.Should().BeApproximately(law.Mean, Tolerances.Published);
        confidence.Mean.Should().BeApproximately(law.Mean, 4 * confidence.MeanError);
        confidence.MeanError.Should().BeApproximately(law.StdDev / Math.Sqrt(20_000), law.StdDev / 1000);
        confidence.StandardError.Should().BeApproximately(law.StdDev, law.StdDev / 40);
        law.CumulativeDistribution(confidence.Interval.Lower).Should().BeApproximately(0.025, 0.005);
        law.CumulativeDistribution(confidence.Interval.Upper).Should().BeApproximately(0.975, 0.005);
        confidence.LowerError.Should().BeInRange(confidence.StandardError / 1000, confidence.StandardError / 20);
        confidence.UpperError.Should().BeInRange(confidence.StandardError / 1000, confidence.StandardError / 20);
        (confidence.Draws, confidence.StructurallyDifferentDraws, confidence.RefusedDraws, confidence.InfiniteDraws).Should().Be((20_000, 0, 0, 0));
    }

    [Fact]
    public void The_bootstrap_draws_multinomial_rows_of_the_same_size()
    {
        var confidence = Pump().Confidence(
            chain => chain["runs", "fails"], new ConfidenceOptions<string> { Method = ConfidenceMethod.ParametricBootstrap, Draws = 10_000 });

        confidence.Estimate.Should().Be(0.1);
        confidence.StandardError.Should().BeApproximately(Math.Sqrt(0.1 * 0.9 / 200), 0.001);
        confidence.Values.ToArray().Should().OnlyContain(value => Math.Abs((value * 200) - Math.Round(value * 200)) < Tolerances.IncompleteBeta);
    }

    [Theory]
    [InlineData(ConfidenceMethod.PosteriorSampling)]
    [InlineData(ConfidenceMethod.ParametricBootstrap)]
    public void The_same_seed_gives_the_same_bits_whatever_the_parallelism(ConfidenceMethod method)
    {
        double[] Draws(int threads, long seed) => Crates().Confidence(
            chain => chain.Absorption(Plain).MeanSteps("clean"), Ends with { Method = method, Draws = 200, Parallelism = threads, Seed = seed }).Values.ToArray();

        Draws(2, 9).Should().Equal(Draws(1, 9));
        Draws(5, 9).Should().Equal(Draws(1, 9));
        Draws(1, 10).Should().NotEqual(Draws(1, 9));
    }

    [Fact]
    public void Draws_with_another_structure_are_counted_and_stay_in_the_interval()
    {
        // One move out of ten is never drawn in about a third of the bootstrap's counts; then the first state is never left.
        var counts = TransitionCounts.FromCounts(["runs", "fails"], new long[,] { { 9, 1 }, { 5, 5 } });
        var bootstrap = new ConfidenceOptions<string> { Method = ConfidenceMethod.ParametricBootstrap, Draws = 1000 };

        var steps = counts.Confidence(chain => chain.TimeTo("fails").Mean("runs"), bootstrap);
        steps.StructurallyDifferentDraws.Should().BeInRange(280, 420);
        steps.InfiniteDraws.Should().BeInRange(280, steps.StructurallyDifferentDraws);
        steps.Interval.Upper.Should().Be(double.PositiveInfinity);
        steps.StandardError.Should().Be(double.PositiveInfinity);
        steps.UpperError.Should().Be(double.PositiveInfinity);
        steps.RefusedDraws.Should().Be(0);
        steps.ToString().Should().Contain("of another structure");
    }

    [Fact]
    public void Draws_without_an_answer_widen_both_ends()
    {
        var counts = TransitionCounts.FromCounts(["a", "b"], new long[,] { { 9, 1 }, { 1, 9 } });
        var confidence = counts.Confidence(
            chain => chain.Stationary()["a"], new ConfidenceOptions<string> { Method = ConfidenceMethod.ParametricBootstrap, Draws = 400 });

        confidence.RefusedDraws.Should().BeInRange(20, 90, "both rows must lose their move: (0.9^10)² of the draws");
        confidence.FirstRefusal.Should().NotBeNullOrEmpty();
        confidence.Interval.Lower.Should().Be(double.NegativeInfinity);
        confidence.Interval.Upper.Should().Be(double.PositiveInfinity);
        confidence.Values.ToArray().Count(double.IsNaN).Should().Be(confidence.RefusedDraws);
    }

    [Fact]
    public void A_few_refused_draws_only_move_the_ends()
    {
        double[] values = [.. Enumerable.Range(1, 998).Select(k => (double)k), double.NaN, double.NaN];
        var spread = DrawSpread.Of(values, 0.95);

        spread.Interval.Lower.Should().Be(25 - 2, "two ranks are taken by the refused draws");
        spread.Interval.Upper.Should().Be(998 - 24 + 2);
        DrawSpread.Of([.. Enumerable.Range(1, 1000).Select(k => (double)k)], 0.95).Interval.Should().Be(new Interval(25, 976, 0.95));
    }

    [Fact]
    public void Several_answers_come_from_the_same_chains()
    {
        var both = Pump().ConfidenceOfAll(chain => chain.Stationary(Plain).ToArray(), new ConfidenceOptions<string> { Draws = 100 });

        both.Should().HaveCount(2);
        foreach (var (one, other) in both[0].Values.ToArray().Zip(both[1].Values.ToArray()))
        {
            (one + other).Should().BeApproximately(1, Tolerances.SumOfOne(4));
        }

        both[0].Values.ToArray().Should().Equal(
            Pump().Confidence(chain => chain.Stationary(Plain)["runs"], new ConfidenceOptions<string> { Draws = 100 }).Values.ToArray());
    }

    [Fact]
    public void Progress_is_reported_and_work_can_be_cancelled()
    {
        using var cancellation = new CancellationTokenSource();
        var progress = new Recorder();
        Pump().Confidence(chain => chain["runs", "fails"], new ConfidenceOptions<string> { Draws = 50, Progress = progress });

        progress.Reports.Should().HaveCount(50).And.BeInAscendingOrder();
        progress.Reports[^1].Should().Be(1);
        cancellation.Cancel();
        FluentActions.Invoking(() => Pump().Confidence(chain => chain["runs", "fails"], new ConfidenceOptions<string> { CancellationToken = cancellation.Token }))
            .Should().Throw<OperationCanceledException>();
    }

    [Fact]
    public void What_cannot_be_asked_is_refused()
    {
        FluentActions.Invoking(() => Crates().Confidence(chain => chain["clean", "lost"])).Should().Throw<InvalidChainException>().WithMessage("*'lost'*");
        FluentActions.Invoking(() => TransitionCounts.FromCounts(["a", "b"], new long[,] { { 5, 0 }, { 0, 5 } }).Confidence(chain => chain.Stationary()["a"]))
            .Should().Throw<ChainStructureException>();
        FluentActions.Invoking(() => Pump().Confidence(_ => 1, new ConfidenceOptions<string> { Draws = 38 })).Should().Throw<ArgumentException>().WithMessage("38 draws*at least 40*");
        FluentActions.Invoking(() => Pump().Confidence(_ => 1, new ConfidenceOptions<string> { Method = (ConfidenceMethod)7 })).Should().Throw<ArgumentOutOfRangeException>();
        var calls = 0;
        FluentActions.Invoking(() => Pump().ConfidenceOfAll(_ => new double[1 + (calls++)], new ConfidenceOptions<string>())).Should().Throw<InvalidOperationException>().WithMessage("*as many numbers*");
        FluentActions.Invoking(() => new ConfidenceOptions<string> { Level = 0 }).Should().Throw<ArgumentOutOfRangeException>();
        FluentActions.Invoking(() => new ConfidenceOptions<string> { Draws = 0 }).Should().Throw<ArgumentOutOfRangeException>();
        FluentActions.Invoking(() => new ConfidenceOptions<string> { Parallelism = 0 }).Should().Throw<ArgumentOutOfRangeException>();
        FluentActions.Invoking(() => new ConfidenceOptions<string> { Estimate = null! }).Should().Throw<ArgumentNullException>();
    }

    [Fact]
    public void Defaults_are_those_documented()
    {
        var options = new ConfidenceOptions<string>();

        options.Method.Should().Be(ConfidenceMethod.PosteriorSampling);
        options.Estimate.Prior!.Weight.Should().Be(0.5);
        options.Estimate.UnseenMoves.Should().Be(UnseenMoves.Impossible);
        (options.Level, options.Draws, options.Seed, options.Parallelism).Should().Be((0.95, 1000, 1, 1));
        options.CancellationToken.Should().Be(CancellationToken.None);
        options.Progress.Should().BeNull();
    }

    [Fact]
    public void Confidence_reads_the_same_in_every_culture()
    {
        using var culture = new CommaCulture();

        Pump().Confidence(_ => 0.5).ToString().Should().Be("0.5, 0.5 to 0.5 (95 %), standard error 0, 1,000 draws");
    }

    private sealed class Recorder : IProgress<SolveProgress>
    {
        internal List<double> Reports { get; } = [];

        public void Report(SolveProgress value) => Reports.Add(value.Fraction);
    }
}
