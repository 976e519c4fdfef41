using System.Globalization;
using System.Numerics;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.SupportTests;

public class RationalRoundingTests
{
    [Fact]
    public void A_double_survives_the_way_there_and_back()
    {
        var random = new SplitMix64(1);
        var checkedCount = 0;
        for (var trial = 0; trial < 20000; trial++)
        {
            var value = BitConverter.UInt64BitsToDouble(random.NextInteger());
            if (double.IsFinite(value))
            {
                Rational.FromDouble(value).ToDouble().Should().Be(value);
                checkedCount++;
            }
        }

        checkedCount.Should().BeGreaterThan(19000);
    }

    [Fact]
    public void A_double_is_read_exactly()
    {
        Rational.FromDouble(0.1).Should().Be(new Rational(3602879701896397, 36028797018963968));
        Rational.FromDouble(-1.5).Should().Be(new Rational(-3, 2));
        Rational.FromDouble(double.Epsilon).Should().Be(Rational.Pow(2, -1074));
        Rational.FromDouble(double.MaxValue).Should().Be(Rational.Pow(2, 1024) - Rational.Pow(2, 971));
        Rational.FromDouble(-0.0).Should().Be(Rational.Zero);
    }

    [Fact]
    public void Rounding_agrees_with_the_parser_of_the_runtime_over_the_whole_range()
    {
        var random = new SplitMix64(2);
        for (var trial = 0; trial < 5000; trial++)
        {
            var text = string.Create(CultureInfo.InvariantCulture, $"{random.NextInteger()}e{random.Next(-345, 292)}");

            Rational.Parse(text).ToDouble().Should().Be(double.Parse(text, CultureInfo.InvariantCulture), text);
        }
    }

    [Fact]
    public void A_tie_goes_to_the_even_neighbour_and_the_least_bit_more_goes_up()
    {
        var random = new SplitMix64(3);
        Rational sliver = new(1, BigInteger.Pow(10, 400));
        for (var trial = 0; trial < 2000; trial++)
        {
            var lower = BitConverter.UInt64BitsToDouble(random.NextInteger() >> random.Next(2, 62));
            var upper = Math.BitIncrement(lower);
            var middle = (Rational.FromDouble(lower) + Rational.FromDouble(upper)) / 2;
            var even = (BitConverter.DoubleToInt64Bits(lower) & 1) == 0 ? lower : upper;

            middle.ToDouble().Should().Be(even);
            (-middle).ToDouble().Should().Be(-even);
            (middle + (middle * sliver)).ToDouble().Should().Be(upper);
            (middle - (middle * sliver)).ToDouble().Should().Be(lower);
        }
    }

    [Fact]
    public void The_ends_of_the_range_round_as_the_standard_says()
    {
        var largest = Rational.FromDouble(double.MaxValue);
        var tie = largest + Rational.Pow(2, 970);

        largest.ToDouble().Should().Be(double.MaxValue);
        (tie - 1).ToDouble().Should().Be(double.MaxValue);
        tie.ToDouble().Should().Be(double.PositiveInfinity);
        (-tie).ToDouble().Should().Be(double.NegativeInfinity);
        Rational.Pow(10, 5000).ToDouble().Should().Be(double.PositiveInfinity);
        Rational.Pow(2, -1075).ToDouble().Should().Be(0);
        (Rational.Pow(2, -1075) + Rational.Pow(2, -3000)).ToDouble().Should().Be(double.Epsilon);
        Rational.Pow(10, -5000).ToDouble().Should().Be(0);
    }

    [Fact]
    public void Relative_difference_is_exact_for_tiny_values()
    {
        var tiny = Rational.FromDouble(1e-300);

        tiny.RelativeDifference(1e-300).Should().Be(0);
        tiny.RelativeDifference(2e-300).Should().Be(1);
        tiny.RelativeDifference(0).Should().Be(1);
        tiny.RelativeDifference(-1e-300).Should().Be(2);
        Rational.FromDouble(double.Epsilon).RelativeDifference(3 * double.Epsilon).Should().Be(2);
        new Rational(1, 3).RelativeDifference(1.0 / 3).Should().Be(Math.ScaleB(1, -54));
        Rational.Pow(10, -400).RelativeDifference(1e-300).Should().BeApproximately(1e100, 1e84);
    }

    [Fact]
    public void Relative_difference_from_nothing_or_to_what_is_not_finite_is_infinite()
    {
        Rational.Zero.RelativeDifference(0).Should().Be(0);
        Rational.Zero.RelativeDifference(double.Epsilon).Should().Be(double.PositiveInfinity);
        Rational.One.RelativeDifference(double.NaN).Should().Be(double.PositiveInfinity);
        Rational.One.RelativeDifference(double.PositiveInfinity).Should().Be(double.PositiveInfinity);
    }

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(double.NegativeInfinity)]
    public void Only_a_finite_double_can_be_read(double value) =>
        FluentActions.Invoking(() => Rational.FromDouble(value)).Should().Throw<ArgumentOutOfRangeException>();
}
