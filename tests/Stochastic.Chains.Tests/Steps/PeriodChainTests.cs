using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Steps;

/// <summary>A chain for each period: the product of different matrices.</summary>
public class PeriodChainTests
{
    private const int ChainsPerFamily = 6;
    private const int LargestSize = 8;

    private static readonly Chain<string> Summer = Chain.FromMatrix(["clean", "dirty"], new[,] { { 0.5, 0.5 }, { 1.0, 0.0 } });
    private static readonly Chain<string> Winter = Chain.FromMatrix(["clean", "dirty"], new[,] { { 0.75, 0.25 }, { 0.5, 0.5 } });

    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    [Fact]
    public void Steps_with_different_chains_multiply_in_the_order_given()
    {
        // By hand: (1, 0) · summer = (1/2, 1/2); · winter = (5/8, 3/8); · summer = (11/16, 5/16).
        var forecast = Winter.StartingIn("clean").ForecastThrough([Summer, Winter, Summer]);

        forecast[1].ToArray().Should().Equal(0.5, 0.5);
        forecast[2].ToArray().Should().Equal(0.625, 0.375);
        forecast[3].ToArray().Should().Equal(0.6875, 0.3125);
        Winter.StartingIn("clean").Through([Summer, Winter, Summer]).ToArray().Should().Equal(0.6875, 0.3125);
        Winter.StartingIn("clean").Through([]).ToArray().Should().Equal(1, 0);
    }

    [Fact]
    public void The_same_chain_in_every_period_is_the_chain_itself() =>
        Summer.StartingIn("clean").Through(Enumerable.Repeat(Summer, 17)).ToArray().Should().Equal(Summer.StartingIn("clean").After(17).ToArray());

    [Theory]
    [MemberData(nameof(Families))]
    public void No_probability_is_off_by_more_than_its_bound(string name)
    {
        var samples = ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize).ToArray();
        var checkedSteps = 0;
        foreach (var sample in samples)
        {
            var other = ChainFamilies.Named(name).Create(sample.Size, sample.Seed + 100);
            if (other.StateCount != sample.StateCount)
            {
                continue;
            }

            Chain<int>[] chains = [sample.ToChain(), other.ToChain(), sample.ToChain().AsSparse(), other.ToChain().AsSparse()];
            ExactChain[] exact = [sample.ToExact(), other.ToExact(), sample.ToExact(), other.ToExact()];
            var forecast = chains[0].StartingIn(0).ForecastThrough(chains);
            var distribution = exact[0].NStepRow(0, 0);
            for (var step = 0; step <= chains.Length; step++)
            {
                Enclosure.Check(distribution, forecast[step].Values, forecast[step].Certificate, $"{sample}, step {step}");
                checkedSteps++;
                distribution = step < chains.Length ? exact[step].NStepDistribution(distribution, 1) : distribution;
            }
        }

        checkedSteps.Should().BePositive();
    }

    [Fact]
    public void Chains_over_other_states_are_refused_by_period_and_state()
    {
        var start = Summer.StartingIn("clean");
        var missing = Chain.FromMatrix(["clean", "lost"], new[,] { { 0.5, 0.5 }, { 1.0, 0.0 } });
        var added = Chain.FromMatrix(["clean", "dirty", "lost"], new[,] { { 0.5, 0.5, 0 }, { 1.0, 0.0, 0 }, { 0, 0, 1.0 } });
        var turned = Chain.FromMatrix(["dirty", "clean"], new[,] { { 0.5, 0.5 }, { 1.0, 0.0 } });

        start.Invoking(x => x.Through([Summer, missing])).Should().Throw<ArgumentException>().WithMessage("*period 2 does not have the state 'dirty'*");
        start.Invoking(x => x.Through([added])).Should().Throw<ArgumentException>().WithMessage("*period 1 has the state 'lost'*");
        start.Invoking(x => x.ForecastThrough([turned])).Should().Throw<ArgumentException>().WithMessage("*lists 'dirty' at position 0*lists 'clean'*");
        start.Invoking(x => x.Through([Summer, null!])).Should().Throw<ArgumentException>().WithMessage("*period 2 is null*");
        start.Invoking(x => x.Through([Summer], new SolveOptions { CancellationToken = new CancellationToken(true) })).Should().Throw<OperationCanceledException>();
    }
}
