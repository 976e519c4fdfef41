using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.LongRun;

public class ChainReductionTests
{
    [Fact]
    public void A_reversed_chain_has_the_same_shares_and_comes_back_when_reversed_again()
    {
        foreach (var sample in ChainFamilies.Named("random sparse").Samples(20, 20))
        {
            var chain = sample.ToChain();
            var reversed = chain.Reverse();
            var twice = reversed.Reverse();
            foreach (var (from, to, probability) in chain.Transitions)
            {
                twice[from, to].Should().BeApproximately(probability, probability * Tolerances.SubtractionFree(20), sample.ToString());
            }

            foreach (var state in chain.States)
            {
                reversed.Row(state).Values.ToArray().Sum().Should().BeApproximately(1, Tolerances.SubtractionFree(20), sample.ToString());
            }
        }
    }

    [Theory]
    [InlineData("nearly decomposable")]
    [InlineData("random sparse")]
    [InlineData("graded")]
    public void A_censored_chain_has_the_same_shares_in_proportion(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(20, 16).Where(sample => sample.StateCount > 2))
        {
            var chain = sample.ToChain();
            int[] states = [.. chain.States.Where(state => state % 2 == 0)];
            var censored = chain.Censor(states).Stationary();
            var shares = chain.Stationary();
            var total = states.Sum(state => shares[state]);
            foreach (var state in states)
            {
                censored[state].Should().BeApproximately(shares[state] / total, shares[state] / total * 10 * Tolerances.SubtractionFree(16), sample.ToString());
            }
        }
    }

    [Fact]
    public void A_censored_chain_counts_only_moves_among_its_states()
    {
        var pump = Chain.Build<string>(rows => rows
            .Row("new", ("new", 0.90), ("worn", 0.10)).Row("worn", ("worn", 0.75), ("failed", 0.25)).Row("failed", ("new", 1.0)));

        var atWork = pump.Censor("worn", "new");

        atWork.States.Should().Equal("new", "worn");
        atWork["worn", "new"].Should().Be(0.25);
        atWork["new", "new"].Should().Be(0.90);
        pump.Censor("new", "worn", "failed").Transitions.Should().Equal(pump.Transitions);
        pump.Censor("failed")["failed", "failed"].Should().Be(1);
    }

    [Fact]
    public void Chains_without_an_answer_are_refused()
    {
        var pool = Chain.Build<string>(rows => rows.Row("clean", ("clean", 0.9), ("lost", 0.1)).Row("lost", ("lost", 1)));

        pool.Invoking(it => it.Reverse()).Should().Throw<ChainStructureException>().WithMessage("Some states cannot be reached*Censor*");
        pool.Invoking(it => it.Censor("clean")).Should().Throw<ChainStructureException>().WithMessage("*enter 'lost' and never come back*");
        pool.Invoking(it => it.Censor()).Should().Throw<ArgumentException>();
        pool.Invoking(it => it.Censor("broken")).Should().Throw<UnknownStateException>();
        pool.Censor("lost")["lost", "lost"].Should().Be(1);
    }

    [Fact]
    public void Moves_backwards_that_no_double_can_hold_are_refused()
    {
        var chain = Chain.Build<string>(rows => rows.Row("a", ("a", 1), ("b", 1e-300)).Row("b", ("a", 1e-10), ("b", 1), ("c", 1e-200)).Row("c", ("b", 1)));

        chain.Reverse()["b", "a"].Should().BeApproximately(1e-10, 1e-10 * Tolerances.SubtractionFree(3));
    }
}
