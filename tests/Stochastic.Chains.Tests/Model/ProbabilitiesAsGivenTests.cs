namespace Stochastic.Chains.Tests.Model;

/// <summary>Off-diagonals are the data, and self-loops exist where they were given.</summary>
public class ProbabilitiesAsGivenTests
{
    [Fact]
    public void Three_moves_of_a_third_make_no_self_loop()
    {
        const double Third = 1.0 / 3;
        var chain = Chain.Build<string>(rows => rows
            .Row("a", ("b", Third), ("c", Third), ("d", Third))
            .Row("b", ("a", 1.0))
            .Row("c", ("a", 1.0))
            .Row("d", ("a", 1.0)));

        chain["a", "a"].Should().Be(0);
        chain.TransitionsFrom("a").Select(move => move.To).Should().Equal("b", "c", "d");
        chain.TransitionsFrom("a").Should().OnlyContain(move => move.Probability == Third);
        chain.TransitionCount.Should().Be(6);
    }

    [Fact]
    public void Ten_moves_of_a_tenth_are_kept_as_a_tenth()
    {
        var matrix = new double[11, 11];
        for (var k = 1; k <= 10; k++)
        {
            matrix[0, k] = 0.1;
            matrix[k, 0] = 1;
        }

        var chain = Chain.FromMatrix(matrix);

        chain[0, 0].Should().Be(0);
        chain.TransitionsFrom(0).Should().HaveCount(10).And.OnlyContain(move => move.Probability == 0.1);
    }

    [Fact]
    public void The_indexer_returns_the_very_number_that_was_given()
    {
        var random = new Random(7);
        var states = Enumerable.Range(0, 30).ToArray();
        var matrix = new double[30, 30];
        foreach (var row in states)
        {
            var weights = states.Select(_ => Math.Pow(10, -12 * random.NextDouble())).ToArray();
            foreach (var column in states)
            {
                matrix[row, column] = weights[column] / weights.Sum();
            }
        }

        var chain = Chain.FromMatrix(matrix);

        foreach (var row in states)
        {
            foreach (var column in states)
            {
                BitConverter.DoubleToInt64Bits(chain[row, column]).Should().Be(BitConverter.DoubleToInt64Bits(matrix[row, column]));
            }
        }
    }

    [Fact]
    public void A_self_loop_smaller_than_the_rounding_of_its_row_is_kept()
    {
        var chain = Chain.FromMatrix(new[,] { { 1e-30, 1.0 }, { 1.0, 0 } });

        chain[0, 0].Should().Be(1e-30);
        chain.TransitionCount.Should().Be(3);
    }

    [Fact]
    public void A_diagonal_that_does_not_quite_close_its_row_is_returned_as_given()
    {
        const double Given = 0.7 + 3e-13;
        var chain = Chain.FromMatrix(new[,] { { Given, 0.3 }, { 0, 1 } });

        chain[0, 0].Should().Be(Given);
        chain[0, 1].Should().Be(0.3);
    }

    [Fact]
    public void A_zero_of_either_sign_is_no_transition()
    {
        foreach (var zero in new[] { 0.0, -0.0 })
        {
            var fromMatrix = Chain.FromMatrix(new[,] { { 1, zero }, { zero, 1 } });
            var fromMoves = Chain.FromTransitions([new(0, 0, 1), new(0, 1, zero), new(1, 1, 1), new Transition<int>(1, 0, zero)]);

            foreach (var chain in new[] { fromMatrix, fromMoves })
            {
                chain.TransitionCount.Should().Be(2);
                chain.TransitionsFrom(0).Should().ContainSingle();
                double.IsNegative(chain[0, 1]).Should().BeFalse();
                double.IsNegative(chain.ToArray()[1, 0]).Should().BeFalse();
            }
        }
    }

    [Fact]
    public void A_zero_makes_its_states_known_and_may_be_given_beside_a_move()
    {
        var chain = Chain.FromTransitions([new("a", "b", 0), new("a", "b", 1), new Transition<string>("b", "a", 1)]);

        chain.States.Should().Equal("a", "b");
        chain["a", "b"].Should().Be(1);
    }

    [Theory]
    [InlineData(double.Epsilon)]
    [InlineData(1e-310)]
    [InlineData(1e-300)]
    public void The_smallest_probabilities_are_transitions_in_either_storage(double tiny)
    {
        var dense = Chain.FromMatrix(new[,] { { 1, tiny }, { 0, 1 } });
        var sparse = Chain.FromTransitions(Enumerable.Range(0, 100).Select(k => new Transition<int>(k, k, 1)).Append(new Transition<int>(0, 1, tiny)));

        dense.Storage.Should().Be(MatrixStorage.Dense);
        sparse.Storage.Should().Be(MatrixStorage.CompressedSparseRows);
        dense.TransitionCount.Should().Be(3);
        sparse.TransitionCount.Should().Be(101);
        foreach (var chain in new[] { dense, sparse })
        {
            chain[0, 1].Should().Be(tiny);
            chain.TransitionsFrom(0)[1].Probability.Should().Be(tiny);
            chain.Row(0)[1].Should().Be(tiny);
        }
    }
}
