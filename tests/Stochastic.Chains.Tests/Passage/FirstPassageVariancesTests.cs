using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Passage;

public class FirstPassageVariancesTests
{
    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    [Theory]
    [MemberData(nameof(Families))]
    public void No_deviation_is_off_by_more_than_its_bound(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(12, 10))
        {
            var variances = sample.ToChain().MeanFirstPassage().Variances();
            for (var target = 0; target < sample.StateCount; target++)
            {
                var exact = sample.ToExact().HittingVariance(target);
                for (var from = 0; from < sample.StateCount; from++)
                {
                    if (from == target)
                    {
                        continue;
                    }

                    if (exact[from] is not { } variance)
                    {
                        variances.StandardDeviation(from, target).Should().Be(double.PositiveInfinity);
                        continue;
                    }

                    variances.Certificate.IsProof.Should().BeTrue(sample.ToString());
                    var deviation = Rational.FromDouble(variances.StandardDeviation(from, target));
                    var bound = Rational.FromDouble(variances.Certificate.AbsoluteErrorBound);
                    var low = Rational.Max(0, deviation - bound);
                    ((low * low).CompareTo(variance) <= 0 && variance.CompareTo((deviation + bound) * (deviation + bound)) <= 0)
                        .Should().BeTrue($"{sample}, from {from} to {target}");
                }
            }
        }
    }

    [Fact]
    public void Coming_back_varies_as_a_sum_over_the_first_step_says()
    {
        // A geometric number of steps away: from "in" a step leads out with 1/4 and back from "out" with 1/2. The time of coming back to "in" is 1 with 3/4, else
        // 1 + a geometric time with mean 2 and variance 2.
        var chain = Chain.Build<string>(rows => rows.Row("in", ("in", 0.75), ("out", 0.25)).Row("out", ("in", 0.5), ("out", 0.5)));

        var variances = chain.MeanFirstPassage().Variances();

        variances.Variance("in", "in").Should().BeApproximately((0.75 * 0.25) + (0.25 * (2 + 2.25)), Tolerances.SubtractionFree(2));
        variances.Variance("out", "in").Should().BeApproximately(2, Tolerances.SubtractionFree(2));
        variances.Certificate.RelativeErrorBound.Should().BeLessThan(Tolerances.Published);
        variances.ToString().Should().StartWith("from \\ to");
    }

    [Fact]
    public void In_continuous_time_coming_back_takes_leaving_first()
    {
        var plant = Chain.FromRates([new TransitionRate<string>("up", "down", 2), new TransitionRate<string>("down", "up", 5)]);

        var variances = plant.MeanFirstPassage().Variances(new SolveOptions { CertificateLevel = CertificateLevel.None });

        // The sum of two exponential times with means 1/2 and 1/5.
        variances.Variance("up", "up").Should().BeApproximately(0.25 + 0.04, Tolerances.SubtractionFree(2));
        variances.StandardDeviation("up", "down").Should().BeApproximately(0.5, Tolerances.SubtractionFree(2));
        variances.Certificate.IsProof.Should().BeFalse();
    }

    [Fact]
    public void What_is_never_reached_or_beyond_the_range_is_said()
    {
        var rare = Chain.Build<string>(rows => rows.Row("a", ("a", 1), ("b", 1e-100)).Row("b", ("a", 1), ("end", 1e-100)).Row("end", ("end", 1)));

        var variances = rare.MeanFirstPassage().Variances();

        variances.Variance("end", "a").Should().Be(double.PositiveInfinity);
        variances.Variance("a", "a").Should().Be(double.PositiveInfinity);
        variances.Variance("end", "end").Should().Be(0);
        variances.Invoking(it => it.Variance("a", "end")).Should().Throw<NumericalRangeException>();
        variances.StandardDeviation("a", "end").Should().BeApproximately(1e200, 1e200 * Tolerances.Published);
        rare.MeanFirstPassage().Invoking(it => it.Variances(new SolveOptions { CancellationToken = new CancellationToken(true) })).Should().Throw<OperationCanceledException>();
        variances.Invoking(it => it.Variance("a", "z")).Should().Throw<UnknownStateException>();
    }
}
