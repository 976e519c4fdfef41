using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Passage;

public class QuasiStationaryTests
{
    [Fact]
    public void Two_states_give_the_root_of_their_quadratic()
    {
        // Left vector and largest root of [0.5 0.4; 0.3 0.5]: λ = 0.5 + √0.12, x proportional to (√0.3, √0.4).
        var chain = Chain.Build<string>(rows => rows
            .Row("a", ("a", 0.5), ("b", 0.4), ("out", 0.1)).Row("b", ("a", 0.3), ("b", 0.5), ("out", 0.2)).Row("out", ("out", 1)));

        var standing = chain.QuasiStationary();

        standing.DecayRate.Should().BeApproximately(0.5 - Math.Sqrt(0.12), Tolerances.SubtractionFree(3));
        standing["a"].Should().BeApproximately(Math.Sqrt(0.3) / (Math.Sqrt(0.3) + Math.Sqrt(0.4)), Tolerances.SubtractionFree(3));
        standing["out"].Should().Be(0);
        standing.MeanTimeToLeave.Should().Be(1 / standing.DecayRate);
        standing.DecayRateErrorBound.Should().BeLessThan(Tolerances.Published);
        standing.Certificate.IsProof.Should().BeFalse();
        standing.Certificate.Residual.Should().BeLessThan(Tolerances.SubtractionFree(3));
    }

    [Fact]
    public void A_decay_of_ten_to_the_minus_fifty_keeps_its_digits()
    {
        const double rare = 1e-50;
        var chain = Chain.Build<string>(rows => rows
            .Row("a", ("a", 0.5), ("b", 0.5 - rare), ("out", rare)).Row("b", ("a", 0.5), ("b", 0.5 - rare), ("out", rare)).Row("out", ("out", 1)));

        var standing = chain.QuasiStationary();

        standing.DecayRate.Should().BeApproximately(rare, rare * Tolerances.FourRoundings);
        standing["a"].Should().BeApproximately(0.5, Tolerances.FourRoundings);
    }

    [Fact]
    public void It_is_what_is_left_after_many_steps_given_that_something_is_left()
    {
        foreach (var sample in ChainFamilies.Named("rare absorption").Samples(20, 10))
        {
            var chain = sample.ToChain();
            var transient = chain.Structure().Classes.Where(group => !group.IsRecurrent).ToList();
            if (transient.Count != 1 || transient[0].Period != 1)
            {
                continue;
            }

            var standing = chain.QuasiStationary();
            var after = chain.StartingIn(standing).After(1);
            var left = chain.Structure().TransientStates.Sum(state => after[state]);
            foreach (var state in chain.Structure().TransientStates)
            {
                (after[state] / left).Should().BeApproximately(standing[state], Tolerances.Published, sample.ToString());
            }
        }
    }

    [Fact]
    public void Rates_give_the_decay_per_unit_of_time()
    {
        var plant = Chain.FromRates([new TransitionRate<string>("running", "failed", 3), new TransitionRate<string>("running", "worn", 1), new TransitionRate<string>("worn", "running", 2)]);

        // From the generator [-4 1; 2 -2] over running and worn: θ = 3 − √3.
        plant.QuasiStationary().DecayRate.Should().BeApproximately(3 - Math.Sqrt(3), Tolerances.SubtractionFree(3));
    }

    [Fact]
    public void The_slowest_of_several_classes_counts_and_feeds_those_after_it()
    {
        var chain = Chain.Build<string>(rows => rows
            .Row("before", ("before", 0.2), ("slow", 0.8))
            .Row("slow", ("slow", 0.9), ("after", 0.1))
            .Row("after", ("after", 0.5), ("out", 0.5))
            .Row("out", ("out", 1)));

        var standing = chain.QuasiStationary();

        // x over (slow, after): 0.9 x = x_slow · 0.9, and 0.1 x_slow + 0.5 x_after = 0.9 x_after.
        standing.DecayRate.Should().BeApproximately(0.1, Tolerances.SubtractionFree(4));
        standing["before"].Should().Be(0);
        standing["slow"].Should().BeApproximately(0.8, Tolerances.SubtractionFree(4));
        standing["after"].Should().BeApproximately(0.2, Tolerances.SubtractionFree(4));
    }

    [Fact]
    public void Of_classes_that_are_left_equally_slowly_the_last_one_counts()
    {
        var line = Chain.Build<string>(rows => rows.Row("a", ("a", 0.5), ("b", 0.5)).Row("b", ("b", 0.5), ("z", 0.5)).Row("z", ("z", 1)));

        line.QuasiStationary()["b"].Should().Be(1);
        line.QuasiStationary().DecayRate.Should().BeApproximately(0.5, Tolerances.SubtractionFree(2));
    }

    [Fact]
    public void Where_nearly_all_leave_at_once_the_shares_are_found_too()
    {
        // λ of [0.01 0.002; 0.003 0.005] by its quadratic.
        var chain = Chain.Build<string>(rows => rows
            .Row("a", ("a", 0.01), ("b", 0.002), ("z", 0.988)).Row("b", ("a", 0.003), ("b", 0.005), ("z", 0.992)).Row("z", ("z", 1)));
        var root = 0.0075 + Math.Sqrt((0.0025 * 0.0025) + (0.002 * 0.003));

        var standing = chain.QuasiStationary();

        standing.DecayRate.Should().BeApproximately(1 - root, Tolerances.SubtractionFree(3));
        standing.Certificate.Iterations.Should().BeLessThan(200);
    }

    [Fact]
    public void Where_nothing_stays_there_is_nothing_to_stand_like()
    {
        var line = Chain.Build<string>(rows => rows.Row("a", ("b", 1)).Row("b", ("c", 1)).Row("c", ("c", 1)));

        line.Invoking(it => it.QuasiStationary()).Should().Throw<ChainStructureException>().WithMessage("*all left for good after a few steps*");
    }

    [Fact]
    public void Questions_without_one_answer_are_refused()
    {
        var closed = Chain.Build<string>(rows => rows.Row("a", ("b", 1)).Row("b", ("a", 1)));
        var twins = Chain.Build<string>(rows => rows
            .Row("left", ("left", 0.9), ("out", 0.1)).Row("right", ("right", 0.9), ("out", 0.1)).Row("out", ("out", 1)));
        var near = Chain.Build<string>(rows => rows
            .Row("left", ("left", 0.9), ("right", 1e-9), ("out", 0.1 - 1e-9)).Row("right", ("right", 0.9), ("left", 3e-9), ("out", 0.1 - 4e-9), ("left too", 1e-9))
            .Row("left too", ("left too", 0.5), ("out", 0.5)).Row("out", ("out", 1)));

        closed.Invoking(it => it.QuasiStationary()).Should().Throw<ChainStructureException>().WithMessage("*no transient states*Stationary()*");
        twins.Invoking(it => it.QuasiStationary()).Should().Throw<ChainStructureException>().WithMessage("*'left' and 'right' are left equally slowly*")
            .Which.States.Should().Equal("left", "right");
        near.Invoking(it => it.QuasiStationary(new SolveOptions { CancellationToken = new CancellationToken(true) })).Should().Throw<OperationCanceledException>();
        near.Invoking(it => it.QuasiStationary()).Should().Throw<ConvergenceException>().Which.Iterate.Length.Should().Be(4);
    }
}
