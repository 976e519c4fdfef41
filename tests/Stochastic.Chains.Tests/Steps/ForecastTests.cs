using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Steps;

/// <summary>A forecast is what After gives at every step, held or one by one.</summary>
public class ForecastTests
{
    private static readonly Chain<string> Pump = Chain.Build<string>(rows => rows
        .Row("new", ("new", 0.90), ("worn", 0.10))
        .Row("worn", ("worn", 0.75), ("failed", 0.25))
        .Row("failed", ("new", 1.0)));

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void Every_step_of_a_forecast_is_the_answer_of_After(bool isSparse)
    {
        var chain = isSparse ? Pump.AsSparse() : Pump;
        var forecast = chain.StartingIn("worn").Forecast(20);

        forecast.Horizon.Should().Be(20);
        forecast.Values.Length.Should().Be(21 * 3);
        for (var step = 0; step <= 20; step++)
        {
            var after = chain.StartingIn("worn").After(step);
            forecast[step].ToArray().Should().Equal(after.ToArray());
            forecast[step].Certificate.Should().Be(after.Certificate);
            forecast[step].Steps.Should().Be(step);
            forecast.Of("failed")[step].Should().Be(after["failed"]);
        }

        forecast.Certificate.RelativeErrorBound.Should().Be(forecast[20].Certificate.RelativeErrorBound);
        forecast.Certificate.IsProof.Should().BeTrue();
    }

    [Fact]
    public void A_forecast_keeps_the_worst_evidence_of_its_steps()
    {
        // The second state is left with a probability so small that the third step leaves the range of doubles.
        var chain = Chain.FromMatrix(new[,] { { 1 - 1e-200, 1e-200, 0 }, { 0, 1 - 1e-200, 1e-200 }, { 0, 0, 1 } });
        var forecast = chain.StartingIn(0).Forecast(3);

        forecast[1].Certificate.RelativeErrorBound.Should().BeLessThan(Tolerances.Published);
        forecast.Certificate.RelativeErrorBound.Should().Be(double.PositiveInfinity);
        forecast.Certificate.AbsoluteErrorBound.Should().BeLessThan(Tolerances.Published);
    }

    [Fact]
    public void Step_by_step_computes_only_what_is_read()
    {
        using var source = new CancellationTokenSource();
        var steps = new List<long>();

        foreach (var then in Pump.StartingIn("new").StepByStep(long.MaxValue, new SolveOptions { CancellationToken = source.Token }).Take(5))
        {
            steps.Add(then.Steps);
            then.ToArray().Should().Equal(Pump.StartingIn("new").After(then.Steps).ToArray());
        }

        steps.Should().Equal(0, 1, 2, 3, 4);
        source.Cancel();
        Pump.StartingIn("new").StepByStep(9, new SolveOptions { CancellationToken = source.Token }).Invoking(all => all.Count())
            .Should().Throw<OperationCanceledException>();
    }

    [Fact]
    public void A_long_forecast_of_a_settled_chain_says_so()
    {
        var forecast = Pump.StartingIn("new").Forecast(20_000);

        forecast[20_000].ToArray().Should().Equal(Pump.StartingIn("new").After(20_000).ToArray());
        forecast.Certificate.Iterations.Should().BeLessThan(10_000);
        forecast.Certificate.Reason.Should().Contain("early");
    }

    [Fact]
    public void The_table_fits_a_terminal_and_thins_steps_and_states()
    {
        Pump.StartingIn("new").Forecast(2).ToString().ReplaceLineEndings("\n").Should().Be(
            """
            step   new   worn  failed
            0        1      0       0
            1      0.9    0.1       0
            2     0.81  0.165   0.025
            """.ReplaceLineEndings("\n"));

        var many = Chain.FromMatrix(Enumerable.Range(0, 30).Select(k => $"state {k}").ToList(), Uniform(30));
        var lines = many.StartingIn("state 7").Forecast(1000).ToString().ReplaceLineEndings("\n").Split('\n');
        lines.Should().HaveCountLessThanOrEqualTo(15).And.OnlyContain(line => line.Length <= 110);
        lines[0].Should().Contain("state 7");
        lines[^1].Should().Be("… and 22 more states");
        lines[^2].Should().StartWith("1,000");
    }

    [Fact]
    public void Progress_is_reported_up_to_the_end()
    {
        var heard = new List<double>();
        _ = Pump.StartingIn("new").Forecast(10, new SolveOptions { Progress = new Listener(heard) });

        heard.Should().HaveCount(11).And.BeInAscendingOrder();
        heard[^1].Should().Be(1);
    }

    [Fact]
    public void Bad_forecasts_are_refused()
    {
        var start = Pump.StartingIn("new");

        start.Invoking(x => x.Forecast(-1)).Should().Throw<ArgumentOutOfRangeException>().WithMessage("*0 or more*");
        start.Invoking(x => x.StepByStep(-1)).Should().Throw<ArgumentOutOfRangeException>().WithMessage("*0 or more*");
        start.Invoking(x => x.Forecast(1000, new SolveOptions { MemoryLimit = 1000 })).Should().Throw<MemoryLimitException>();
        start.Invoking(x => x.Forecast(9, new SolveOptions { CancellationToken = new CancellationToken(true) })).Should().Throw<OperationCanceledException>();
        start.Forecast(3).Invoking(x => x[4]).Should().Throw<ArgumentOutOfRangeException>().WithMessage("*Step 4*step 3*");
        start.Forecast(3).Invoking(x => x[-1]).Should().Throw<ArgumentOutOfRangeException>();
        start.Forecast(3).Invoking(x => x.Of("dirty")).Should().Throw<UnknownStateException>();
    }

    private static double[,] Uniform(int states)
    {
        var matrix = new double[states, states];
        for (var k = 0; k < states * states; k++)
        {
            matrix[k / states, k % states] = 1.0 / states;
        }

        return matrix;
    }

    private sealed class Listener(List<double> heard) : IProgress<SolveProgress>
    {
        public void Report(SolveProgress value) => heard.Add(value.Fraction);
    }
}
