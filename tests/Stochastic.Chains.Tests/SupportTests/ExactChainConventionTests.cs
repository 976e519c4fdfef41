using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.SupportTests;

/// <summary>What counts as a self-loop, as infinite, and as refused.</summary>
public class ExactChainConventionTests
{
    [Fact]
    public void Three_moves_of_a_third_do_not_invent_a_self_loop()
    {
        const double third = 1.0 / 3;
        var chain = ExactChain.FromMatrix(new[,]
        {
            { 0, third, third, third },
            { third, 0, third, third },
            { third, third, 0, third },
            { third, third, third, 0 },
        });

        chain.HasSelfLoop(0).Should().BeFalse();
        chain.SelfLoop(0).Should().Be(Rational.Zero);
        chain.NStepMatrix(1)[0, 1].Should().Be(new Rational(1, 3), "the row is divided by its sum");
    }

    [Fact]
    public void A_given_self_loop_is_what_the_off_diagonals_leave_of_one()
    {
        var chain = ExactChain.FromMatrix(new[,] { { 0.7, 0.3 }, { 1e-20, 1 } });

        chain.SelfLoop(0).Should().Be(1 - Rational.FromDouble(0.3));
        chain.NStepMatrix(1)[1, 0].Should().Be(Rational.FromDouble(1e-20));
        chain.SelfLoop(1).Should().Be(1 - Rational.FromDouble(1e-20));
    }

    [Fact]
    public void A_self_loop_with_nothing_left_counts_for_the_pattern_but_not_for_steps()
    {
        var chain = ExactChain.FromTransitions(2, [(0, 1, 1.0), (0, 0, 1e-17), (1, 0, 1.0)]);

        chain.SelfLoop(0).Should().Be(Rational.Zero);
        chain.Structure.Classes[0].Period.Should().Be(1);
    }

    [Fact]
    public void A_target_that_may_be_missed_has_an_infinite_mean_and_a_probability()
    {
        // 0 absorbs, 1 goes either way, 2 absorbs.
        var chain = ExactChain.FromMatrix(new[,] { { 1, 0, 0 }, { 0.25, 0.5, 0.25 }, { 0, 0, 1 } });

        chain.HittingMean(2).Should().Equal(null, null, Rational.Zero);
        chain.HittingMean(0, 2).Should().Equal(Rational.Zero, (Rational)2, Rational.Zero);
        chain.HittingVariance(0, 2)[1].Should().Be((Rational)2);
        chain.ReachingProbability(2).Should().Equal(0, new Rational(1, 2), 1);
        chain.MeanRecurrence(1).Should().BeNull();
        chain.MeanFirstPassage()[1, 2].Should().BeNull();
        chain.MeanFirstPassage()[0, 0].Should().Be(Rational.One);
    }

    [Fact]
    public void Several_recurrent_classes_have_no_single_stationary_distribution()
    {
        var chain = ExactChain.FromMatrix(new[,] { { 1.0, 0 }, { 0, 1.0 } });

        FluentActions.Invoking(chain.Stationary).Should().Throw<InvalidOperationException>();
        chain.Stationary(chain.Structure.RecurrentClasses[1]).Should().Equal(0, 1);
    }

    [Fact]
    public void A_negative_probability_is_refused() =>
        FluentActions.Invoking(() => ExactChain.FromTransitions(2, [(0, 1, -0.5)])).Should().Throw<ArgumentException>();

    [Fact]
    public void A_state_that_cannot_move_cannot_make_a_step() =>
        FluentActions.Invoking(() => ExactChain.FromTransitions(2, [(0, 1, 1.0)]).NStepRow(0, 2))
            .Should().Throw<InvalidOperationException>();
}
