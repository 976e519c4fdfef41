using MathNet.Numerics.Distributions;
using Stochastic.Chains.Estimation;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Estimation;

/// <summary>Estimates with standard errors and intervals. Counts are invented; published ones are in the sweep of published cases.</summary>
public sealed class EstimateTests
{
    private static readonly string[] Stages = ["clean", "at shop", "lost"];

    private static TransitionCounts<string> Crates() => TransitionCounts.FromCounts(Stages, new long[,] { { 10, 30, 0 }, { 20, 57, 3 }, { 0, 0, 0 } });

    private static EstimateOptions<string> WithJeffreys(EstimateOptions<string> options) => options with { Prior = DirichletPrior.Jeffreys<string>() };

    private static EstimateOptions<string> Ends => new() { Unobserved = UnobservedStates.Absorbing };

    [Fact]
    public void Without_a_prior_the_chain_is_the_most_likely_one()
    {
        var estimate = Crates().Estimate(Ends);

        estimate.Chain.ToArray().Should().BeEquivalentTo(Crates().ToChain(UnobservedStates.Absorbing).ToArray());
        estimate["at shop", "lost"].Should().Be(3.0 / 80);
        estimate.StandardError("at shop", "lost").Should().BeApproximately(Math.Sqrt(3.0 / 80 * (77.0 / 80) / 80), Tolerances.Published);
        estimate.StandardError("lost", "lost").Should().Be(0);
        estimate.Interval("lost", "lost").Should().Be(new Interval(1, 1, 0.95));
        estimate.Interval("lost", "clean").Should().Be(new Interval(0, 0, 0.95));
    }

    [Fact]
    public void Score_interval_solves_its_defining_equation()
    {
        // Wilson (1927): the ends are the p with |p̂ − p| = z √(p(1 − p)/n).
        var z = Normal.InvCDF(0, 1, 0.975);
        foreach (var (count, total) in new[] { (3L, 80L), (1L, 10L), (40L, 80L), (79L, 80L) })
        {
            var interval = RowIntervals.Score(count, total, 0.95);
            foreach (var end in new[] { interval.Lower, interval.Upper })
            {
                Math.Abs(((double)count / total) - end).Should().BeApproximately(z * Math.Sqrt(end * (1 - end) / total), Tolerances.Published);
            }
        }

        RowIntervals.Score(0, 50, 0.95).Lower.Should().Be(0);
        RowIntervals.Score(0, 50, 0.95).Upper.Should().BeApproximately(z * z / (50 + (z * z)), Tolerances.Published);
        RowIntervals.Score(50, 50, 0.95).Upper.Should().Be(1);
        RowIntervals.Score(0, 0, 0.95).Should().Be(new Interval(0, 1, 0.95));
    }

    [Fact]
    public void A_posterior_row_is_dirichlet_with_counts_and_weights_added()
    {
        var estimate = Crates().Estimate(WithJeffreys(Ends));
        var law = new Beta(3.5, 78); // the law of one entry: 3 + 1/2 against 77 + 2/2

        estimate["at shop", "lost"].Should().BeApproximately(law.Mean, Tolerances.Published);
        estimate.StandardError("at shop", "lost").Should().BeApproximately(law.StdDev, Tolerances.Published);
        var interval = estimate.Interval("at shop", "lost");
        law.CumulativeDistribution(interval.Lower).Should().BeApproximately(0.025, Tolerances.IncompleteBeta);
        law.CumulativeDistribution(interval.Upper).Should().BeApproximately(0.975, Tolerances.IncompleteBeta);
    }

    [Fact]
    public void Credible_interval_keeps_its_digits_where_the_probability_is_tiny()
    {
        // Beta(1, b) has the quantile 1 − (1 − q)^(1/b).
        var interval = RowIntervals.Credible(1, 1e5, 0.95);

        interval.Lower.Should().BeApproximately(-double.ExpM1(Math.Log(0.975) / 1e5), interval.Lower * Tolerances.IncompleteBeta);
        interval.Upper.Should().BeApproximately(-double.ExpM1(Math.Log(0.025) / 1e5), interval.Upper * Tolerances.IncompleteBeta);
    }

    [Fact]
    public void A_row_without_observations_rests_on_the_prior_and_is_listed()
    {
        var estimate = Crates().Estimate(WithJeffreys(new()));

        estimate["lost", "clean"].Should().BeApproximately(1.0 / 3, Tolerances.Published);
        estimate.ThinRows.Should().Equal(new ThinRow<string>("lost", 0));
        Crates().Estimate(Ends with { FewObservations = 50 }).ThinRows.Should().Equal(new ThinRow<string>("clean", 40), new ThinRow<string>("lost", 0));
    }

    [Fact]
    public void Impossible_moves_get_no_weight_and_are_no_parameters()
    {
        var impossible = WithJeffreys(Ends) with { ImpossibleMoves = [("clean", "lost")] };
        var estimate = Crates().Estimate(impossible);

        estimate["clean", "lost"].Should().Be(0);
        estimate.Interval("clean", "lost").Upper.Should().Be(0);
        estimate["clean", "at shop"].Should().BeApproximately(30.5 / 41, Tolerances.Published);
        estimate.Fit.ParameterCount.Should().Be(1 + 2);
        Crates().Estimate(Ends).Fit.ParameterCount.Should().Be(2 + 2);
        Crates().Estimate(Ends with { UnseenMoves = UnseenMoves.Impossible }).Fit.ParameterCount.Should().Be(1 + 2);
        Crates().Estimate(Ends).Interval("clean", "lost").Upper.Should().BeGreaterThan(0, "it may only not have been seen");
        Crates().Estimate(Ends with { ImpossibleMoves = [("clean", "lost")] }).Interval("clean", "lost").Upper.Should().Be(0);
    }

    [Fact]
    public void A_row_can_be_given_its_own_prior()
    {
        var prior = DirichletPrior.Uniform<string>().WithRow("clean", ("clean", 9)).WithRow("clean", ("clean", 2), ("at shop", 8));
        var estimate = Crates().Estimate(Ends with { Prior = prior });

        estimate["clean", "at shop"].Should().BeApproximately(38.0 / 50, Tolerances.Published);
        estimate["clean", "lost"].Should().Be(0);
        estimate["at shop", "lost"].Should().BeApproximately(4.0 / 83, Tolerances.Published);
    }

    [Fact]
    public void Counted_moves_that_are_said_to_be_impossible_are_all_named()
    {
        var refused = FluentActions.Invoking(() => Crates().Estimate(Ends with
        {
            Prior = DirichletPrior.Uniform<string>().WithRow("clean", ("at shop", 1)),
            ImpossibleMoves = [("at shop", "lost")],
        })).Should().Throw<InvalidChainException>().Which;

        refused.Faults.Select(fault => fault.Kind).Should().Equal(ChainFaultKind.ImpossibleMove, ChainFaultKind.ImpossibleMove);
        refused.Faults[0].Message.Should().Contain("'at shop'").And.Contain("'lost'").And.Contain("3 times");
        refused.Faults[1].States.Should().Equal("clean", "clean");
    }

    [Fact]
    public void States_never_left_are_refused_kept_as_ends_or_dropped()
    {
        FluentActions.Invoking(() => Crates().Estimate()).Should().Throw<InvalidChainException>().Which.Faults.Should().ContainSingle()
            .Which.Kind.Should().Be(ChainFaultKind.UnobservedRow);
        Crates().Estimate(new() { Unobserved = UnobservedStates.Drop }).States.Should().Equal("clean", "at shop");
        FluentActions.Invoking(() => Crates().Estimate(new() { Unobserved = (UnobservedStates)9 })).Should().Throw<ArgumentOutOfRangeException>();
        FluentActions.Invoking(() => Crates().Estimate(Ends with { ImpossibleMoves = [("clean", "sold")] })).Should().Throw<UnknownStateException>();
    }

    [Fact]
    public void Options_out_of_range_are_refused()
    {
        FluentActions.Invoking(() => new EstimateOptions<string> { Level = 1 }).Should().Throw<ArgumentOutOfRangeException>();
        FluentActions.Invoking(() => new EstimateOptions<string> { FewObservations = -1 }).Should().Throw<ArgumentOutOfRangeException>();
        FluentActions.Invoking(() => new EstimateOptions<string> { ImpossibleMoves = null! }).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => DirichletPrior.Symmetric<string>(0)).Should().Throw<ArgumentOutOfRangeException>();
        FluentActions.Invoking(() => DirichletPrior.Uniform<string>().WithRow("a", ("b", double.NaN))).Should().Throw<ArgumentOutOfRangeException>();
    }

    [Fact]
    public void A_prior_over_too_many_pairs_is_refused_before_it_takes_memory()
    {
        var longPath = TransitionCounts.FromPath(Enumerable.Range(0, 20_000).Append(0));

        FluentActions.Invoking(() => longPath.Estimate(new() { Prior = DirichletPrior.Uniform<int>() })).Should().Throw<MemoryLimitException>();
        longPath.Estimate(new() { Prior = DirichletPrior.Uniform<int>(), UnseenMoves = UnseenMoves.Impossible })[3, 4].Should().Be(1);
    }

    [Fact]
    public void Defaults_are_those_documented()
    {
        var options = new EstimateOptions<string>();

        options.Prior.Should().BeNull();
        options.UnseenMoves.Should().Be(UnseenMoves.Possible);
        options.ImpossibleMoves.Should().BeEmpty();
        options.Unobserved.Should().Be(UnobservedStates.Refuse);
        options.Level.Should().Be(0.95);
        options.FewObservations.Should().Be(30);
        DirichletPrior.Jeffreys<string>().Weight.Should().Be(0.5);
    }

    [Fact]
    public void An_estimate_reads_the_same_in_every_culture()
    {
        using var culture = new CommaCulture();

        Crates().Estimate(Ends).ToString().Should().Contain("maximum likelihood").And.Contain("0.0375 ±0.02124");
        new Interval(0.25, 0.5, 0.95).ToString().Should().Be("0.25 to 0.5 (95 %)");
        new Interval(0.25, 0.5, 0.95).Width.Should().Be(0.25);
        new Interval(0.25, 0.5, 0.95).Contains(0.5).Should().BeTrue();
    }
}
