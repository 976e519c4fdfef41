using System.Globalization;
using System.Numerics;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.SupportTests;

public class RationalTests
{
    [Fact]
    public void Arithmetic_obeys_the_laws_of_a_field()
    {
        var random = new SplitMix64(1);
        for (var trial = 0; trial < 500; trial++)
        {
            var (a, b, c) = (Any(random), Any(random), Any(random));

            (a + b).Should().Be(b + a);
            (a * b).Should().Be(b * a);
            (a + b + c).Should().Be(a + (b + c));
            (a * b * c).Should().Be(a * (b * c));
            (a * (b + c)).Should().Be((a * b) + (a * c));
            (a - a).Should().Be(Rational.Zero);
            (a - b + b).Should().Be(a);
            if (!b.IsZero)
            {
                (a / b * b).Should().Be(a);
            }
        }
    }

    [Fact]
    public void Order_agrees_with_the_sign_of_the_difference()
    {
        var random = new SplitMix64(2);
        for (var trial = 0; trial < 500; trial++)
        {
            var (a, b) = (Any(random), Any(random));

            a.CompareTo(b).Should().Be((a - b).Sign);
            (a < b).Should().Be((a - b).Sign < 0);
            (a >= b).Should().Be((a - b).Sign >= 0);
        }
    }

    [Fact]
    public void Equality_and_hash_do_not_depend_on_the_terms()
    {
        var half = new Rational(1, 2);
        var same = new Rational(-50, -100);

        same.Should().Be(half);
        same.GetHashCode().Should().Be(half.GetHashCode());
        same.ToString().Should().Be("1/2");
        (half == new Rational(-1, 2)).Should().BeFalse();
        default(Rational).Should().Be(Rational.Zero);
    }

    [Fact]
    public void Sum_equals_repeated_addition()
    {
        var random = new SplitMix64(3);
        Rational[] values = [.. Enumerable.Range(0, 60).Select(_ => Any(random))];

        Rational.Sum(values).Should().Be(values.Aggregate((sum, value) => sum + value));
        Rational.Sum([]).Should().Be(Rational.Zero);
    }

    [Theory]
    [InlineData("1/4", 1, 4)]
    [InlineData("-18/375", -6, 125)]
    [InlineData(".438", 219, 500)]
    [InlineData("-0.5", -1, 2)]
    [InlineData("1e-8", 1, 100000000)]
    [InlineData("3E2", 300, 1)]
    [InlineData("2.50e+1", 25, 1)]
    [InlineData("0", 0, 1)]
    [InlineData("0.05/0.1", 1, 2)]
    public void Parse_reads_fractions_decimals_and_exponents_exactly(string text, long numerator, long denominator) =>
        Rational.Parse(text).Should().Be(new Rational(numerator, denominator));

    [Fact]
    public void Parse_does_not_depend_on_the_culture()
    {
        var before = CultureInfo.CurrentCulture;
        try
        {
            CultureInfo.CurrentCulture = new CultureInfo("de-DE");
            Rational.Parse("1234.5").Should().Be(new Rational(2469, 2));
            new Rational(-2469, 2).ToString().Should().Be("-2469/2");
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    [Theory]
    [InlineData("")]
    [InlineData("1,5")]
    [InlineData("one")]
    [InlineData("-1/16-1/25000")]
    public void Parse_refuses_what_is_not_one_number(string text) =>
        FluentActions.Invoking(() => Rational.Parse(text)).Should().Throw<FormatException>();

    [Fact]
    public void A_denominator_of_zero_is_refused() =>
        FluentActions.Invoking(() => new Rational(1, 0)).Should().Throw<DivideByZeroException>();

    private static Rational Any(SplitMix64 random)
    {
        var numerator = new BigInteger(random.NextInteger() >> random.Next(0, 63)) * (random.NextChance(oneIn: 2) ? 1 : -1);
        return new(random.NextChance(oneIn: 10) ? 0 : numerator, new BigInteger(random.NextInteger() >> random.Next(0, 62)) + 1);
    }
}
