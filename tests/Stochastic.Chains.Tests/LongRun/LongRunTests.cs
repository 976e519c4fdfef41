using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.LongRun;

/// <summary>The long run from every start: ends, shares, and the limits of cycles.</summary>
public class LongRunTests
{
    private const int ChainsPerFamily = 12;
    private const int LargestSize = 12;

    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    [Theory]
    [MemberData(nameof(Families))]
    public void No_share_is_off_by_more_than_its_bound(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize))
        {
            var longRun = sample.ToChain().LongRun();
            var exact = sample.ToExact();
            var endings = exact.AbsorptionProbabilities();
            var shares = exact.Structure.RecurrentClasses.Select(exact.Stationary).ToArray();
            for (var from = 0; from < sample.StateCount; from++)
            {
                var truth = Enumerable.Range(0, sample.StateCount).Select(to => Rational.Sum(shares.Select((share, end) => endings[from, end] * share[to]))).ToArray();

                Enclosure.Check(truth, longRun.Values.Slice(from * sample.StateCount, sample.StateCount), longRun.Certificate, sample.ToString());
                longRun.Row(from).ToArray().Should().Equal(longRun.Values.Slice(from * sample.StateCount, sample.StateCount).ToArray());
            }
        }
    }

    [Fact]
    public void A_start_spread_over_states_averages_the_rows()
    {
        var chain = TwoEnds();
        var start = Distribution.Over(chain.States, ("begin", 0.25), ("left", 0.75));
        var mixed = chain.StartingIn(start).LongRun();

        foreach (var state in chain.States)
        {
            mixed[state].Should().BeApproximately((0.25 * chain.LongRun()["begin", state]) + (0.75 * chain.LongRun()["left", state]), Tolerances.SubtractionFree(4));
        }

        mixed.HasLimit.Should().BeTrue();
        mixed.Period.Should().Be(1);
        mixed.AtPhase(3).ToArray().Should().Equal(mixed.ToArray());
        mixed.Certificate.IsProof.Should().BeTrue();
        mixed.Certificate.Residual.Should().BeLessThan(Tolerances.Published);
    }

    [Fact]
    public void By_hand_a_walk_between_two_ends_shares_them_out()
    {
        // From the start one third goes left for good; two thirds go right, where two states share the time 1 to 2.
        var chain = TwoEnds();
        var longRun = chain.LongRun();

        longRun["begin", "left"].Should().BeApproximately(1.0 / 3, Tolerances.FourRoundings);
        longRun["begin", "right"].Should().BeApproximately(2.0 / 9, Tolerances.FourRoundings);
        longRun["begin", "far"].Should().BeApproximately(4.0 / 9, Tolerances.FourRoundings);
        longRun["begin", "begin"].Should().Be(0);
        longRun["left", "far"].Should().Be(0);
        longRun.HasLimit.Should().BeTrue();
        longRun.ToString().Should().Contain("0.3333").And.Contain("share of");
        longRun.Invoking(x => x["begin", "nowhere"]).Should().Throw<UnknownStateException>();
        longRun.Invoking(x => x.Row("nowhere")).Should().Throw<UnknownStateException>();
    }

    [Fact]
    public void With_one_recurrent_class_every_row_is_the_stationary_distribution()
    {
        var chain = Chain.Build<string>(rows => rows
            .Row("new", ("new", 0.90), ("worn", 0.10)).Row("worn", ("worn", 0.75), ("failed", 0.25)).Row("failed", ("new", 1.0)));

        chain.LongRun().Row("worn").ToArray().Should().Equal(chain.Stationary().ToArray());
        chain.LongRun().Certificate.Method.Should().Be(chain.Stationary().Certificate.Method);
    }

    [Fact]
    public void Rates_have_a_limit_whatever_their_cycle()
    {
        var chain = Chain.FromRates([new TransitionRate<int>(0, 1, 2.0), new TransitionRate<int>(1, 0, 2.0)]);

        chain.LongRun().HasLimit.Should().BeTrue();
        chain.StartingIn(0).LongRun().TotalVariation(chain.StartingIn(0).AfterTime(100)).Should().BeLessThan(Tolerances.Published);
    }

    [Fact]
    public void Evidence_is_given_as_asked()
    {
        var none = TwoEnds().LongRun(new SolveOptions { CertificateLevel = CertificateLevel.None });

        none.Certificate.IsProof.Should().BeFalse();
        none.Certificate.Residual.Should().Be(double.PositiveInfinity);
        none["begin", "left"].Should().BeApproximately(1.0 / 3, Tolerances.FourRoundings);
    }

    [Fact]
    public void Bad_questions_are_refused()
    {
        var chain = TwoEnds();

        chain.StartingIn("begin").LongRun().Invoking(x => x.AtPhase(-1)).Should().Throw<ArgumentOutOfRangeException>();
        chain.Invoking(x => x.LongRun(new SolveOptions { MemoryLimit = 1 })).Should().Throw<MemoryLimitException>();
        chain.Invoking(x => x.StartingIn("begin").LongRun(new SolveOptions { MemoryLimit = 1 })).Should().Throw<MemoryLimitException>();
        chain.Invoking(x => x.LongRun(new SolveOptions { CancellationToken = new CancellationToken(true) })).Should().Throw<OperationCanceledException>();

        const int states = 13;
        var many = Chain.FromTransitions(Enumerable.Range(0, states).Select(k => new Transition<int>(k, k, 1.0)));
        many.LongRun().ToString().Should().Contain("13 states").And.Contain("13 recurrent classes");
        many.LongRun(new SolveOptions { MemoryLimit = 1 }).Invoking(x => x.Values.Length).Should().Throw<MemoryLimitException>();
    }

    [Fact]
    public void An_end_too_rare_for_a_double_is_refused_by_name()
    {
        var chain = Chain.FromMatrix(["a", "b", "rare", "usual"], new[,]
        {
            { 0, 1e-200, 0, 1 },
            { 0, 0, 1e-200, 1 },
            { 0, 0, 1.0, 0 },
            { 0, 0, 0, 1.0 },
        });

        chain.Invoking(x => x.LongRun()).Should().Throw<NumericalRangeException>().WithMessage("*'a'*");
    }

    private static Chain<string> TwoEnds() => Chain.Build<string>(rows => rows
        .Row("begin", ("begin", 0.25), ("left", 0.25), ("right", 0.5))
        .Row("left", ("left", 1.0))
        .Row("right", ("right", 0.5), ("far", 0.5))
        .Row("far", ("far", 0.75), ("right", 0.25)));
}
