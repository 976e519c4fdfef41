using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.LongRun;

/// <summary>What periodic chains go round in, from every start.</summary>
public class CyclicLimitTests
{
    private const long ManySteps = 1 << 20;

    [Fact]
    public void A_published_cycle_is_followed_phase_by_phase()
    {
        // STRESS-PERIOD, own making: period 6; the limit in a cyclic class is six times the long-run share there.
        var chain = PublishedCases.Named("STRESS-PERIOD").Queries[0].Chain().ToChain();
        var longRun = chain.StartingIn(2).LongRun();

        longRun.HasLimit.Should().BeFalse();
        longRun.Period.Should().Be(6);
        for (var phase = 0; phase < 12; phase++)
        {
            var limit = longRun.AtPhase(phase);
            limit.Phase.Should().Be(phase);
            for (var state = 0; state < 12; state++)
            {
                var expected = (state - 2 - phase) % 6 == 0 ? (state < 6 ? 0.6 : 0.4) : 0;
                limit[state].Should().BeApproximately(expected, Tolerances.SubtractionFree(12));
            }
        }
    }

    [Fact]
    public void The_way_into_a_cycle_decides_its_phase()
    {
        // By hand: a start that waits one step with probability 1/2 each time enters after an odd number of steps with probability 2/3.
        var chain = Chain.Build<string>(rows => rows
            .Row("wait", ("wait", 0.5), ("early", 0.5)).Row("early", ("late", 1.0)).Row("late", ("early", 1.0)));
        var longRun = chain.StartingIn("wait").LongRun();

        longRun["early"].Should().Be(0.5);
        longRun.AtPhase(0)["early"].Should().BeApproximately(1.0 / 3, Tolerances.FourRoundings);
        longRun.AtPhase(1)["early"].Should().BeApproximately(2.0 / 3, Tolerances.FourRoundings);
        longRun.AtPhase(1)["late"].Should().BeApproximately(1.0 / 3, Tolerances.FourRoundings);
        longRun.AtPhase(0).Certificate.IsProof.Should().BeTrue();
    }

    [Theory]
    [InlineData("periodic")]
    [InlineData("permutation")]
    [InlineData("reducible")]
    [InlineData("random sparse")]
    public void Limits_are_what_very_many_steps_give(string family)
    {
        foreach (var sample in ChainFamilies.Named(family).Samples(10, 9))
        {
            CheckAgainstManySteps(sample.ToChain(), sample.ToExact(), sample.ToString());
        }
    }

    [Fact]
    public void Mixtures_of_cycles_and_ends_are_followed_from_every_start()
    {
        // Transient: 0 and 1. Ends: a cycle of 2 (2, 3), a cycle of 3 with a shortcut back to itself in step (4..6), an absorbing state 7.
        var transitions = new (int From, int To, double Probability)[]
        {
            (0, 0, 0.25), (0, 1, 0.25), (0, 2, 0.125), (0, 4, 0.25), (0, 7, 0.125),
            (1, 0, 0.5), (1, 3, 0.25), (1, 6, 0.25),
            (2, 3, 1.0), (3, 2, 1.0), (4, 5, 1.0), (5, 6, 1.0), (6, 4, 1.0), (7, 7, 1.0),
        };
        var chain = Chain.FromTransitions(Enumerable.Range(0, 8), transitions.Select(move => new Transition<int>(move.From, move.To, move.Probability)));

        chain.LongRun().HasLimit.Should().BeFalse();
        chain.StartingIn(0).LongRun().Period.Should().Be(6);
        chain.StartingIn(2).LongRun().Period.Should().Be(2);
        chain.StartingIn(7).LongRun().HasLimit.Should().BeTrue();
        CheckAgainstManySteps(chain, ExactChain.FromTransitions(8, transitions), "mixture");
        CheckAgainstManySteps(chain.AsSparse(), ExactChain.FromTransitions(8, transitions), "mixture, sparse");
    }

    [Fact]
    public void The_average_of_the_limits_over_a_period_is_the_long_run_share()
    {
        foreach (var sample in ChainFamilies.Named("periodic").Samples(10, 9))
        {
            var longRun = sample.ToChain().StartingIn(0).LongRun();
            for (var state = 0; state < sample.StateCount; state++)
            {
                var average = Enumerable.Range(0, (int)longRun.Period).Average(phase => longRun.AtPhase(phase)[state]);
                average.Should().BeApproximately(longRun[state], Tolerances.SubtractionFree(sample.StateCount));
            }
        }
    }

    [Fact]
    public void Too_large_a_system_of_phases_is_refused_but_the_shares_are_not()
    {
        var transitions = new List<Transition<int>> { new(100, 101, 1.0), new(101, 100, 1.0) };
        transitions.AddRange(Enumerable.Range(0, 100).Select(k => new Transition<int>(k, k + 1, 1.0)));
        var longRun = Chain.FromTransitions(transitions).StartingIn(0).LongRun(new SolveOptions { MemoryLimit = 100_000 });

        longRun[100].Should().Be(0.5);
        longRun.Invoking(x => x.AtPhase(0)).Should().Throw<MemoryLimitException>();
    }

    private static void CheckAgainstManySteps(Chain<int> chain, ExactChain exact, string because)
    {
        for (var from = 0; from < chain.StateCount; from++)
        {
            var longRun = chain.StartingIn(from).LongRun();
            for (var phase = 0; phase < Math.Min(6, longRun.Period); phase++)
            {
                var limit = longRun.AtPhase(phase);
                var steps = (ManySteps * longRun.Period) + phase;
                var truth = RoundedSteps.NStepRow(exact, from, steps);
                for (var state = 0; state < chain.StateCount; state++)
                {
                    var known = Rational.FromDouble(RoundedSteps.RelativeErrorBound(chain.StateCount, steps)) + Rational.Pow(10, -30);
                    (Rational.Abs(truth[state] - Rational.FromDouble(limit[state])) <= Rational.FromDouble(limit.Certificate.AbsoluteErrorBound) + known)
                        .Should().BeTrue("{0} from {1} at phase {2}: {3} is {4}; {5}", state, from, phase, limit[state], truth[state].ToDouble(), because);
                }
            }
        }
    }
}
