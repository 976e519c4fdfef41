using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Passage;

public class AbsorptionTests
{
    private static readonly Chain<string> Pool = Chain.Build<string>(rows => rows
        .Row("clean", ("at shop", 0.9), ("lost", 0.1))
        .Row("at shop", ("clean", 0.8), ("scrapped", 0.2))
        .Row("lost", ("lost", 1))
        .Row("scrapped", ("scrapped", 1)));

    [Fact]
    public void The_time_until_an_end_has_its_deviation_its_quantiles_and_its_visits()
    {
        var ends = Pool.Absorption();

        ends.StandardDeviationOfSteps("clean").Should().Be(Pool.TimeToAny(["lost", "scrapped"]).StandardDeviation("clean"));
        ends.StandardDeviationOfSteps("lost").Should().Be(0);
        ends.Steps.Quantile("clean", 0.5).Should().Be(5);
        ends.Steps.Targets.Should().Equal("lost", "scrapped");
        ends.ExpectedVisits("clean", "clean").Should().BeApproximately(1 / 0.28, Tolerances.SubtractionFree(4) / 0.28);
        ends.ExpectedVisits("lost", "clean").Should().Be(0);
        ends.Steps.VisitsFrom("clean")["at shop"].Should().BeApproximately(ends.ExpectedVisits("clean", "at shop"), Tolerances.SubtractionFree(4) * 4);
        ends.Steps.VisitsFrom("clean").ToString().Should().StartWith("From 'clean'");
        ends.FundamentalMatrix().ToString().Should().Contain("at shop");
        ends.FundamentalMatrix().ToMatrix()[0, 1].Should().Be(ends.ExpectedVisits("clean", "at shop"));
        ends.FundamentalMatrix(new SolveOptions { CertificateLevel = CertificateLevel.Residual }).Certificate.Residual.Should().BeLessThan(Tolerances.SubtractionFree(4));
    }

    [Fact]
    public void Visits_add_up_to_the_mean_time()
    {
        foreach (var sample in ChainFamilies.Named("reducible").Samples(20, 20))
        {
            var ends = sample.ToChain().Absorption();
            foreach (var state in ends.FundamentalMatrix().TransientStates)
            {
                var visits = ends.Steps.VisitsFrom(state).Values.ToArray().Sum();
                visits.Should().BeApproximately(ends.MeanSteps(state), ends.MeanSteps(state) * Tolerances.SubtractionFree(20), sample.ToString());
            }
        }
    }

    [Fact]
    public void Conditional_means_recombine_to_the_mean()
    {
        foreach (var sample in ChainFamilies.Named("reducible").Samples(40, 20))
        {
            var ends = sample.ToChain().Absorption();
            var times = ends.Ends.Select(end => ends.StepsIfInto(end.States[0])).ToList();
            foreach (var state in sample.ToChain().Structure().TransientStates)
            {
                var mean = ends.Ends.Zip(times).Where(pair => ends.Probability(state, pair.First.States[0]) > 0)
                    .Sum(pair => ends.Probability(state, pair.First.States[0]) * pair.Second.Mean(state));
                mean.Should().BeApproximately(ends.MeanSteps(state), ends.MeanSteps(state) * Tolerances.SubtractionFree(20), sample.ToString());
            }
        }
    }

    [Fact]
    public void The_conditional_chain_tells_the_same_story()
    {
        foreach (var sample in ChainFamilies.Named("reducible").Samples(20, 20))
        {
            var ends = sample.ToChain().Absorption();
            foreach (var into in ends.Ends.Select(end => end.States[0]))
            {
                var conditional = ends.Conditional(into);
                var steps = conditional.Absorption();
                steps.Ends.Should().ContainSingle();
                foreach (var state in conditional.States)
                {
                    conditional.Row(state).Values.ToArray().Sum().Should().BeApproximately(1, Tolerances.SubtractionFree(sample.StateCount));
                    var mean = ends.StepsIfInto(into).Mean(state);
                    steps.MeanSteps(state).Should().BeApproximately(mean, mean * 10 * Tolerances.SubtractionFree(sample.StateCount), sample.ToString());
                }
            }
        }
    }

    [Fact]
    public void A_conditional_chain_keeps_the_unit_of_time()
    {
        var plant = Chain.FromRates([new TransitionRate<string>("up", "down", 2), new TransitionRate<string>("up", "sold", 1)]);

        plant.Absorption().Conditional("down").TimeTo("down").Mean("up").Should().BeApproximately(1.0 / 3, Tolerances.FourRoundings);
        plant.Absorption().StepsIfInto("down").Mean("up").Should().BeApproximately(1.0 / 3, Tolerances.FourRoundings);
        plant.Absorption().StepsIfInto("down").Mean("sold").Should().Be(double.PositiveInfinity);
        plant.Absorption().ExpectedVisits("up", "up").Should().BeApproximately(1.0 / 3, Tolerances.FourRoundings);
    }

    [Fact]
    public void Questions_about_the_wrong_kind_of_state_are_refused()
    {
        var ends = Pool.Absorption();
        var closed = Chain.Build<string>(rows => rows.Row("a", ("b", 1)).Row("b", ("a", 1)));

        ends.Invoking(it => it.ExpectedVisits("clean", "lost")).Should().Throw<ChainStructureException>().WithMessage("'lost' is recurrent*Stationary*");
        ends.Invoking(it => it.FundamentalMatrix()["clean", "lost"]).Should().Throw<ChainStructureException>();
        ends.Invoking(it => it.StepsIfInto("clean")).Should().Throw<ChainStructureException>().WithMessage("'clean' is transient*");
        ends.Invoking(it => it.Conditional("clean")).Should().Throw<ChainStructureException>();
        closed.Absorption().FundamentalMatrix().Values.Length.Should().Be(0);
        closed.Absorption().FundamentalMatrix().Invoking(it => it.ToMatrix()).Should().Throw<InvalidOperationException>().WithMessage("*no transient states*");
        closed.Absorption().StepsIfInto("a").Mean("b").Should().Be(0);
        ends.Invoking(it => it.FundamentalMatrix(new SolveOptions { MemoryLimit = 60 })).Should().Throw<MemoryLimitException>();
        var rare = Chain.Build<string>(rows => rows.Row("a", ("b", 1e-300), ("c", 1)).Row("b", ("c", 1), ("d", 1e-300)).Row("c", ("c", 1)).Row("d", ("d", 1)));
        rare.Invoking(it => it.Absorption()).Should().Throw<NumericalRangeException>();
    }
}
