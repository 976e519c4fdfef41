using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Steps;

/// <summary>Distributions after a time: right to within their bounds, for rates of every size and times from none to very long.</summary>
public class AfterTimeTests
{
    private const int ChainsPerFamily = 10;
    private const int LargestSize = 6;

    private static readonly Chain<string> Unit = Chain.FromRates([
        new TransitionRate<string>("up", "down", 1e-4), new TransitionRate<string>("down", "up", 0.05)]);

    public static TheoryData<string> Families => [.. ChainFamilies.All.Where(family => family.MaximumSize > 1).Select(family => family.Name)];

    [Theory]
    [MemberData(nameof(Families))]
    public void No_probability_is_off_by_more_than_its_bound(string name)
    {
        var samples = ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize).Where(sample => sample.OffDiagonals.Any()).ToArray();
        foreach (var sample in samples)
        {
            var chain = Chain.FromRates(sample.OffDiagonals.Select(move => new TransitionRate<int>(move.From, move.To, move.Probability)));
            var exact = ExactChain.FromTransitions(chain.StateCount, chain.Transitions.Select(move =>
                (chain.States.IndexOf(move.From), chain.States.IndexOf(move.To), move.Probability)));
            foreach (var time in new[] { 1e-3, 1.0, 6.5 })
            {
                var jumps = Rational.FromDouble(time) * Rational.FromDouble(chain.UniformizationRate!.Value);
                var truth = RoundedTimes.After(exact, 0, jumps);
                foreach (var storage in new[] { chain, chain.AsSparse() })
                {
                    var after = storage.StartingIn(chain.States[0]).AfterTime(time);

                    after.Time.Should().Be(time);
                    Enclosure.Check(truth, after.Values, after.Certificate, $"{sample}, time {time}", RoundedTimes.KnownTo);
                }
            }
        }
    }

    [Theory]
    [InlineData(1e-12)]
    [InlineData(0.1)]
    [InlineData(100.0)]
    [InlineData(1e4)]
    [InlineData(1e7)]
    [InlineData(1e9)]
    public void Two_states_follow_their_closed_form(double time)
    {
        // p(down, t) = λ/(λ + μ) · (1 − e^(−(λ + μ)t)): Birolini, Reliability Engineering, ch. 6 (from memory).
        var expected = 1e-4 / 0.0501 * OneMinusExponential(0.0501 * time);
        var after = Unit.StartingIn("up").AfterTime(time);

        after["down"].Should().BeApproximately(expected, Tolerances.Published * expected);
        after.Certificate.RelativeErrorBound.Should().BeLessThan(1);
        after.Certificate.Method.Should().Be("uniformization");
    }

    private static double OneMinusExponential(double argument)
    {
        if (argument > 1)
        {
            return 1 - Math.Exp(-argument);
        }

        var (sum, term) = (0.0, 1.0);
        for (var k = 1; k < 20; k++)
        {
            term *= -argument / k;
            sum -= term;
        }

        return sum;
    }

    [Fact]
    public void Rare_states_keep_their_digits()
    {
        // Three failures in a row without repair within a time in which each has probability 1e-60: (λt)³/6 up to relative λt.
        var chain = Chain.FromRates([
            new TransitionRate<int>(0, 1, 1.0), new TransitionRate<int>(1, 2, 1.0), new TransitionRate<int>(2, 3, 1.0)]);
        var after = chain.StartingIn(0).AfterTime(1e-60);

        after[3].Should().BeApproximately(1e-180 / 6, Tolerances.Published * 1e-180);
        after.Certificate.RelativeErrorBound.Should().BeLessThan(Tolerances.Published);
    }

    [Fact]
    public void A_long_line_is_the_poisson_law()
    {
        // Moves at rate 1 to the next of many states: the number of moves in a time is Poisson (Feller I, XVII.2).
        const int states = 400;
        var line = Chain.FromRates(Enumerable.Range(0, states).Select(k => new TransitionRate<int>(k, k + 1, 1.0)));
        var after = line.StartingIn(0).AfterTime(200);

        foreach (var k in new[] { 0, 1, 150, 200, 250, 399 })
        {
            var expected = MathNet.Numerics.Distributions.Poisson.PMF(200, k);
            after[k].Should().BeApproximately(expected, 1e3 * Tolerances.Published * expected);
        }
    }

    [Fact]
    public void A_long_time_under_or_overflows_nothing()
    {
        // Slow moves beside a fast one: rate · t = 2²¹, where e^(−rate·t) is far below any double, and nothing settles before.
        var chain = Chain.FromRates([
            new TransitionRate<int>(0, 1, 1e-7), new TransitionRate<int>(1, 0, 1e-7), new TransitionRate<int>(1, 2, 1e-7), new TransitionRate<int>(2, 1, 1.0)]);
        var after = chain.StartingIn(0).AfterTime(1 << 20);

        after.Certificate.Iterations.Should().BeGreaterThan(1 << 21);
        after.Certificate.IsProof.Should().BeTrue();
        after.Certificate.RelativeErrorBound.Should().BeLessThan(Tolerances.Steps(1 << 22, 16));
        after.Values.ToArray().Sum().Should().BeApproximately(1, 3 * after.Certificate.AbsoluteErrorBound);

        // The slow pair alone: half of 1 − e^(−2·10⁻⁷·t); the third state takes a part of about 10⁻⁷ of it.
        after[1].Should().BeApproximately(OneMinusExponential(2e-7 * (1 << 20)) / 2, 2e-7 * after[1]);
    }

    [Fact]
    public void Several_times_in_one_run_are_the_same_as_one_by_one()
    {
        double[] times = [100, 0, 3, 1e5, 3];
        var all = Unit.StartingIn("up").AfterTimes(times);

        for (var k = 0; k < times.Length; k++)
        {
            var single = Unit.StartingIn("up").AfterTime(times[k]);
            all[k].ToArray().Should().Equal(single.ToArray());
            all[k].Certificate.Should().Be(single.Certificate);
        }

        Unit.StartingIn("up").AfterTimes([]).Should().BeEmpty();
    }

    [Fact]
    public void No_time_leaves_the_start_as_it_is()
    {
        var after = Unit.StartingIn("down").AfterTime(0);

        after.ToArray().Should().Equal(0, 1);
        after.Certificate.Iterations.Should().Be(0);
        after.Certificate.IsProof.Should().BeTrue();
    }

    [Fact]
    public void A_settled_chain_ends_its_steps_early()
    {
        var after = Unit.StartingIn("up").AfterTime(1e9);

        after.Certificate.Iterations.Should().BeLessThan(100_000);
        after.Certificate.Reason.Should().Contain("early");
        after.TotalVariation(Unit.Stationary()).Should().BeLessThan(Tolerances.Published);
    }

    [Fact]
    public void Evidence_is_given_as_asked()
    {
        var none = Unit.StartingIn("up").AfterTime(5, new SolveOptions { CertificateLevel = CertificateLevel.None });
        var residual = Unit.StartingIn("up").AfterTime(5, new SolveOptions { CertificateLevel = CertificateLevel.Residual });

        none.Certificate.Residual.Should().Be(double.PositiveInfinity);
        none.Certificate.IsProof.Should().BeFalse();
        residual.Certificate.Residual.Should().BeLessThan(Tolerances.Published);
        residual.Certificate.AbsoluteErrorBound.Should().Be(double.PositiveInfinity);
    }

    [Fact]
    public void Bad_times_are_refused()
    {
        var start = Unit.StartingIn("up");
        var perStep = Chain.FromMatrix(new[,] { { 0.5, 0.5 }, { 1.0, 0.0 } });

        start.Invoking(x => x.AfterTime(-1)).Should().Throw<ArgumentOutOfRangeException>().WithMessage("*-1*0 or more*");
        start.Invoking(x => x.AfterTime(double.NaN)).Should().Throw<ArgumentOutOfRangeException>().WithMessage("*NaN*");
        start.Invoking(x => x.AfterTimes([1, double.PositiveInfinity])).Should().Throw<ArgumentOutOfRangeException>();
        start.Invoking(x => x.AfterTime(1e300)).Should().Throw<ArgumentOutOfRangeException>().WithMessage("*LongRun()*");
        start.Invoking(x => x.AfterTimes([1, 2], new SolveOptions { MemoryLimit = 10 })).Should().Throw<MemoryLimitException>();
        start.Invoking(x => x.AfterTime(1, new SolveOptions { CancellationToken = new CancellationToken(true) })).Should().Throw<OperationCanceledException>();
        perStep.StartingIn(0).Invoking(x => x.AfterTime(1)).Should().Throw<InvalidOperationException>().WithMessage("*After()*FromRates*");
    }
}
