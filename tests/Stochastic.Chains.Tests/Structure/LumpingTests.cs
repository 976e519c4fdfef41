using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Structure;

public class LumpingTests
{
    /// <summary>Invented: two washing lines that do the same, and one store.</summary>
    private static readonly Chain<string> House = Chain.Build<string>(rows => rows
        .Row("store", ("line 1", 0.3), ("line 2", 0.2), ("store", 0.5))
        .Row("line 1", ("store", 0.6), ("line 1", 0.1), ("line 2", 0.3))
        .Row("line 2", ("store", 0.6), ("line 1", 0.25), ("line 2", 0.15)));

    [Fact]
    public void States_that_move_alike_are_taken_together()
    {
        var lumped = House.Lump(state => state.StartsWith("line", StringComparison.Ordinal) ? "lines" : state);

        lumped.States.Should().Equal("store", "lines");
        lumped["store", "lines"].Should().Be(0.5);
        lumped["lines", "store"].Should().BeApproximately(0.6, Tolerances.SumOfOne(2));
        lumped["lines", "lines"].Should().BeApproximately(0.4, Tolerances.SumOfOne(3));
        House.Lumpability(state => state[0]).ToString().Should().StartWith("lumpable into 2 groups");
    }

    [Fact]
    public void States_that_do_not_are_named()
    {
        var verdict = House.Lumpability(state => state == "line 2" ? "second" : "rest");

        verdict.IsLumpable.Should().BeFalse();
        verdict.LargestDifference.Should().BeApproximately(1.0 / 3, Tolerances.SumOfOne(3));
        verdict.ToString().Should().Contain("'store'").And.Contain("'line 1'").And.Contain("'second'");
        verdict.Invoking(it => it.ToChain()).Should().Throw<ChainStructureException>().WithMessage("*CoarsestLumping*");
        House.Lumpability(state => state == "line 2" ? "second" : "rest", 0.5).IsLumpable.Should().BeTrue();
        House.Invoking(it => it.Lumpability(state => state, 1)).Should().Throw<ArgumentOutOfRangeException>();
    }

    [Fact]
    public void The_coarsest_lumping_splits_as_little_as_it_must()
    {
        House.CoarsestLumping(state => state == "store").Should().BeEquivalentTo<string[]>([["store"], ["line 1", "line 2"]]);
        House.CoarsestLumping(_ => 0).Should().ContainSingle("all states together always can be lumped");
        House.CoarsestLumping(state => state == "line 1").Should().HaveCount(3);
    }

    [Fact]
    public void Every_coarsest_lumping_is_lumpable_and_keeps_the_shares()
    {
        foreach (var sample in ChainFamilies.Named("random sparse").Samples(20, 16))
        {
            var chain = sample.ToChain();
            var groups = chain.CoarsestLumping(state => state == 0);
            var lumped = chain.Lump(state => groups.First(group => group.Contains(state))[0]);
            var shares = chain.Stationary();
            var coarse = lumped.Stationary();
            foreach (var group in groups)
            {
                coarse[group[0]].Should().BeApproximately(group.Sum(state => shares[state]), Tolerances.Published, sample.ToString());
            }
        }
    }

    [Fact]
    public void The_number_of_balls_in_one_urn_is_a_lumping_of_all_urns()
    {
        // Ehrenfest's urns with three balls, each in urn 0 or 1 (a bit each): Kemeny and Snell 1960, section 6.3 treats such lumpings (from memory).
        var urns = Chain.FromTransitions(Enumerable.Range(0, 8).SelectMany(state => Enumerable.Range(0, 3).Select(ball => new Transition<int>(state, state ^ (1 << ball), 1.0 / 3))));

        var groups = urns.CoarsestLumping(state => state == 0);

        groups.Select(group => group.Count).Should().Equal(1, 3, 3, 1);
    }
}
