using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Passage;

/// <summary>Variances and what else follows from the same system are never off by more than their bound.</summary>
public class PassageMomentsTests
{
    private const int ChainsPerFamily = 25;
    private const int LargestSize = 24;

    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    [Theory]
    [MemberData(nameof(Families))]
    public void No_variance_is_off_by_more_than_its_bound(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize))
        {
            var target = sample.Target ?? (int)(sample.Seed % (ulong)sample.StateCount);
            var moments = sample.ToChain().TimeTo(target).Moments();
            var exact = sample.ToExact().HittingVariance(target);

            moments.Certificate.IsProof.Should().BeTrue(sample.ToString());
            if (!exact.Where((_, state) => state != target).Any(variance => variance is { Sign: 0 }))
            {
                moments.Certificate.RelativeErrorBound.Should().BeLessThan(Tolerances.Published, sample.ToString());
            }

            for (var state = 0; state < sample.StateCount; state++)
            {
                if (exact[state] is not { } variance)
                {
                    moments.StandardDeviation(state).Should().Be(double.PositiveInfinity);
                    continue;
                }

                var computed = moments.StandardDeviation(state);
                var relative = moments.Certificate.RelativeErrorBound / (1 - moments.Certificate.RelativeErrorBound);
                var bound = relative is >= 0 and < 1 ? Math.Min(moments.Certificate.AbsoluteErrorBound, relative * computed) : moments.Certificate.AbsoluteErrorBound;
                double.IsNaN(computed).Should().BeFalse(sample.ToString());
                Encloses(computed, bound, variance).Should().BeTrue($"{sample}, state {state}: {computed} ± {bound}, exactly √{variance.ToDouble()}");
            }
        }
    }

    /// <summary>Whether a variance lies between the squares of deviation ± bound.</summary>
    private static bool Encloses(double deviation, double bound, Rational variance)
    {
        if (double.IsPositiveInfinity(bound))
        {
            return true;
        }

        var low = Rational.Max(0, Rational.FromDouble(deviation) - Rational.FromDouble(bound));
        var high = Rational.FromDouble(deviation) + Rational.FromDouble(bound);
        return (low * low).CompareTo(variance) <= 0 && variance.CompareTo(high * high) <= 0;
    }

    [Fact]
    public void Variances_of_times_that_hardly_vary_keep_their_digits()
    {
        // Invented: a line of ten stations, each held up with probability 1e-12; the mean square minus the squared mean has no digit right.
        const int stations = 10;
        const double stay = 1e-12;
        var chain = Chain.Build<int>(rows =>
        {
            for (var k = 0; k < stations; k++)
            {
                rows.Row(k, (k, stay), (k + 1, 1 - stay));
            }

            rows.Row(stations, (stations, 1));
        });

        var times = chain.TimeTo(stations);
        var moved = Rational.FromDouble(1 - stay);
        var exact = (stations * (1 - moved) / (moved * moved)).ToDouble();

        times.Variance(0).Should().BeApproximately(exact, exact * times.Moments().Certificate.RelativeErrorBound);
        times.Moments().Certificate.RelativeErrorBound.Should().BeLessThan(Tolerances.Published);
    }

    [Fact]
    public void Deviations_of_times_whose_squares_leave_the_range_are_answers()
    {
        var chain = Chain.Build<string>(rows => rows.Row("a", ("a", 1), ("b", 1e-100)).Row("b", ("a", 1), ("end", 1e-100)).Row("end", ("end", 1)));

        var times = chain.TimeTo("end");

        times.StandardDeviation("a").Should().BeApproximately(1e200, 1e200 * Tolerances.Published);
        times.Moments().Invoking(moments => moments.Variance("a")).Should().Throw<NumericalRangeException>().WithMessage("*10^400*standard deviation*");
        times.Moments().Invoking(moments => moments.ThirdMoment("a")).Should().Throw<NumericalRangeException>().WithMessage("*10^601*");
        times.Moments().Values[2].Should().Be(0);
        times.Moments().ToString().Should().Contain("standard deviation");
    }

    [Fact]
    public void Moments_of_a_geometric_time_are_those_of_the_textbook()
    {
        // From memory: with success probability p the variance is (1 - p)/p² and the third moment (p² - 6p + 6)/p³.
        const double p = 0.25;
        var chain = Chain.Build<string>(rows => rows.Row("in", ("in", 1 - p), ("out", p)).Row("out", ("out", 1)));

        var moments = chain.TimeTo("out").Moments(new SolveOptions { CertificateLevel = CertificateLevel.Residual });

        moments.Mean("in").Should().Be(4);
        moments.Variance("in").Should().BeApproximately(12, 12 * Tolerances.SubtractionFree(2));
        moments.ThirdMoment("in").Should().BeApproximately(292, 292 * Tolerances.SubtractionFree(2));
        moments.Certificate.IsProof.Should().BeFalse();
        moments.Certificate.Residual.Should().BeLessThan(Tolerances.FourRoundings);
    }

    [Fact]
    public void In_continuous_time_the_deviation_of_an_exponential_time_is_its_mean()
    {
        var plant = Chain.FromRates([new TransitionRate<string>("running", "failed", 1e-4), new TransitionRate<string>("failed", "running", 0.05)]);

        var moments = plant.TimeTo("failed").Moments();

        moments.StandardDeviation("running").Should().BeApproximately(1e4, 1e4 * Tolerances.FourRoundings);
        moments.ThirdMoment("running").Should().BeApproximately(6e12, 6e12 * Tolerances.SubtractionFree(2));
    }

    [Fact]
    public void Figures_that_need_no_solve_are_exact()
    {
        var chain = Chain.Build<string>(rows => rows.Row("end", ("end", 1)).Row("other", ("other", 1)));

        chain.TimeTo("end").Moments().Certificate.Basis.Should().Be(ErrorBasis.Structure);
        chain.TimeTo("end").StandardDeviation("other").Should().Be(double.PositiveInfinity);
        chain.TimeTo("end").Variance("other").Should().Be(double.PositiveInfinity);
        chain.TimeTo("end").MeanIfReached("other").Should().Be(double.PositiveInfinity);
        chain.TimeTo("end").MeanIfReached("end").Should().Be(0);
        chain.TimeTo("end").VisitsFrom("other").Values.ToArray().Should().Equal(0, 0);
        chain.TimeTo("end").Quantile("other", 0.5).Should().Be(double.PositiveInfinity);
        chain.TimeTo("end").Quantile("end", 0.5).Should().Be(0);
    }
}
