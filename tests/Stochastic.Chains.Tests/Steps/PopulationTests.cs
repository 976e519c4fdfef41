using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Steps;

/// <summary>Populations: expected numbers by hand and exactly, and the law of a number against exact enumeration.</summary>
public class PopulationTests
{
    private static readonly Chain<string> Pool = Chain.Build<string>(rows => rows
        .Row("clean", ("clean", 0.25), ("out", 0.75))
        .Row("out", ("out", 0.5), ("clean", 0.375), ("lost", 0.125))
        .Row("lost", ("lost", 1.0)));

    [Fact]
    public void Expected_numbers_of_a_closed_population_are_its_counts_times_the_probabilities()
    {
        var population = Pool.StartingWith(("clean", 100), ("out", 60));
        var forecast = population.Forecast(10);

        population.Total.Should().Be(160);
        population.Count("out").Should().Be(60);
        for (var step = 0; step <= 10; step++)
        {
            var (clean, away) = (Pool.StartingIn("clean").After(step), Pool.StartingIn("out").After(step));
            foreach (var state in Pool.States)
            {
                var expected = (100 * clean[state]) + (60 * away[state]);
                forecast.Expected(state, step).Should().BeApproximately(expected, 160 * Tolerances.Steps(step + 1, 3));
                forecast.Of(state)[step].Should().Be(forecast.Expected(state, step));
            }
        }
    }

    [Fact]
    public void Recruits_join_at_the_end_of_a_step_and_losses_leave_before_it()
    {
        // By hand. Step 1: 100 clean lose half, 50 move: 12.5 stay, 37.5 go out; 8 join clean, and in step 1 another 4 join out.
        var forecast = Pool.StartingWith(("clean", 100)).WithLosses(("clean", 0.5)).WithRecruitment(("clean", 8)).WithRecruitmentIn(1, ("out", 4)).Forecast(2);

        forecast.Expected("clean", 1).Should().Be(20.5);
        forecast.Expected("out", 1).Should().Be(41.5);
        forecast.Losses(1).Should().Be(50);
        forecast.Expected("clean", 2).Should().Be((20.5 * 0.5 * 0.25) + (41.5 * 0.375) + 8);
        forecast.Expected("lost", 2).Should().Be(41.5 * 0.125);
        forecast.Losses(2).Should().Be(50 + 10.25);
        forecast.Losses(0).Should().Be(0);
        forecast.Certificate.Residual.Should().BeLessThan(Tolerances.Published);
    }

    [Fact]
    public void Expected_numbers_are_within_their_bound_of_the_exact_ones()
    {
        foreach (var sample in ChainFamilies.All.Where(family => family.MaximumSize > 2).SelectMany(family => family.Samples(4, 6)).Where(sample => sample.StateCount > 1))
        {
            var chain = sample.ToChain();
            var last = chain.StateCount - 1;
            var forecast = chain.StartingWith((0, 1000), (last, 3)).WithRecruitment((0, 7)).WithLosses((last, 0.125)).Forecast(5);
            var counts = new Rational[chain.StateCount];
            (counts[0], counts[last]) = (1000, 3);
            for (var step = 0; step <= 5; step++)
            {
                Enclosure.Check(counts, forecast.Values.Slice(step * chain.StateCount, chain.StateCount), forecast.Certificate, $"{sample}, step {step}");
                counts[last] *= new Rational(7, 8);
                counts = sample.ToExact().NStepDistribution(counts, 1);
                counts[0] += 7;
            }
        }
    }

    [Fact]
    public void The_number_in_a_state_has_the_exact_law_of_independent_items()
    {
        // 3 items from clean, 2 from out, one recruit a step; enumerated exactly as a product of generating functions.
        var forecast = Pool.StartingWith(("clean", 3), ("out", 2)).WithRecruitment(("out", 1)).WithLosses(("out", 0.25)).Forecast(4);
        foreach (var state in Pool.States)
        {
            var count = forecast.Count(state, 4);
            var exact = ExactLaw(state);

            for (var k = 0; k < exact.Length; k++)
            {
                Enclosure.Check(exact[k], count.Probability(k), count.Certificate, $"{k} in {state}");
            }

            var mean = Rational.Sum(exact.Select((probability, k) => k * probability));
            var square = Rational.Sum(exact.Select((probability, k) => (long)k * k * probability));
            count.Mean.Should().BeApproximately(mean.ToDouble(), Tolerances.Published);
            count.Mean.Should().BeApproximately(forecast.Expected(state, 4), Tolerances.Published);
            count.StandardDeviation.Should().BeApproximately(Math.Sqrt((square - (mean * mean)).ToDouble()), Tolerances.Published);
            forecast.StandardDeviation(state, 4).Should().Be(count.StandardDeviation);
            count.Certificate.Residual.Should().BeLessThan(Tolerances.Published);
        }
    }

    [Fact]
    public void A_large_number_has_the_binomial_law()
    {
        const int items = 100_000;
        var count = Pool.StartingWith(("clean", items)).Forecast(3).Count("out", 3);
        var probability = Pool.StartingIn("clean").After(3)["out"];
        var binomial = new MathNet.Numerics.Distributions.Binomial(probability, items);
        var deviation = Math.Sqrt(items * probability * (1 - probability));

        count.StandardDeviation.Should().BeApproximately(deviation, Tolerances.Published * deviation);
        foreach (var offset in new[] { -3, -1, 0, 1, 3 })
        {
            var number = (long)((items * probability) + (offset * deviation));
            count.AtMost(number).Should().BeApproximately(binomial.CumulativeDistribution(number), Tolerances.IncompleteBeta);
            count.Quantile(count.AtMost(number)).Should().Be(number);
        }

        count.ToString().Should().Contain("5 % to 95 %");
    }

    [Fact]
    public void Ten_million_items_keep_their_digits()
    {
        // P(X <= 5,390,625) for ten million trials of probability 69/128, summed with 50 digits by mpmath 1.3.0: 0.50012324799316600122...
        var count = Pool.StartingWith(("clean", 10_000_000)).Forecast(3).Count("out", 3);

        count.AtMost(5_390_625).Should().BeApproximately(0.50012324799316600, Tolerances.Published);
        Math.Abs(count.AtMost(5_390_625) - 0.50012324799316600).Should().BeLessThanOrEqualTo(count.Certificate.AbsoluteErrorBound);
        count.Certificate.AbsoluteErrorBound.Should().BeLessThan(Tolerances.CountsOfMillions);
    }

    [Fact]
    public void Quantiles_and_cumulative_probabilities_agree_at_the_ends()
    {
        var count = Pool.StartingWith(("clean", 40)).Forecast(2).Count("clean", 2);

        count.AtMost(-1).Should().Be(0);
        count.AtMost(40).Should().Be(1);
        count.Probability(41).Should().Be(0);
        count.Quantile(0).Should().Be(count.Smallest);
        count.Quantile(1).Should().BeInRange(count.Quantile(0.999), count.Largest);
        count.Values.Length.Should().Be((int)(count.Largest - count.Smallest + 1));
        count.Invoking(x => x.Quantile(1.5)).Should().Throw<ArgumentOutOfRangeException>().WithMessage("*0 to 1*");
        count.Invoking(x => x.Quantile(double.NaN)).Should().Throw<ArgumentOutOfRangeException>();
    }

    [Fact]
    public void What_is_certain_has_no_scatter()
    {
        var empty = Pool.StartingWith().Forecast(2);
        empty.Count("clean", 2).AtMost(0).Should().Be(1);
        empty.Certificate.Residual.Should().Be(0);

        var lost = Pool.StartingWith(("lost", 5)).Forecast(2).Count("lost", 2);
        lost.Probability(5).Should().Be(1);
        lost.StandardDeviation.Should().Be(0);
    }

    [Fact]
    public void A_chain_for_each_period_moves_the_population_in_turn()
    {
        var still = Chain.FromMatrix([.. Pool.States], new double[,] { { 1, 0, 0 }, { 0, 1, 0 }, { 0, 0, 1 } });
        var forecast = Pool.StartingWith(("clean", 16)).ForecastThrough([still, Pool, still]);

        forecast.Of("out").Should().Equal(0, 0, 12, 12);
        forecast.Count("out", 3).Mean.Should().Be(12);
        forecast.Count("out", 1).AtMost(0).Should().Be(1);
        var other = Chain.FromMatrix(["clean", "out"], new[,] { { 0.5, 0.5 }, { 1.0, 0.0 } });
        Pool.StartingWith(("clean", 16)).Invoking(x => x.ForecastThrough([other])).Should().Throw<ArgumentException>().WithMessage("*'lost'*");
    }

    [Fact]
    public void Tables_and_accounts_are_short()
    {
        var population = Pool.StartingWith(("clean", 1200));

        population.ToString().Should().Be("1,200 items in 3 states");
        population.Forecast(1).ToString().ReplaceLineEndings("\n").Should().Be("step  clean  out  lost\n0     1,200    0     0\n1       300  900     0");
    }

    [Fact]
    public void Bad_populations_are_refused()
    {
        var population = Pool.StartingWith(("clean", 10));

        Pool.Invoking(x => x.StartingWith(("clean", -1))).Should().Throw<ArgumentException>().WithMessage("*'clean'*-1*0 or more*");
        Pool.Invoking(x => x.StartingWith(("clean", long.MaxValue))).Should().Throw<ArgumentException>().WithMessage("*at most*");
        Pool.Invoking(x => x.StartingWith(("clean", 1), ("clean", 2))).Should().Throw<ArgumentException>().WithMessage("*twice*");
        Pool.Invoking(x => x.StartingWith(("dirty", 1))).Should().Throw<UnknownStateException>();
        population.Invoking(x => x.WithRecruitment(("clean", -5))).Should().Throw<ArgumentException>();
        population.Invoking(x => x.WithRecruitmentIn(0, ("clean", 5))).Should().Throw<ArgumentOutOfRangeException>().WithMessage("*from 1*");
        population.Invoking(x => x.WithLosses(("clean", 1.5))).Should().Throw<ArgumentException>().WithMessage("*'clean'*1.5*");
        population.Invoking(x => x.WithLosses(("clean", 0.5), ("clean", 0.5))).Should().Throw<ArgumentException>().WithMessage("*twice*");
        population.Invoking(x => x.Forecast(-1)).Should().Throw<ArgumentOutOfRangeException>();
        population.Invoking(x => x.Forecast(1000, new SolveOptions { MemoryLimit = 1000 })).Should().Throw<MemoryLimitException>();
        population.Invoking(x => x.Forecast(9, new SolveOptions { CancellationToken = new CancellationToken(true) })).Should().Throw<OperationCanceledException>();
        population.Forecast(2).Invoking(x => x.Expected("clean", 3)).Should().Throw<ArgumentOutOfRangeException>().WithMessage("*step 2*");
        population.Forecast(2).Invoking(x => x.Losses(-1)).Should().Throw<ArgumentOutOfRangeException>();
        population.Forecast(2).Invoking(x => x.Count("clean", 1, new SolveOptions { CancellationToken = new CancellationToken(true) })).Should().Throw<OperationCanceledException>();
        Pool.StartingWith(("clean", 20_000_000)).Forecast(2).Invoking(x => x.Count("clean", 2)).Should().Throw<InvalidOperationException>().WithMessage("*20,000,000*StandardDeviation*");
    }

    /// <summary>Each item is a factor (1 − p) + p·z; the coefficients of the product are the probabilities.</summary>
    private static Rational[] ExactLaw(string state)
    {
        var transitions = Pool.Transitions.Select(move => (Pool.States.IndexOf(move.From), Pool.States.IndexOf(move.To), move.Probability));
        var exact = ExactChain.FromTransitions(3, transitions);
        var items = new List<(int State, int Steps)> { (0, 4), (0, 4), (0, 4), (1, 4), (1, 4), (1, 3), (1, 2), (1, 1), (1, 0) };
        Rational[] law = [1];
        foreach (var (start, steps) in items)
        {
            var distribution = exact.NStepRow(start, 0);
            for (var step = 0; step < steps; step++)
            {
                distribution[1] *= new Rational(3, 4);
                distribution = exact.NStepDistribution(distribution, 1);
            }

            var there = distribution[Pool.States.IndexOf(state)];
            law = [.. Enumerable.Range(0, law.Length + 1).Select(k =>
                (k < law.Length ? law[k] * (1 - there) : 0) + (k > 0 ? law[k - 1] * there : 0))];
        }

        return law;
    }
}
