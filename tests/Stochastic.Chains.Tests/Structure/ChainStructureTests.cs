namespace Stochastic.Chains.Tests.Structure;

public class ChainStructureTests
{
    /// <summary>An invented pool: crates go round, and may be lost or scrapped for good.</summary>
    private static readonly Chain<string> Pool = Chain.Build<string>(rows => rows
        .Row("clean", ("at shop", 0.9), ("lost", 0.1))
        .Row("at shop", ("clean", 0.8), ("repair", 0.2))
        .Row("repair", ("clean", 0.5), ("scrapped", 0.5))
        .Row("lost", ("lost", 1))
        .Row("scrapped", ("scrapped", 1)));

    [Fact]
    public void Classes_are_ordered_by_their_first_state()
    {
        var classes = Pool.Structure().Classes;

        classes.Should().HaveCount(3);
        classes[0].States.Should().Equal("clean", "at shop", "repair");
        classes[1].States.Should().Equal("lost");
        classes[2].States.Should().Equal("scrapped");
    }

    [Fact]
    public void A_class_that_can_be_left_is_transient_and_one_that_cannot_is_recurrent()
    {
        var structure = Pool.Structure();

        structure.Classes.Select(group => group.IsRecurrent).Should().Equal(false, true, true);
        structure.Classes.Select(group => group.IsAbsorbing).Should().Equal(false, true, true);
        structure.TransientStates.Should().Equal("clean", "at shop", "repair");
        structure.AbsorbingStates.Should().Equal("lost", "scrapped");
        structure.RecurrentClasses.Select(group => group.States[0]).Should().Equal("lost", "scrapped");
        structure.IsIrreducible.Should().BeFalse();
        structure.ClassOf("repair").States.Should().Contain("clean");
    }

    [Fact]
    public void Reachability_follows_the_moves_and_includes_the_start()
    {
        var structure = Pool.Structure();

        structure.CanReach("repair", "lost").Should().BeTrue();
        structure.CanReach("lost", "clean").Should().BeFalse();
        structure.CanReach("lost", "lost").Should().BeTrue();
        structure.ReachableFrom("repair").Should().Equal("clean", "at shop", "lost", "repair", "scrapped");
        structure.ReachableFrom("scrapped").Should().Equal("scrapped");
    }

    [Fact]
    public void In_canonical_order_the_matrix_is_block_lower_triangular()
    {
        // Two transient classes {a}, {b, c} and a recurrent one {d, e}; given in an unhelpful order.
        var chain = Chain.Build<string>(rows => rows
            .Row("a", ("b", 1))
            .Row("b", ("c", 0.5), ("d", 0.5))
            .Row("c", ("b", 1))
            .Row("d", ("e", 1))
            .Row("e", ("d", 1)));

        var structure = chain.Structure();

        structure.CanonicalOrder.Should().Equal("d", "e", "b", "c", "a");
        var position = structure.CanonicalOrder.Select((state, index) => (state, index)).ToDictionary(pair => pair.state, pair => pair.index);
        chain.Transitions.Where(move => !structure.ClassOf(move.From).States.Contains(move.To))
            .Should().OnlyContain(move => position[move.To] < position[move.From]).And.HaveCountGreaterThan(1);
    }

    [Fact]
    public void A_cycle_with_a_short_cut_has_the_greatest_common_divisor_as_its_period()
    {
        // Ways round of 12 and of 6 steps.
        var moves = Enumerable.Range(0, 12).SelectMany(k => k == 5
            ? new[] { new Transition<int>(5, 6, 0.5), new Transition<int>(5, 0, 0.5) }
            : [new Transition<int>(k, (k + 1) % 12, 1)]);
        var structure = Chain.FromTransitions(moves).Structure();

        structure.Period.Should().Be(6);
        structure.IsAperiodic.Should().BeFalse();
        structure.Classes[0].CyclicClasses.Should().HaveCount(6);
        structure.Classes[0].CyclicClasses[1].Should().Equal(1, 7);
    }

    [Fact]
    public void A_single_self_loop_makes_a_class_aperiodic_and_a_missing_one_does_not_appear_by_rounding()
    {
        var thirds = 1.0 / 3;
        var ring = Enumerable.Range(0, 4).SelectMany(from => Enumerable.Range(0, 4).Where(to => to != from).Select(to => new Transition<int>(from, to, thirds)));
        var bipartite = Chain.FromMatrix(new double[,] { { 0, 0, 0.1, 0.9 }, { 0, 0, 0.7, 0.3 }, { 0.4, 0.6, 0, 0 }, { 0.5, 0.5, 0, 0 } });

        Chain.FromTransitions(ring).Transitions.Should().OnlyContain(move => move.From != move.To);
        bipartite.Structure().Period.Should().Be(2);
        Chain.FromMatrix(new double[,] { { 1e-300, 1 }, { 1, 0 } }).Structure().Period.Should().Be(1);
    }

    [Fact]
    public void A_state_without_a_way_back_has_period_zero()
    {
        var structure = Chain.Build<string>(rows => rows.Row("start", ("end", 1)).Row("end", ("end", 1))).Structure();

        structure.ClassOf("start").Period.Should().Be(0);
        structure.ClassOf("start").CyclicClasses.Should().ContainSingle().Which.Should().Equal("start");
        structure.Period.Should().Be(1);
    }

    [Fact]
    public void The_period_of_several_classes_is_their_least_common_multiple_and_says_when_it_overflows()
    {
        Cycles(2, 3, 4).Structure().Period.Should().Be(12);

        var many = Cycles(2, 3, 5, 7, 11, 13, 17, 19, 23, 29, 31, 37, 41, 43, 47, 53).Structure();
        many.IsAperiodic.Should().BeFalse();
        many.Invoking(structure => structure.Period).Should().Throw<OverflowException>();
    }

    [Fact]
    public void A_path_of_a_million_states_does_not_overflow_the_stack()
    {
        const int last = 999_999;
        var moves = Enumerable.Range(0, last + 1).Select(k => new Transition<int>(k, Math.Min(k + 1, last), 1));

        var structure = Chain.FromTransitions(moves).Structure();

        structure.Classes.Should().HaveCount(last + 1);
        structure.AbsorbingStates.Should().Equal(last);
        structure.CanonicalOrder[0].Should().Be(last);
        structure.CanReach(0, last).Should().BeTrue();
    }

    [Fact]
    public void Dense_and_sparse_storage_tell_the_same_structure()
    {
        // Above 64 states the density decides: the same two-class chain with and without a block of extra moves.
        foreach (var seed in new[] { 1, 3, 7 })
        {
            var sparse = Blocks(100, linksPerState: 2, seed);
            var dense = Blocks(100, linksPerState: 60, seed);

            sparse.Storage.Should().Be(MatrixStorage.CompressedSparseRows);
            dense.Storage.Should().Be(MatrixStorage.Dense);
            dense.Structure().RecurrentClasses.Should().ContainSingle().Which.States.Should().HaveCount(50);
            dense.Structure().TransientStates.Should().HaveCount(50);
            sparse.Structure().TransientStates.Should().Contain(Enumerable.Range(50, 50));
        }
    }

    [Fact]
    public void Labels_that_are_no_states_are_refused_by_name()
    {
        var structure = Pool.Structure();

        structure.Invoking(it => it.ClassOf("dirty")).Should().Throw<UnknownStateException>().WithMessage("*'dirty'*5 states*");
        structure.Invoking(it => it.CanReach("clean", "dirty")).Should().Throw<UnknownStateException>();
        structure.Invoking(it => it.ReachableFrom("dirty")).Should().Throw<UnknownStateException>();
    }

    [Fact]
    public void Text_is_short_and_readable()
    {
        Pool.Structure().ToString().Should().Be("3 classes, 2 recurrent; 3 transient states; aperiodic");
        Pool.Structure().Classes[1].ToString().Should().Be("absorbing: 'lost'");
        Cycles(3).Structure().Classes[0].ToString().Should().Be("recurrent, period 3: '0', '1', '2'");
    }

    private static Chain<int> Cycles(params int[] lengths)
    {
        var moves = new List<Transition<int>>();
        var first = 0;
        foreach (var length in lengths)
        {
            moves.AddRange(Enumerable.Range(0, length).Select(k => new Transition<int>(first + k, first + ((k + 1) % length), 1)));
            first += length;
        }

        return Chain.FromTransitions(moves);
    }

    /// <summary>States below half form one closed class; the others lead into it and among themselves.</summary>
    private static Chain<int> Blocks(int states, int linksPerState, int seed)
    {
        var half = states / 2;
        var moves = new Dictionary<(int From, int To), double>();
        for (var from = 0; from < states; from++)
        {
            var first = from < half ? (from + 1) % half : seed;
            var targets = Enumerable.Range(0, linksPerState - 1)
                .Select(k => from < half ? (from + (k * seed) + 1) % half : (from + (k * seed)) % states)
                .Append(first).Distinct().ToArray();
            foreach (var to in targets)
            {
                moves[(from, to)] = 1.0 / targets.Length;
            }
        }

        return Chain.FromTransitions(Enumerable.Range(0, states), moves.Select(move => new Transition<int>(move.Key.From, move.Key.To, move.Value)));
    }
}
