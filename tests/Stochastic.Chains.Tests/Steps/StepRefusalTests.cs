using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Steps;

public class StepRefusalTests
{
    private static readonly Chain<string> Pump = Chain.Build<string>(rows => rows
        .Row("new", ("new", 0.90), ("worn", 0.10))
        .Row("worn", ("worn", 0.75), ("failed", 0.25))
        .Row("failed", ("new", 1.0)));

    [Fact]
    public void No_steps_leave_the_start_as_it_is_and_one_step_gives_the_row()
    {
        Pump.StartingIn("new").After(0).ToArray().Should().Equal(1, 0, 0);
        Pump.StartingIn("worn").After(1).ToArray().Should().Equal(Pump.Row("worn").ToArray());
    }

    [Fact]
    public void A_mixed_start_is_the_mixture_of_its_answers()
    {
        var mixed = Pump.StartingIn(Distribution.Over(Pump.States, ("new", 0.25), ("failed", 0.75))).After(9);
        var (fromNew, fromFailed) = (Pump.StartingIn("new").After(9), Pump.StartingIn("failed").After(9));

        foreach (var state in Pump.States)
        {
            mixed[state].Should().BeApproximately((0.25 * fromNew[state]) + (0.75 * fromFailed[state]), Tolerances.Steps(9, 3));
        }
    }

    [Fact]
    public void Very_many_steps_stop_early_when_nothing_changes_any_more()
    {
        var after = Pump.StartingIn("new").After(1_000_000_000_000);

        after.Steps.Should().Be(1_000_000_000_000);
        after.Certificate.Iterations.Should().BeLessThan(10_000);
        after.TotalVariation(Pump.Stationary()).Should().BeLessThan(1e-14);
    }

    [Fact]
    public void Bad_questions_are_refused()
    {
        var others = StateSpace.Of(["new", "worn"]);

        Pump.StartingIn("new").Invoking(start => start.After(-1)).Should().Throw<ArgumentOutOfRangeException>().WithMessage("*-1*0 or more*");
        Pump.Invoking(chain => chain.StartingIn("dirty")).Should().Throw<UnknownStateException>();
        Pump.Invoking(chain => chain.StartingIn(Distribution.Uniform(others))).Should().Throw<ArgumentException>().WithMessage("*3 states and 2*");
        Pump.StartingIn("new").Invoking(start => start.After(5, new SolveOptions { CancellationToken = new CancellationToken(true) }))
            .Should().Throw<OperationCanceledException>();
    }

    [Fact]
    public void A_chain_made_from_rates_does_not_count_its_time_in_steps()
    {
        var plant = Chain.FromRates([new TransitionRate<string>("running", "failed", 1e-4), new TransitionRate<string>("failed", "running", 0.05)]);

        plant.Invoking(it => it.StartingIn("running").After(10)).Should().Throw<InvalidOperationException>().WithMessage("*AfterTime(t)*");
        plant.Invoking(it => it.StartingIn("running").Forecast(10)).Should().Throw<InvalidOperationException>();
        plant.Invoking(it => it.StartingWith(("running", 10)).Forecast(10)).Should().Throw<InvalidOperationException>();
        plant.Invoking(it => it.NStep(10)).Should().Throw<InvalidOperationException>();
        plant.Invoking(it => it.Spectrum().NStep(10)).Should().Throw<InvalidOperationException>();

        // The other eigenvalue of the generator is −(λ + μ).
        plant.Spectrum().RelaxationTime.Should().BeApproximately(1 / 0.0501, Tolerances.Published / 0.0501);
    }
}
