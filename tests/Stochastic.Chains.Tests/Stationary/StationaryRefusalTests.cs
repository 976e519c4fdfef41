using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Stationary;

public class StationaryRefusalTests
{
    private static readonly Chain<string> TwoEnds = Chain.Build<string>(rows => rows
        .Row("in use", ("in use", 0.9), ("lost", 0.06), ("scrapped", 0.04))
        .Row("lost", ("lost", 1))
        .Row("scrapped", ("scrapped", 1)));

    private static readonly Chain<string> Pump = Chain.Build<string>(rows => rows
        .Row("new", ("new", 0.90), ("worn", 0.10))
        .Row("worn", ("worn", 0.75), ("failed", 0.25))
        .Row("failed", ("new", 1.0)));

    [Fact]
    public void Several_recurrent_classes_are_refused_by_name_with_the_calls_that_do_answer()
    {
        var refusal = TwoEnds.Invoking(chain => chain.Stationary()).Should().Throw<ChainStructureException>()
            .WithMessage("*2 recurrent classes*'lost'*'scrapped'*StationaryPerClass()*Absorption()*").Which;

        refusal.States.Should().Equal("lost", "scrapped");
        TwoEnds.StationaryPerClass().Select(shares => (shares["lost"], shares["scrapped"])).Should().Equal((1, 0), (0, 1));
    }

    [Fact]
    public void Transient_states_get_exactly_zero()
    {
        var chain = Chain.Build<string>(rows => rows.Row("start", ("a", 1)).Row("a", ("b", 1)).Row("b", ("a", 0.5), ("b", 0.5)));

        chain.Stationary()["start"].Should().Be(0);
        chain.Stationary()["b"].Should().BeApproximately(2.0 / 3, Tolerances.SubtractionFree(3));
    }

    [Fact]
    public void A_single_recurrent_state_is_answered_by_the_structure_exactly()
    {
        var chain = Chain.Build<string>(rows => rows.Row("start", ("end", 1)).Row("end", ("end", 1)));

        chain.Stationary().Certificate.Basis.Should().Be(ErrorBasis.Structure);
        chain.Stationary().Certificate.RelativeErrorBound.Should().Be(0);
        chain.Stationary()["end"].Should().Be(1);
    }

    [Fact]
    public void Too_large_a_table_is_refused_before_it_is_taken()
    {
        var refusal = Pump.Invoking(chain => chain.Stationary(new EliminationMethod(), new SolveOptions { MemoryLimit = 10 }))
            .Should().Throw<MemoryLimitException>().WithMessage("*3 states*72 bytes*limit is 10*SolveOptions.MemoryLimit*").Which;

        refusal.RequiredBytes.Should().Be(72);
        refusal.LimitBytes.Should().Be(10);
    }

    [Fact]
    public void A_share_below_the_range_of_a_double_is_refused_by_name()
    {
        // Each stage is 1e-200 times as likely as the one before, so the third is far below 1e-308.
        var chain = Chain.Build<string>(rows => rows
            .Row("a", ("b", 1e-200), ("a", 1))
            .Row("b", ("c", 1e-200), ("a", 1))
            .Row("c", ("a", 1)));

        chain.Invoking(it => it.Stationary()).Should().Throw<NumericalRangeException>().WithMessage("*'c'*smaller than a double can hold*").Which
            .State.Should().Be("c");
    }

    [Fact]
    public void Methods_that_need_more_iterations_say_what_was_reached_and_what_to_try()
    {
        var method = new PowerMethod { MaxIterations = 3 };

        var refusal = Pump.Invoking(chain => chain.Stationary(method)).Should().Throw<ConvergenceException>()
            .WithMessage("The power method did not reach its tolerance in 3 iterations; its residual is *").Which;

        refusal.Iterations.Should().Be(3);
        refusal.Iterate.Length.Should().Be(3);
        refusal.Certificate.Residual.Should().BePositive();
        refusal.Advice.Should().Contain("EliminationMethod");
        Pump.TryStationary(method, new SolveOptions(), out var shares).Should().BeFalse();
        shares.ToArray().Should().Equal(refusal.Iterate.ToArray());
        Pump.TryStationary(new PowerMethod(), new SolveOptions(), out _).Should().BeTrue();
    }

    [Fact]
    public void A_periodic_chain_gets_its_shares_from_every_method()
    {
        var ring = Chain.FromMatrix(new[,] { { 0, 1.0, 0 }, { 0, 0, 1 }, { 1, 0, 0 } });

        foreach (var method in new IStationaryMethod[]
            { new EliminationMethod(), new LinearSystemMethod(), new EigenMethod(), new PowerMethod(), new GaussSeidelMethod(), new AggregationMethod() })
        {
            ring.Stationary(method).Values.ToArray().Should().OnlyContain(share => Math.Abs(share - (1.0 / 3)) < 1e-10, method.Name);
        }
    }

    [Fact]
    public void A_method_of_ones_own_is_normalized_and_certified()
    {
        var shares = Pump.Stationary(new Fixed([10, 4, 1]));

        shares.ToArray().Zip(new[] { 10.0 / 15, 4.0 / 15, 1.0 / 15 }, (computed, exact) => Math.Abs(computed - exact)).Max()
            .Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(3));
        shares.Certificate.Basis.Should().Be(ErrorBasis.FlowBalance);
        shares.Certificate.Method.Should().Be("fixed");
        Pump.Stationary(new Fixed([10, 4, 2])).Certificate.RelativeErrorBound.Should().BeGreaterThan(0.5);
    }

    [Theory]
    [InlineData(-1.0)]
    [InlineData(0.0)]
    [InlineData(double.NaN)]
    public void An_entry_that_is_not_positive_is_refused_not_clipped(double entry)
    {
        Pump.Invoking(chain => chain.Stationary(new Fixed([10, 4, entry]))).Should().Throw<NumericalRangeException>()
            .WithMessage("The fixed returned * for 'failed', whose long-run share is certainly positive*").Which.State.Should().Be("failed");
    }

    [Fact]
    public void A_vector_of_the_wrong_length_is_refused()
    {
        Pump.Invoking(chain => chain.Stationary(new Fixed([1, 2]))).Should().Throw<ArgumentException>().WithMessage("*fixed*2 numbers*3 states*");
    }

    [Fact]
    public void Nothing_unproved_gets_through_a_requirement()
    {
        Pump.Stationary().Require(relativeError: 1e-12)["new"].Should().BePositive();
        Pump.Stationary().Require(absoluteError: 1e-12)["new"].Should().BePositive();

        var unproved = Pump.Stationary(new SolveOptions { CertificateLevel = CertificateLevel.Residual });
        unproved.Invoking(shares => shares.Require(relativeError: 1e-12)).Should().Throw<AccuracyException>()
            .WithMessage("*1E-12 is required, but nothing is proved*").Which.Certificate.Should().BeSameAs(unproved.Certificate);
        unproved.Invoking(shares => shares.Require(absoluteError: 1e-12)).Should().Throw<AccuracyException>();
        Pump.Stationary().Invoking(shares => shares.Require(relativeError: 1e-17)).Should().Throw<AccuracyException>().WithMessage("*is proved*");
        Pump.Stationary().Invoking(shares => shares.Require(relativeError: 0)).Should().Throw<ArgumentOutOfRangeException>();
        Pump.Stationary().Invoking(shares => shares.Require(absoluteError: double.NaN)).Should().Throw<ArgumentOutOfRangeException>();
    }

    [Fact]
    public void A_rare_share_that_came_out_wrong_leaves_a_bound_on_absolute_errors_alone()
    {
        var chain = Chain.FromMatrix(new[,] { { 0.5, 0.5, 1e-30 }, { 0.25, 0.75, 0 }, { 0.5, 0.5, 0 } });
        var wrong = chain.Stationary(new Fixed([1.0 / 3, 2.0 / 3, 1e-20]));

        wrong.Certificate.IsProof.Should().BeTrue();
        wrong.Certificate.RelativeErrorBound.Should().Be(double.PositiveInfinity);
        wrong.Certificate.Basis.Should().Be(ErrorBasis.Contraction);
        wrong.Certificate.AbsoluteBasis.Should().Be(ErrorBasis.Contraction);
        wrong.Certificate.ToString().Should().Contain("absolute error at most").And.Contain("proved: Contraction");
        wrong.Require(absoluteError: 1e-12);
        wrong.Invoking(shares => shares.Require(relativeError: 0.5)).Should().Throw<AccuracyException>().WithMessage("*nothing is proved*");
    }

    [Fact]
    public void The_bound_on_absolute_errors_may_rest_on_something_else_than_that_on_relative_ones()
    {
        // Restarts bring everything together again in a few steps, but the tree that balances the flows loses a factor for each state.
        var chain = Chain.FromTransitions(Enumerable.Range(0, 60).SelectMany(state => new Transition<int>[]
            { new(state, (state + 1) % 60, 0.75), new(state, (state + 30) % 60, 0.125), new(state, 0, 0.125) }.GroupBy(move => move.To, (to, moves) =>
                new Transition<int>(state, to, moves.Sum(move => move.Probability)))));
        var certificate = chain.Stationary(new PowerMethod()).Certificate;

        certificate.Basis.Should().Be(ErrorBasis.FlowBalance);
        certificate.AbsoluteBasis.Should().BeOneOf(ErrorBasis.Contraction, ErrorBasis.MonotoneResidual);
        certificate.AbsoluteErrorBound.Should().BeLessThan(certificate.RelativeErrorBound / 10);
    }

    [Fact]
    public void Defaults_are_as_documented_and_bad_options_are_refused()
    {
        new EliminationMethod().Should().Be(new EliminationMethod { MaxDoubledStates = 500 });
        new PowerMethod().Should().Be(new PowerMethod { Tolerance = 1e-12, MaxIterations = 100_000 });
        new GaussSeidelMethod().Should().Be(new GaussSeidelMethod { Tolerance = 1e-12, MaxIterations = 10_000 });
        new AggregationMethod().Should().Be(new AggregationMethod { Tolerance = 1e-12, MaxIterations = 1_000, CouplingThreshold = 0.01, SweepsPerCycle = 8 });
        new SolveOptions().Should().Be(new SolveOptions { CertificateLevel = CertificateLevel.Proof, MemoryLimit = 2L << 30, Parallelism = 1 });

        FluentActions.Invoking(() => new EliminationMethod { MaxDoubledStates = -1 }).Should().Throw<ArgumentOutOfRangeException>();
        FluentActions.Invoking(() => new PolishedMethod(null!)).Should().Throw<ArgumentNullException>();
        FluentActions.Invoking(() => new PowerMethod { Tolerance = 0 }).Should().Throw<ArgumentOutOfRangeException>();
        FluentActions.Invoking(() => new GaussSeidelMethod { MaxIterations = 0 }).Should().Throw<ArgumentOutOfRangeException>();
        FluentActions.Invoking(() => new SolveOptions { Parallelism = 0 }).Should().Throw<ArgumentOutOfRangeException>();
    }

    private sealed class Fixed(double[] values) : IStationaryMethod
    {
        public string Name => "fixed";

        public StationaryVector Solve(StationaryProblem problem)
        {
            problem.MovesFrom(0).Should().NotBeEmpty();
            problem.Invoking(it => it.MovesFrom(problem.StateCount)).Should().Throw<ArgumentOutOfRangeException>();
            problem.Invoking(it => it.Step(new double[1], new double[1])).Should().Throw<ArgumentOutOfRangeException>();
            return new StationaryVector(values) { HasConverged = true, Reason = "Given." };
        }
    }

    [Theory]
    [InlineData(101)]
    [InlineData(1001)]
    public void Iterations_that_can_only_repeat_their_rounding_have_settled(int states)
    {
        var ring = Chain.FromTransitions(Enumerable.Range(0, states).SelectMany(state => new[]
        {
            new Transition<int>(state, state, 0.5), new Transition<int>(state, (state + 1) % states, 0.25), new Transition<int>(state, (state + states - 1) % states, 0.25),
        }));

        foreach (var method in new IStationaryMethod[] { new PowerMethod(), new GaussSeidelMethod(), new AggregationMethod() })
        {
            ring.Stationary(method)[0].Should().BeApproximately(1.0 / states, Tolerances.Published / states, method.Name);
        }
    }
}
