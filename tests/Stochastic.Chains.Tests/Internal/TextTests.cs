using Stochastic.Chains.Internal;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Internal;

public class TextTests
{
    [Fact]
    public void Numbers_read_back_as_the_same_double_in_every_culture()
    {
        using var culture = new CommaCulture();
        var random = new Random(3);
        for (var k = 0; k < 1000; k++)
        {
            var value = Math.ScaleB(random.NextDouble(), random.Next(-1000, 1000));
            double.Parse(Text.Number(value), System.Globalization.CultureInfo.InvariantCulture).Should().Be(value);
        }

        Text.Number(0.1).Should().Be("0.1");
        Text.Short(1234.5678).Should().Be("1235");
        Text.Count(1234567).Should().Be("1,234,567");
        Text.Label(0.5).Should().Be("0.5");
    }

    [Fact]
    public void Counts_take_the_singular_for_one_only()
    {
        Text.Count(1, "state", "states").Should().Be("1 state");
        Text.Count(0, "state", "states").Should().Be("0 states");
        Text.Count(1000, "state", "states").Should().Be("1,000 states");
    }

    [Fact]
    public void Labels_are_the_states_own_texts()
    {
        Text.Label("plain").Should().Be("plain");
        Text.Label(Stage.Worn).Should().Be("Worn");
        Text.Label(null).Should().Be("null");
        Text.Label(new Silent()).Should().BeEmpty();
        Text.Quoted("x").Should().Be("'x'");
    }

    [Fact]
    public void Advice_is_never_below_what_is_needed_but_for_rounding()
    {
        var random = new Random(5);
        for (var k = 0; k < 1000; k++)
        {
            var needed = Math.Pow(10, -11 * random.NextDouble());
            var advised = double.Parse(Text.ShortAtLeast(needed), System.Globalization.CultureInfo.InvariantCulture);
            advised.Should().BeInRange(needed - 1e-12, needed * 1.0016);
        }

        Text.ShortAtLeast(1.1 - 1).Should().Be("0.1");
        Text.ShortAtLeast(0.12341).Should().Be("0.1235");
    }

    private sealed class Silent
    {
        public override string? ToString() => null;
    }
}
