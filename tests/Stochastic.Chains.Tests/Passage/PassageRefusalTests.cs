using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Passage;

public class PassageRefusalTests
{
    private static readonly Chain<string> Pool = Chain.Build<string>(rows => rows
        .Row("clean", ("at shop", 0.9), ("lost", 0.1))
        .Row("at shop", ("clean", 0.8), ("scrapped", 0.2))
        .Row("lost", ("lost", 1))
        .Row("scrapped", ("scrapped", 1)));

    [Fact]
    public void A_target_that_may_never_be_reached_takes_for_ever_with_its_probability_beside_it()
    {
        var times = Pool.TimeTo("lost");

        times.Mean("clean").Should().Be(double.PositiveInfinity);
        times.ReachingProbability("clean").Should().BeApproximately(0.1 / 0.28, Tolerances.SubtractionFree(4));
        times.Mean("lost").Should().Be(0);
        times.ReachingProbability("lost").Should().Be(1);
        times.ReachingProbability("scrapped").Should().Be(0);
        times.ToString().Should().StartWith("Time to 'lost'").And.Contain("Infinity");
    }

    [Fact]
    public void Any_of_several_targets_counts_and_repeated_targets_count_once()
    {
        var times = Pool.TimeToAny(["lost", "scrapped", "lost"]);

        times.Targets.Should().Equal("lost", "scrapped");
        times.Require(absoluteError: 1e-14).Certificate.AbsoluteErrorBound.Should().BeGreaterThan(times.Certificate.RelativeErrorBound);
        times.Mean("clean").Should().BeApproximately(1.9 / 0.28, 10 * Tolerances.SubtractionFree(4));
        times.Certificate.RelativeErrorBound.Should().BeLessThanOrEqualTo(Tolerances.FourRoundings);
    }

    [Fact]
    public void What_follows_from_the_structure_is_exact()
    {
        var line = Chain.Build<string>(rows => rows.Row("end", ("end", 1)).Row("other", ("other", 1)));

        line.TimeTo("end").Certificate.Basis.Should().Be(ErrorBasis.Structure);
        line.Absorption().Certificate.Basis.Should().Be(ErrorBasis.Structure);
        line.Absorption().Probability("other", "other").Should().Be(1);
        line.Absorption().MeanSteps("end").Should().Be(0);
    }

    [Fact]
    public void An_end_that_is_transient_is_refused_with_the_call_that_does_answer()
    {
        var refusal = Pool.Absorption().Invoking(ends => ends.Probability("clean", "at shop")).Should().Throw<ChainStructureException>()
            .WithMessage("'at shop' is transient*TimeTo('at shop').ReachingProbability*").Which;

        refusal.States.Should().Equal("at shop");
    }

    [Fact]
    public void Ends_are_listed_with_a_table_of_where_things_end()
    {
        var ends = Pool.Absorption();

        ends.Ends.Select(end => end.States[0]).Should().Equal("lost", "scrapped");
        ends.Values.Length.Should().Be(8);
        ends.ToString().Should().Contain("ends in lost").And.Contain("clean").And.NotContain("NaN");
        (ends.Probability("clean", "lost") + ends.Probability("clean", "scrapped")).Should().BeApproximately(1, Tolerances.SubtractionFree(4));
    }

    [Fact]
    public void Times_of_a_chain_from_rates_come_back_in_its_unit_exactly_scaled()
    {
        var plant = Chain.FromRates([new TransitionRate<string>("running", "failed", 1e-4), new TransitionRate<string>("failed", "running", 0.05)]);

        plant.TimeTo("failed").Mean("running").Should().BeApproximately(1e4, 1e4 * Tolerances.FourRoundings);
        plant.Stationary()["failed"].Should().BeApproximately(1e-4 / 0.0501, Tolerances.FourRoundings);
    }

    [Fact]
    public void A_mean_time_beyond_the_range_of_a_double_is_refused_by_name()
    {
        var chain = Chain.Build<string>(rows => rows.Row("a", ("a", 1), ("b", 1e-200)).Row("b", ("a", 1), ("end", 1e-200)).Row("end", ("end", 1)));

        chain.Invoking(it => it.TimeTo("end")).Should().Throw<NumericalRangeException>().WithMessage("The mean time from 'a' is about 10^400*")
            .Which.State.Should().Be("a");
    }

    [Fact]
    public void Rare_targets_of_mean_times_of_ten_to_the_hundred_keep_their_digits()
    {
        var chain = Chain.Build<string>(rows => rows.Row("a", ("a", 1), ("b", 1e-50)).Row("b", ("a", 1), ("end", 1e-50)).Row("end", ("end", 1)));

        chain.TimeTo("end").Require(relativeError: Tolerances.FourRoundings).Mean("a").Should().BeApproximately(1e100, 1e100 * Tolerances.SubtractionFree(3));
    }

    [Fact]
    public void Results_enumerate_with_their_labels()
    {
        var times = Pool.TimeToAny(["lost", "scrapped"]);

        times.ToDictionary()["clean"].Should().Be(times.Mean("clean"));
        times.IfReached().Select(pair => pair.Key).Should().Equal(Pool.States);
        times.VisitsFrom("clean").Single(pair => pair.Key == "at shop").Value.Should().Be(times.VisitsFrom("clean")["at shop"]);
        times.IfReached().ToString().Should().Contain("mean time if reached");
    }

    [Fact]
    public void Bad_questions_are_refused()
    {
        Pool.Invoking(chain => chain.TimeTo("dirty")).Should().Throw<UnknownStateException>().WithMessage("*'dirty'*");
        Pool.Invoking(chain => chain.TimeToAny([])).Should().Throw<ArgumentException>().WithMessage("No target states are given*");
        Pool.Invoking(chain => chain.TimeTo("lost", new SolveOptions { MemoryLimit = 1 })).Should().Throw<MemoryLimitException>();
        Pool.Invoking(chain => chain.Absorption(new SolveOptions { MemoryLimit = 1 })).Should().Throw<MemoryLimitException>();
        Pool.TimeTo("lost").Invoking(times => times.Mean("dirty")).Should().Throw<UnknownStateException>();
        Pool.Absorption().Invoking(ends => ends.MeanSteps("dirty")).Should().Throw<UnknownStateException>();
        Pool.Invoking(chain => chain.TimeTo("lost", new SolveOptions { CancellationToken = new CancellationToken(true) }))
            .Should().Throw<OperationCanceledException>();
    }
}
