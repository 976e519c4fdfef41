using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.SupportTests;

public class ScaledDoubleDoubleTests
{
    private static readonly double OperationBound = Math.ScaleB(1, -102);

    [Fact]
    public void Every_operation_is_within_its_bound_of_the_exact_result()
    {
        var random = new SplitMix64(1);
        var worst = 0.0;
        for (var trial = 0; trial < 5000; trial++)
        {
            var (a, b) = (Any(random), Any(random));
            var (x, y) = (a.ToRational(), b.ToRational());
            worst = Math.Max(worst, Distance(a + b, x + y));
            worst = Math.Max(worst, Distance(a * b, x * y));
            worst = Math.Max(worst, Distance(a / b, x / y));
        }

        worst.Should().BeLessThan(OperationBound).And.BeGreaterThan(0, "the samples are not exact in 106 bits");
    }

    [Fact]
    public void Products_far_outside_the_range_of_a_double_keep_their_digits()
    {
        var tiny = ScaledDoubleDouble.FromDouble(1e-300);
        var power = tiny * tiny * tiny * tiny;

        power.ToDouble().Should().Be(0);
        Distance(power, Rational.Pow(Rational.FromDouble(1e-300), 4)).Should().BeLessThan(3 * OperationBound);
        (power / tiny / tiny / tiny).RelativeDifference(1e-300).Should().BeLessThan(1e-30);
    }

    [Fact]
    public void Doubles_pass_unchanged()
    {
        foreach (var value in new[] { 0, 1, 0.1, double.Epsilon, 1e-310, double.MaxValue })
        {
            ScaledDoubleDouble.FromDouble(value).ToDouble().Should().Be(value);
            ScaledDoubleDouble.FromDouble(value).RelativeDifference(value).Should().Be(0);
        }
    }

    [Fact]
    public void Relative_difference_agrees_with_exact_arithmetic()
    {
        var random = new SplitMix64(2);
        for (var trial = 0; trial < 2000; trial++)
        {
            var value = Any(random);
            var near = value.ToDouble() * (1 + (random.NextFraction() * RowWeights.PowerOfTen(-random.Next(0, 16))));
            var exact = value.ToRational().RelativeDifference(near);

            value.RelativeDifference(near).Should().BeApproximately(exact, (1e-15 * exact) + 1e-32);
        }

        ScaledDoubleDouble.One.RelativeDifference(1e300).Should().Be(1e300);
        ScaledDoubleDouble.One.RelativeDifference(1e-300).Should().Be(1);
        ScaledDoubleDouble.One.RelativeDifference(-1).Should().Be(2);
        ScaledDoubleDouble.One.RelativeDifference(double.NaN).Should().Be(double.PositiveInfinity);
        ScaledDoubleDouble.Zero.RelativeDifference(1e-300).Should().Be(double.PositiveInfinity);
    }

    [Theory]
    [InlineData(-1)]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void What_could_cancel_or_is_not_a_number_is_refused(double value) =>
        FluentActions.Invoking(() => ScaledDoubleDouble.FromDouble(value)).Should().Throw<ArgumentOutOfRangeException>();

    [Fact]
    public void Division_by_zero_is_refused() =>
        FluentActions.Invoking(() => ScaledDoubleDouble.One / ScaledDoubleDouble.Zero).Should().Throw<DivideByZeroException>();

    private static ScaledDoubleDouble Any(SplitMix64 random) =>
        ScaledDoubleDouble.FromDouble(random.NextFactor() * RowWeights.PowerOfTen(random.Next(-20, 20)))
        + ScaledDoubleDouble.FromDouble(random.NextFactor() * RowWeights.PowerOfTen(random.Next(-30, 20)));

    private static double Distance(ScaledDoubleDouble found, Rational exact) =>
        exact.RelativeDistance(found.ToRational());
}
