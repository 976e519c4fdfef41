using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.SupportTests;

public class DoubleDoubleChainTests
{
    private const double Tolerance = 1e-28;

    public static TheoryData<string> IrreducibleFamilies => [.. ChainFamilies.Irreducible.Select(family => family.Name)];

    [Theory]
    [MemberData(nameof(IrreducibleFamilies))]
    public void Agrees_with_exact_fractions_up_to_forty_states(string family)
    {
        foreach (var sample in ChainFamilies.Named(family).Samples(40, 40))
        {
            var exact = sample.ToExact();
            var chain = new DoubleDoubleChain(sample.Matrix);
            var target = sample.Target ?? 0;

            Worst(chain.Stationary(), exact.Stationary()).Should().BeLessThan(Tolerance, "{0}", sample);
            Worst(chain.HittingMean(target), Values(exact.HittingMean(target))).Should().BeLessThan(Tolerance, "{0}", sample);
        }
    }

    [Theory]
    [InlineData("reducible")]
    [InlineData("rare absorption")]
    [InlineData("absorbing path")]
    public void Mean_absorption_agrees_with_exact_fractions(string family)
    {
        foreach (var sample in ChainFamilies.Named(family).Samples(40, 40))
        {
            Worst(new DoubleDoubleChain(sample.Matrix).AbsorptionMean(), sample.ToExact().AbsorptionMean())
                .Should().BeLessThan(Tolerance, "{0}", sample);
        }
    }

    [Theory]
    [InlineData(129)]
    [InlineData(257)]
    public void Agrees_with_closed_forms_at_the_sizes_it_is_for(int states)
    {
        var urn = LineRules.Urn(128).ToExact();
        var path = GraphRules.Path(states);

        var means = new DoubleDoubleChain(path.ToMatrix()).HittingMean(states - 1);
        var stationary = new DoubleDoubleChain(LineRules.Urn(128).ToMatrix()).Stationary();

        means.Select((mean, i) => mean.RelativeDifference(((states - 1.0) * (states - 1)) - ((double)i * i)))
            .Should().OnlyContain(difference => difference < Tolerance);
        Worst(stationary, urn.Stationary()).Should().BeLessThan(Tolerance, "all probabilities are multiples of 1/128");
    }

    [Fact]
    public void A_target_that_may_be_missed_is_refused() =>
        FluentActions.Invoking(() => new DoubleDoubleChain(new[,] { { 1, 0, 0 }, { 0.5, 0, 0.5 }, { 0, 0, 1.0 } }).HittingMean(0))
            .Should().Throw<InvalidOperationException>();

    [Fact]
    public void Several_recurrent_classes_are_refused() =>
        FluentActions.Invoking(() => new DoubleDoubleChain(new[,] { { 1.0, 0 }, { 0, 1.0 } }).Stationary())
            .Should().Throw<InvalidOperationException>();

    private static Rational[] Values(Rational?[] values) => Array.ConvertAll(values, value => value!.Value);

    private static double Worst(ScaledDoubleDouble[] found, Rational[] exact)
    {
        found.Should().HaveSameCount(exact);
        return found.Zip(exact, (mine, theirs) => theirs.RelativeDistance(mine.ToRational())).Max();
    }
}
