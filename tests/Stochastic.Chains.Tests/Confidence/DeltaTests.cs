using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Confidence;

/// <summary>The delta method against closed forms and against the bootstrap. Counts are invented.</summary>
public sealed class DeltaTests
{
    private static readonly EstimateOptions<string> Ends = new() { Unobserved = UnobservedStates.Absorbing };

    private static TransitionCounts<string> Pump() => TransitionCounts.FromCounts(["runs", "fails"], new long[,] { { 1800, 200 }, { 450, 50 } });

    private static TransitionCounts<string> Crates() => TransitionCounts.FromCounts(
        ["clean", "at shop", "lost", "scrapped"], new long[,] { { 1000, 2900, 0, 100 }, { 2000, 5700, 300, 0 }, { 0, 0, 0, 0 }, { 0, 0, 0, 0 } });

    [Fact]
    public void Two_states_have_the_closed_form()
    {
        // π_fails = a/(a + b) with a = 0.1 from 2000 moves and b = 0.9 from 500: slopes b/(a + b)² and −a/(a + b)².
        var share = Pump().StationaryError("fails");

        share.Estimate.Should().BeApproximately(0.1, Tolerances.Published);
        share.StandardError.Should().BeApproximately(Math.Sqrt((0.9 * 0.9 * 0.1 * 0.9 / 2000) + (0.1 * 0.1 * 0.9 * 0.1 / 500)), Tolerances.Published);
        share.Interval.Upper.Should().BeApproximately(0.1 + (1.959963984540054 * share.StandardError), Tolerances.Published);
        share.Interval.Level.Should().Be(0.95);
    }

    [Fact]
    public void A_geometric_time_has_the_closed_form()
    {
        // A mean time of 1/a has the slope −1/a².
        Pump().TimeError("runs", "fails", new()).StandardError.Should().BeApproximately(100 * Math.Sqrt(0.1 * 0.9 / 2000), Tolerances.Published * 100);
    }

    [Fact]
    public void With_many_counts_it_agrees_with_the_bootstrap()
    {
        var plain = new SolveOptions { CertificateLevel = CertificateLevel.None };
        var bootstrap = new ConfidenceOptions<string> { Method = ConfidenceMethod.ParametricBootstrap, Estimate = Ends, Draws = 3000 };

        Agree(Crates().AbsorptionError("clean", "lost", Ends), Crates().Confidence(chain => chain.Absorption(plain).Probability("clean", "lost"), bootstrap));
        Agree(Pump().TimeError("runs", "fails", Ends), Pump().Confidence(chain => chain.TimeTo("fails", plain).Mean("runs"), bootstrap));
        Agree(Pump().StationaryError("runs", Ends), Pump().Confidence(chain => chain.Stationary(plain)["runs"], bootstrap));
    }

    /// <summary>The deviation of 3000 draws scatters by 1.3 %; the method itself is of first order.</summary>
    private static void Agree(DeltaConfidence delta, AnswerConfidence bootstrap)
    {
        delta.Estimate.Should().BeApproximately(bootstrap.Estimate, Tolerances.Published * bootstrap.Estimate);
        (bootstrap.StandardError / delta.StandardError).Should().BeInRange(0.93, 1.07);
    }

    [Fact]
    public void What_has_no_slope_is_refused()
    {
        FluentActions.Invoking(() => Crates().StationaryError("lost")).Should().Throw<InvalidChainException>();
        FluentActions.Invoking(() => Crates().StationaryError("lost", Ends)).Should().Throw<ChainStructureException>();
        FluentActions.Invoking(() => Crates().TimeError("clean", "lost", Ends)).Should().Throw<ChainStructureException>();
        FluentActions.Invoking(() => Pump().StationaryError("lost")).Should().Throw<UnknownStateException>();
    }

    [Fact]
    public void It_reads_the_same_in_every_culture()
    {
        using var culture = new CommaCulture();

        Pump().TimeError("runs", "fails", new()).ToString().Should().Be("10, 8.685 to 11.31 (95 %), standard error 0.6708");
    }
}
