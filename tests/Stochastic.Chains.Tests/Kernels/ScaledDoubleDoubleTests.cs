using Stochastic.Chains.Tests.Support;
using ScaledDoubleDouble = Stochastic.Chains.Kernels.ScaledDoubleDouble;

namespace Stochastic.Chains.Tests.Kernels;

public class ScaledDoubleDoubleTests
{
    private const int Pairs = 3000;

    [Fact]
    public void Every_operation_keeps_to_its_bound_at_any_exponent()
    {
        var random = new SplitMix64(7);
        var bound = Rational.FromDouble(ScaledDoubleDouble.OperationError);
        for (var pair = 0; pair < Pairs; pair++)
        {
            var first = Draw(random);
            var second = random.NextChance(oneIn: 3) ? first * (ScaledDoubleDouble)random.NextFactor() : Draw(random);
            Check(first + second, Exact(first) + Exact(second), bound);
            Check(first * second, Exact(first) * Exact(second), bound);
            Check(first / second, Exact(first) / Exact(second), bound);
        }
    }

    [Fact]
    public void Zero_is_the_default_and_adds_nothing()
    {
        ScaledDoubleDouble third = (ScaledDoubleDouble)1 / 3;
        ((ScaledDoubleDouble)0).Should().Be(default(ScaledDoubleDouble));
        (third + 0).Should().Be(third);
        (0 + third).Should().Be(third);
        (third * 0).IsZero.Should().BeTrue();
    }

    [Theory]
    [InlineData(double.Epsilon)]
    [InlineData(double.MaxValue)]
    [InlineData(1e-300)]
    [InlineData(0.1)]
    [InlineData(0)]
    public void A_double_comes_back_as_it_was(double value) => ((ScaledDoubleDouble)value).ToDouble().Should().Be(value);

    [Fact]
    public void A_number_outside_the_range_of_doubles_comes_back_when_scaled()
    {
        ScaledDoubleDouble tiny = 1e-300;
        (tiny * tiny).ToDouble().Should().Be(0);
        (tiny * tiny).ToDouble(scale: 1000).Should().BeApproximately(1e-300 * (1e-300 * Math.Pow(2, 1000)), 1e-310);
    }

    private static ScaledDoubleDouble Draw(SplitMix64 random)
    {
        ScaledDoubleDouble number = Math.ScaleB(random.NextFactor(), random.Next(-900, 900));
        number *= (ScaledDoubleDouble)random.NextFactor();
        for (var factor = random.Next(0, 3); factor > 0; factor--)
        {
            number *= number;
        }

        return number / random.NextFactor();
    }

    private static Rational Exact(ScaledDoubleDouble number) =>
        (Rational.FromDouble(number.High) + Rational.FromDouble(number.Low)) * Rational.Pow(2, (int)(512 * number.Block));

    private static void Check(ScaledDoubleDouble computed, Rational exact, Rational bound)
    {
        (Rational.Abs(Exact(computed) - exact) <= bound * exact).Should().BeTrue();
        (computed.High is >= 8.636168555094445e-78 and < 1.157920892373162e77).Should().BeTrue();
        Math.Abs(computed.Low).Should().BeLessThanOrEqualTo(computed.High * Math.ScaleB(1, -53));
    }
}
