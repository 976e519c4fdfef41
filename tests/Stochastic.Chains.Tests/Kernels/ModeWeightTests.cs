using Stochastic.Chains.Kernels;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Kernels;

/// <summary>Weights from the mode outwards, against exact laws and MathNet.Numerics.</summary>
public class ModeWeightTests
{
    private const double Smallest = 1e-300;

    [Theory]
    [InlineData(7L, 0.3)]
    [InlineData(40L, 0.02)]
    [InlineData(60L, 0.999)]
    [InlineData(1L, 0.5)]
    [InlineData(5L, 0.0)]
    [InlineData(5L, 1.0)]
    [InlineData(0L, 0.4)]
    public void Binomial_weights_are_the_binomial_law(long trials, double probability)
    {
        var weights = ModeWeights.Binomial(trials, probability, Smallest);
        var success = Rational.FromDouble(probability);
        var term = (Rational)1;
        for (var k = 0; k <= trials; k++)
        {
            var exact = term * Rational.Pow(success, k) * Rational.Pow(1 - success, (int)trials - k);
            (weights[k] / weights.Sum).Should().BeApproximately(exact.ToDouble(), Tolerances.Published * exact.ToDouble());
            term = term * (trials - k) / (k + 1);
        }

        weights.LeftOut.Should().BeLessThan(Tolerances.Published);
    }

    [Theory]
    [InlineData(0.0)]
    [InlineData(1e-30)]
    [InlineData(0.7)]
    [InlineData(30.0)]
    public void Poisson_weights_are_the_poisson_law(double mean)
    {
        var weights = ModeWeights.Poisson(mean, Smallest);
        for (var k = 0; k < 60; k++)
        {
            var expected = mean == 0 ? (k == 0 ? 1 : 0) : MathNet.Numerics.Distributions.Poisson.PMF(mean, k);
            (weights[k] / weights.Sum).Should().BeApproximately(expected < Smallest ? 0 : expected, (Tolerances.Published * expected) + Smallest);
        }
    }

    [Theory]
    [InlineData(1e6)]
    [InlineData(1e9)]
    public void Large_means_neither_under_nor_overflow(double mean)
    {
        var weights = ModeWeights.Poisson(mean, 1e-290);

        // Stirling: the probability of the mode is 1/√(2π mean), up to a relative 1/(12 mean).
        (1 / weights.Sum).Should().BeApproximately(1 / Math.Sqrt(2 * Math.PI * mean), 1 / mean);
        weights.Values.ToArray().Should().OnlyContain(weight => double.IsNormal(weight) && weight <= 1 + Tolerances.Published);
        weights.LeftOut.Should().BeLessThan(1e-280);
        weights.First.Should().BePositive();
    }

    [Fact]
    public void What_is_left_out_is_bounded_from_above()
    {
        // Cut early on purpose, and compare with what lies beyond.
        var all = ModeWeights.Poisson(50, Smallest);
        var cut = ModeWeights.Poisson(50, 1e-3);
        var beyond = Enumerable.Range(0, 400).Where(k => k < cut.First || k > cut.Last).Sum(k => all[k]);

        cut.LeftOut.Should().BeGreaterThanOrEqualTo(beyond).And.BeLessThan(10 * beyond);
        cut.SumAfter(cut.Mode).Should().BeApproximately(Enumerable.Range((int)cut.Mode + 1, (int)(cut.Last - cut.Mode)).Sum(k => cut[k]), Tolerances.Published);
        cut.SumAfter(cut.Last).Should().Be(0);
    }
}
