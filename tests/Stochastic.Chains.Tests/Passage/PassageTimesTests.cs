using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Passage;

/// <summary>The distribution of a time, and its quantiles.</summary>
public class PassageTimesTests
{
    private const int Horizon = 24;

    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    [Theory]
    [MemberData(nameof(Families))]
    public void No_probability_of_a_time_is_off_by_more_than_its_bound(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(20, 8))
        {
            var target = sample.Target ?? (int)(sample.Seed % (ulong)sample.StateCount);
            var chain = sample.ToChain();
            var stopped = ExactChain.FromTransitions(
                sample.StateCount, sample.Transitions.Where(move => move.From != target).Append((target, target, 1)));
            foreach (var from in chain.States)
            {
                var times = chain.TimeTo(target).Distribution(from, Horizon);
                for (var steps = 0; steps <= Horizon; steps += 6)
                {
                    var exact = stopped.NStepRow(from, steps)[target];
                    Check(exact, times.CumulativeProbability(steps), times.Certificate, sample);
                    Check(1 - exact, times.SurvivalProbability(steps), times.Certificate, sample);
                }
            }
        }
    }

    [Fact]
    public void Moments_agree_with_the_summed_distribution()
    {
        var times = Line(0.3).TimeTo(3);
        var distribution = times.Distribution(0, 400);
        var mean = Enumerable.Range(0, 401).Sum(steps => steps * distribution.Probability(steps));
        var square = Enumerable.Range(0, 401).Sum(steps => (double)steps * steps * distribution.Probability(steps));

        mean.Should().BeApproximately(times.Mean(0), times.Mean(0) * Tolerances.Published);
        square.Should().BeApproximately(times.Variance(0) + (times.Mean(0) * times.Mean(0)), square * Tolerances.Published);
    }

    [Fact]
    public void A_distribution_far_out_stops_multiplying_when_all_shrinks_alike_and_stays_within_its_bound()
    {
        const int horizon = 100_000;
        var chain = Chain.Build<string>(rows => rows
            .Row("a", ("a", 0.5), ("b", 0.499), ("end", 0.001)).Row("b", ("a", 0.7), ("b", 0.299), ("end", 0.001)).Row("end", ("end", 1)));

        var times = chain.TimeTo("end").Distribution("a", horizon);

        // Both states end with the same probability, so the time is geometric.
        times.Certificate.Iterations.Should().BeLessThan(1000);
        var exact = Math.Pow(1 - 0.001, horizon);
        times.SurvivalProbability(horizon).Should().BeApproximately(exact, exact * times.Certificate.RelativeErrorBound);
        times.Certificate.RelativeErrorBound.Should().BeLessThan(1e-9);
        times.CumulativeProbability(horizon).Should().BeApproximately(1, times.Certificate.AbsoluteErrorBound);
        times.MaxSteps.Should().Be(horizon);
        times.ToString().Should().StartWith("From 'a'").And.Contain("up to 100,000 steps");
    }

    [Theory]
    [InlineData(0.5)]
    [InlineData(0.9)]
    [InlineData(0.999)]
    public void A_quantile_is_the_first_step_with_that_probability(double probability)
    {
        var times = Line(0.3).TimeTo(3);

        var steps = (int)times.Quantile(0, probability);

        var distribution = times.Distribution(0, steps);
        distribution.CumulativeProbability(steps).Should().BeGreaterThanOrEqualTo(probability);
        distribution.CumulativeProbability(steps - 1).Should().BeLessThan(probability);
    }

    [Theory]
    [InlineData(1e-6)]
    [InlineData(1e-13)]
    [InlineData(1e-60)]
    public void Quantiles_of_rare_targets_are_found_by_doubling(double rare)
    {
        var chain = Chain.Build<string>(rows => rows
            .Row("a", ("a", 0.5), ("b", 0.5 - rare), ("end", rare)).Row("b", ("a", 0.5), ("b", 0.5 - rare), ("end", rare)).Row("end", ("end", 1)));

        var median = chain.TimeTo("end").Quantile("a", 0.5);

        // Geometric with probability r: the first n with 1 - (1 - r)^n at least 1/2.
        var exact = Math.Log(0.5) / Math.Log(1 - rare);
        exact = rare < 1e-10 ? Math.Log(2) / rare : Math.Ceiling(exact);
        median.Should().BeApproximately(exact, exact * Tolerances.Published);
        (rare < 1e-10 || median == exact).Should().BeTrue();
    }

    [Fact]
    public void A_continued_distribution_that_leaves_the_range_of_doubles_claims_no_relative_bound()
    {
        var often = Chain.Build<string>(rows => rows.Row("a", ("a", 0.7), ("b", 0.3)).Row("b", ("b", 1))).TimeTo("b").Distribution("a", 5000);
        var hardlyEver = Chain.Build<string>(rows => rows.Row("a", ("a", 1e-12), ("b", 1 - 1e-12)).Row("b", ("b", 1))).TimeTo("b").Distribution("a", 30);

        often.Certificate.RelativeErrorBound.Should().Be(double.PositiveInfinity);
        often.Certificate.AbsoluteErrorBound.Should().BePositive().And.BeLessThan(4 * Tolerances.Steps(5000, 5));
        often.SurvivalProbability(100).Should().BeApproximately(Math.Pow(0.7, 100), Math.Pow(0.7, 100) * Tolerances.Published);
        hardlyEver.Certificate.RelativeErrorBound.Should().Be(double.PositiveInfinity);
    }

    [Theory]
    [InlineData(0.3, 1e-16)]
    [InlineData(0.003845731833408321, 3.403055606668204e-13)]
    [InlineData(0.1, 1.1102230246251565e-16)]
    public void Quantiles_close_to_one_count_those_still_on_the_way(double move, double rest)
    {
        var chain = Chain.Build<string>(rows => rows.Row("a", ("a", 1 - move), ("b", move)).Row("b", ("b", 1)));
        var exact = Math.Ceiling(Math.Log(1 - (1 - rest)) / Math.Log(1 - move));

        chain.TimeTo("b").Quantile("a", 1 - rest).Should().BeInRange(exact, exact + 1);
    }

    [Fact]
    public void A_probability_that_is_only_approached_is_never_reached()
    {
        var chain = Chain.Build<string>(rows => rows.Row("a", ("a", 0.5), ("b", 0.25), ("c", 0.25)).Row("b", ("b", 1)).Row("c", ("c", 1)));
        var soon = Chain.Build<string>(rows => rows.Row("a", ("b", 0.25), ("c", 0.75)).Row("b", ("b", 1)).Row("c", ("c", 1)));

        chain.TimeTo("b").Quantile("a", 0.5).Should().Be(double.PositiveInfinity);
        chain.TimeTo("b").Quantile("a", 0.499).Should().Be(9);
        soon.TimeTo("b").Quantile("a", 0.25).Should().Be(1);
    }

    [Fact]
    public void A_far_horizon_is_refused_by_its_memory_and_can_be_cancelled()
    {
        var times = Line(0.3).TimeTo(3);

        times.Invoking(it => it.Distribution(0, 100_000_000, new SolveOptions { MemoryLimit = 1_000_000 })).Should().Throw<MemoryLimitException>();
        Line(0.3).FirstPassageDistribution(0, 3, 40).Values.ToArray().Should().Equal(times.Distribution(0, 40).Values.ToArray());
        Line(0.3).Invoking(it => it.FirstPassageDistribution(0, 3, -1)).Should().Throw<ArgumentOutOfRangeException>();
    }

    [Fact]
    public void A_target_that_may_be_missed_has_no_quantile_beyond_its_probability()
    {
        var chain = Chain.Build<string>(rows => rows.Row("a", ("b", 0.25), ("c", 0.75)).Row("b", ("b", 1)).Row("c", ("c", 1)));

        chain.TimeTo("b").Quantile("a", 0.2).Should().Be(1);
        chain.TimeTo("b").Quantile("a", 0.3).Should().Be(double.PositiveInfinity);
        chain.TimeTo("b").Distribution("a", 2).SurvivalProbability(2).Should().Be(0.75);
        chain.TimeTo("b").Distribution("b", 1).Values.ToArray().Should().Equal(1, 0);
    }

    [Fact]
    public void Bad_questions_about_times_are_refused()
    {
        var times = Line(0.3).TimeTo(3);
        var plant = Chain.FromRates([new TransitionRate<string>("running", "failed", 1e-4), new TransitionRate<string>("failed", "running", 0.05)]);

        times.Invoking(it => it.Distribution(0, -1)).Should().Throw<ArgumentOutOfRangeException>();
        times.Invoking(it => it.Distribution(0, 5).Probability(6)).Should().Throw<ArgumentOutOfRangeException>().WithMessage("*0 to 5 steps; 6 was asked for*");
        times.Invoking(it => it.Quantile(0, 1)).Should().Throw<ArgumentOutOfRangeException>().WithMessage("The probability is 1. Give a number above 0 and below 1*");
        times.Invoking(it => it.Quantile(7, 0.5)).Should().Throw<UnknownStateException>();
        plant.TimeTo("failed").Invoking(it => it.Quantile("running", 0.5)).Should().Throw<InvalidOperationException>().WithMessage("*AfterTime*");
        plant.TimeTo("failed").Invoking(it => it.Distribution("running", 5)).Should().Throw<InvalidOperationException>().WithMessage("*AfterTime*");
        Line(1e-9).TimeTo(3).Invoking(it => it.Quantile(0, 0.5, new SolveOptions { MemoryLimit = 300 })).Should().Throw<MemoryLimitException>();
        var cancelled = new SolveOptions { CancellationToken = new CancellationToken(true) };
        times.Invoking(it => it.Quantile(0, 0.5, cancelled)).Should().Throw<OperationCanceledException>();
        times.Invoking(it => it.Distribution(0, 5, cancelled)).Should().Throw<OperationCanceledException>();
        times.Invoking(it => it.Moments(cancelled)).Should().Throw<OperationCanceledException>();
        times.Invoking(it => it.VisitsFrom(0, cancelled)).Should().Throw<OperationCanceledException>();
        times.Invoking(it => it.IfReached(cancelled)).Should().Throw<OperationCanceledException>();
    }

    /// <summary>An invented line of three stations, each left with the same probability.</summary>
    private static Chain<int> Line(double move) => Chain.Build<int>(rows => rows
        .Row(0, (0, 1 - move), (1, move)).Row(1, (1, 1 - move), (2, move)).Row(2, (2, 1 - move), (3, move)).Row(3, (3, 1)));

    private static void Check(Rational exact, double computed, Certificate certificate, SampleChain sample)
    {
        certificate.IsProof.Should().BeTrue(sample.ToString());
        if (double.IsFinite(certificate.RelativeErrorBound))
        {
            exact.RelativeDifference(computed).Should().BeLessThanOrEqualTo(certificate.RelativeErrorBound, sample.ToString());
        }

        Math.Abs((exact - Rational.FromDouble(computed)).ToDouble()).Should().BeLessThanOrEqualTo(certificate.AbsoluteErrorBound, sample.ToString());
    }
}
