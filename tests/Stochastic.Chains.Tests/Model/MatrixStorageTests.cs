using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Model;

public class MatrixStorageTests
{
    [Theory]
    [InlineData(1, 1, MatrixStorage.Dense)]
    [InlineData(64, 64, MatrixStorage.Dense)]
    [InlineData(65, 1056, MatrixStorage.CompressedSparseRows)]
    [InlineData(65, 1057, MatrixStorage.Dense)]
    [InlineData(1000, 249_999, MatrixStorage.CompressedSparseRows)]
    [InlineData(1000, 250_000, MatrixStorage.Dense)]
    [InlineData(1_000_000, int.MaxValue, MatrixStorage.CompressedSparseRows)]
    public void Storage_is_dense_up_to_64_states_and_then_from_a_quarter_of_all_pairs(int states, int transitions, MatrixStorage expected)
    {
        TransitionMatrix.ChooseStorage(states, transitions).Should().Be(expected);
    }

    [Theory]
    [InlineData(46_340, MatrixStorage.Dense)]
    [InlineData(46_341, MatrixStorage.CompressedSparseRows)]
    public void A_table_that_no_array_can_hold_is_never_dense(int states, MatrixStorage expected)
    {
        TransitionMatrix.ChooseStorage(states, (long)states * states).Should().Be(expected);
    }

    [Theory]
    [InlineData(64, 1, MatrixStorage.Dense)]
    [InlineData(65, 1, MatrixStorage.CompressedSparseRows)]
    [InlineData(65, 16, MatrixStorage.CompressedSparseRows)]
    [InlineData(65, 17, MatrixStorage.Dense)]
    [InlineData(80, 19, MatrixStorage.CompressedSparseRows)]
    [InlineData(80, 20, MatrixStorage.Dense)]
    public void Every_construction_follows_the_rule(int states, int movesPerState, MatrixStorage expected)
    {
        var table = Ring(states, movesPerState);
        var moves = Chain.FromMatrix(table).Transitions.ToList();

        Chain.FromMatrix(table).Storage.Should().Be(expected);
        Chain.FromMatrix(Matrix<double>.Build.DenseOfArray(table)).Storage.Should().Be(expected);
        Chain.FromMatrix(Matrix<double>.Build.SparseOfArray(table)).Storage.Should().Be(expected);
        Chain.FromTransitions(moves).Storage.Should().Be(expected);
    }

    public static TheoryData<int, int, int> Shapes => new() { { 1, 1, 1 }, { 2, 1, 2 }, { 40, 3, 3 }, { 65, 16, 4 }, { 128, 5, 5 }, { 257, 64, 6 } };

    [Theory]
    [MemberData(nameof(Shapes))]
    public void A_chain_answers_the_same_from_either_storage(int states, int movesPerState, int seed)
    {
        var (dense, sparse) = BothStorages(states, movesPerState, seed);

        dense.Storage.Should().Be(MatrixStorage.Dense);
        sparse.Storage.Should().Be(MatrixStorage.CompressedSparseRows);
        sparse.TransitionCount.Should().Be(dense.TransitionCount);
        sparse.Transitions.Should().Equal(dense.Transitions);
        sparse.ToArray().Cast<double>().Should().Equal(dense.ToArray().Cast<double>());
        sparse.ToMatrix().Should().Be(dense.ToMatrix());
        sparse.ToString().Should().Be(dense.ToString());
        foreach (var from in dense.States)
        {
            sparse.Row(from).ToArray().Should().Equal(dense.Row(from).ToArray());
            sparse.TransitionsFrom(from).Should().Equal(dense.TransitionsFrom(from));
            dense.States.Select(to => sparse[from, to]).Should().Equal(dense.States.Select(to => dense[from, to]));
        }
    }

    [Fact]
    public void Graph_algorithms_see_the_same_arcs_in_either_storage()
    {
        var (dense, sparse) = BothStorages(50, 7, 9);

        var arcs = dense.Matrix.OnGraph<List<(int, int)>, ArcList>(default);

        arcs.Should().HaveCount(dense.TransitionCount);
        sparse.Matrix.OnGraph<List<(int, int)>, ArcList>(default).Should().Equal(arcs);
    }

    private static (Chain<int> Dense, Chain<int> Sparse) BothStorages(int states, int movesPerState, int seed)
    {
        var random = new Random(seed);
        var table = new double[states * states];
        var triplets = new TripletList();
        for (var row = 0; row < states; row++)
        {
            foreach (var column in Enumerable.Range(0, states).OrderBy(_ => random.Next()).Take(movesPerState))
            {
                table[(row * states) + column] = 1.0 / movesPerState;
                triplets.Add(row, column, 1.0 / movesPerState);
            }
        }

        var space = StateSpace.Of(Enumerable.Range(100, states));
        var rows = triplets.ToCompressedRows(states);
        var dense = TransitionMatrix.FromDense(table, states, states * movesPerState);
        return (new Chain<int>(space, dense, [], null), new Chain<int>(space, TransitionMatrix.FromSparse(rows), [], null));
    }

    private static double[,] Ring(int states, int movesPerState)
    {
        var table = new double[states, states];
        for (var row = 0; row < states; row++)
        {
            for (var k = 1; k <= movesPerState; k++)
            {
                table[row, (row + k) % states] = 1.0 / movesPerState;
            }
        }

        return table;
    }

    private readonly struct ArcList : IGraphAlgorithm<List<(int From, int To)>>
    {
        public List<(int From, int To)> Run<TGraph>(TGraph graph)
            where TGraph : struct, IGraph
        {
            var arcs = new List<(int, int)>();
            for (var node = 0; node < graph.NodeCount; node++)
            {
                var cursor = graph.FirstCursor(node);
                for (var target = graph.NextTarget(node, ref cursor); target >= 0; target = graph.NextTarget(node, ref cursor))
                {
                    arcs.Add((node, target));
                }
            }

            return arcs;
        }
    }
}
