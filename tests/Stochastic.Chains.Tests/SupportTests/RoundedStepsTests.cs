using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.SupportTests;

public class RoundedStepsTests
{
    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    [Theory]
    [MemberData(nameof(Families))]
    public void Agree_with_exact_steps_within_the_bound(string family)
    {
        foreach (var sample in ChainFamilies.Named(family).Samples(5, 5))
        {
            var chain = sample.ToExact();
            var exact = chain.NStepMatrix(11);
            var rounded = RoundedSteps.NStepMatrix(chain, 11);
            var bound = RoundedSteps.RelativeErrorBound(chain.StateCount, 11);
            for (var i = 0; i < chain.StateCount; i++)
            {
                for (var j = 0; j < chain.StateCount; j++)
                {
                    Distance(rounded[i, j], exact[i, j]).Should().BeLessThanOrEqualTo(bound, "{0}", sample);
                }

                RoundedSteps.NStepRow(chain, i, 11).Zip(Enumerable.Range(0, chain.StateCount).Select(j => exact[i, j]), Distance)
                    .Should().OnlyContain(distance => distance <= bound);
            }
        }
    }

    [Fact]
    public void A_thousand_million_steps_reach_the_closed_form_of_two_states()
    {
        const long steps = 1L << 30;
        var (a, b) = (Rational.Pow(2, -30), Rational.Pow(2, -31));
        var chain = new ExactChain(2, [(0, 1, a), (1, 0, b)], [0, 1]);

        // pi_1 (1 - (1 - a - b)^n), the power by repeated squaring to 400 binary places.
        var power = Enumerable.Repeat(0, 30).Aggregate(1 - a - b, (value, _) => Truncated(value * value));
        var expected = a / (a + b) * (1 - power);

        Distance(RoundedSteps.NStepMatrix(chain, steps)[0, 1], expected).Should().BeLessThan(1e-60);
    }

    [Fact]
    public void What_no_double_can_hold_comes_back_as_zero()
    {
        var chain = ExactChain.FromMatrix(new[,] { { 0.5, 0.5 }, { 0, 1 } });

        RoundedSteps.NStepRow(chain, 0, 1L << 40)[0].Should().Be(Rational.Zero);
        RoundedSteps.NStepRow(chain, 0, 1000)[0].Should().Be(Rational.Pow(2, -1000));
    }

    [Fact]
    public void No_steps_are_the_identity()
    {
        var chain = ExactChain.FromMatrix(new[,] { { 0.5, 0.5 }, { 1, 0 } });

        RoundedSteps.NStepRow(chain, 1, 0).Should().Equal(0, 1);
        chain.NStepRow(1, 0).Should().Equal(0, 1);
    }

    private static double Distance(Rational found, Rational exact) => exact.RelativeDistance(found);

    private static Rational Truncated(Rational value) =>
        new((value.Numerator << 400) / value.Denominator, System.Numerics.BigInteger.One << 400);
}
