using System.Numerics;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.SupportTests;

/// <summary>The oracle against formulas that need no elimination.</summary>
public class ExactChainClosedFormTests
{
    [Theory]
    [InlineData(1e-3, 0.25)]
    [InlineData(1e-300, 3e-250)]
    [InlineData(0.1, 5e-324)]
    public void Two_states_share_time_in_the_ratio_of_their_rates(double up, double down)
    {
        var (a, b) = (Rational.FromDouble(up), Rational.FromDouble(down));
        var chain = ExactChain.FromTransitions(2, [(0, 1, up), (1, 0, down), (0, 0, 1 - up), (1, 1, 1 - down)]);

        chain.Stationary().Should().Equal(b / (a + b), a / (a + b));
        chain.KemenyConstant().Should().Be(1 / (a + b));
        chain.HittingMean(1)[0].Should().Be(1 / a);
        chain.HittingVariance(1)[0].Should().Be((1 - a) / (a * a));
        chain.NStepMatrix(5)[0, 1].Should().Be(a / (a + b) * (1 - Rational.Pow(1 - a - b, 5)));
    }

    [Fact]
    public void Birth_death_chains_balance_every_pair_of_neighbours()
    {
        var samples = ChainFamilies.Named("birth-death").Samples(40, 40).ToArray();
        foreach (var sample in samples)
        {
            var stationary = sample.ToExact().Stationary();
            sample.OffDiagonals.All(move =>
                Flow(stationary[move.From], move.Probability) == Flow(stationary[move.To], sample.Matrix[move.To, move.From]))
                .Should().BeTrue("{0}", sample);
        }

        samples.Max(sample => sample.StateCount).Should().Be(40);
    }

    [Fact]
    public void Stationary_distribution_of_forty_hard_states_balances_every_state()
    {
        foreach (var family in ChainFamilies.Irreducible.Where(family => family.MaximumSize > 40))
        {
            var sample = family.Create(40, 123);
            var chain = sample.ToExact();
            var stationary = chain.Stationary();

            var inflow = new List<Rational>[40];
            for (var state = 0; state < 40; state++)
            {
                inflow[state] = [];
            }

            foreach (var (from, to, probability) in sample.OffDiagonals)
            {
                inflow[to].Add(Flow(stationary[from], probability));
            }

            for (var state = 0; state < 40; state++)
            {
                var outflow = Rational.Sum(chain.Row(state).Moves.Select(move => move.Probability));
                Rational.Sum(inflow[state]).Should().Be(stationary[state] * outflow, "{0}", sample);
            }

            Rational.Sum(stationary).Should().Be(Rational.One);
        }
    }

    [Theory]
    [InlineData(30)]
    [InlineData(365)]
    public void Collecting_takes_harmonic_time(int coupons)
    {
        var chain = LineRules.Collector(coupons).ToExact();
        var waits = Enumerable.Range(0, coupons).Select(have => new Rational(coupons, coupons - have)).ToArray();

        chain.AbsorptionMean()[0].Should().Be(Rational.Sum(waits));
        chain.AbsorptionVariance()[0].Should().Be(Rational.Sum(waits.Select(wait => (wait * wait) - wait)));
    }

    [Fact]
    public void The_urn_is_binomial()
    {
        var stationary = LineRules.Urn(60).ToExact().Stationary();
        BigInteger ways = 1;
        for (var i = 0; i <= 60; i++)
        {
            stationary[i].Should().Be(new Rational(ways, BigInteger.One << 60));
            ways = ways * (60 - i) / (i + 1);
        }
    }

    /// <summary>A product left unreduced, which is much cheaper for long fractions.</summary>
    private static Rational Flow(Rational share, double probability)
    {
        var exact = Rational.FromDouble(probability);
        return new(share.Numerator * exact.Numerator, share.Denominator * exact.Denominator);
    }
}
