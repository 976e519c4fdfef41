using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.LinearAlgebra.Double;

namespace Stochastic.Chains.Tests.Model;

public class ChainFromMatrixTests
{
    private static readonly string[] UpDown = ["up", "down"];
    private static readonly double[,] Table = { { 0.9, 0.1 }, { 0.5, 0.5 } };

    [Fact]
    public void A_table_without_labels_has_the_states_zero_to_n_minus_one()
    {
        var chain = Chain.FromMatrix(Table);

        chain.States.Should().Equal(0, 1);
        chain[0, 1].Should().Be(0.1, "row is from, column is to");
        chain[1, 0].Should().Be(0.5);
    }

    [Fact]
    public void A_table_with_labels_has_them_in_the_order_of_its_rows()
    {
        var chain = Chain.FromMatrix(UpDown, Table);

        chain.States.Should().Equal(UpDown);
        chain["up", "down"].Should().Be(0.1);
        chain["down", "up"].Should().Be(0.5);
    }

    [Fact]
    public void The_table_is_copied_so_that_a_later_change_does_not_reach_the_chain()
    {
        var table = (double[,])Table.Clone();
        var chain = Chain.FromMatrix(table);

        table[0, 1] = 7;

        chain[0, 1].Should().Be(0.1);
    }

    [Fact]
    public void The_storage_of_a_dense_matrix_is_not_shared_with_the_chain()
    {
        var matrix = DenseMatrix.OfArray(Table);
        var chain = Chain.FromMatrix(UpDown, matrix);

        matrix[0, 1] = 7;

        chain["up", "down"].Should().Be(0.1);
    }

    public static TheoryData<string> Kinds => ["table", "dense", "sparse", "sparse columns first"];

    [Theory]
    [MemberData(nameof(Kinds))]
    public void Every_kind_of_matrix_gives_the_same_chain(string kind)
    {
        var table = new[,] { { 0, 0.25, 0.75 }, { 1, 0, 0 }, { 0.5, 0, 0.5 } };
        var states = new[] { "a", "b", "c" };

        var chain = kind switch
        {
            "table" => Chain.FromMatrix(states, table),
            "dense" => Chain.FromMatrix(states, Matrix<double>.Build.DenseOfArray(table)),
            "sparse" => Chain.FromMatrix(states, Matrix<double>.Build.SparseOfArray(table)),
            _ => Chain.FromMatrix(states, Matrix<double>.Build.SparseOfArray(table).Transpose().Transpose()),
        };

        chain.ToArray().Should().BeEquivalentTo(table);
        chain.TransitionCount.Should().Be(5);
        chain.States.Should().Equal(states);
    }

    [Fact]
    public void A_sparse_matrix_without_labels_has_the_states_zero_to_n_minus_one()
    {
        var chain = Chain.FromMatrix(Matrix<double>.Build.SparseOfArray(Table));

        chain.States.Should().Equal(0, 1);
        chain.ToArray().Should().BeEquivalentTo(Table);
    }

    [Fact]
    public void An_identity_held_as_a_diagonal_matrix_is_a_chain_that_never_moves()
    {
        var chain = Chain.FromMatrix(Matrix<double>.Build.DiagonalIdentity(3));

        chain.TransitionCount.Should().Be(3);
        chain[1, 1].Should().Be(1);
    }

    [Fact]
    public void Options_reach_every_kind_of_matrix()
    {
        var percent = new[,] { { 0.9, 0.104 }, { 0.5, 0.5 } };
        var labelled = new ChainOptions<string> { RowSums = RowSums.Rescale(0.005), Comparer = StringComparer.OrdinalIgnoreCase };
        var numbered = new ChainOptions<int> { RowSums = RowSums.Rescale(0.005) };

        Chain.FromMatrix(UpDown, percent, labelled)["UP", "Down"].Should().Be(0.104 / 1.004);
        Chain.FromMatrix(UpDown, DenseMatrix.OfArray(percent), labelled)["UP", "Down"].Should().Be(0.104 / 1.004);
        Chain.FromMatrix(UpDown, SparseMatrix.OfArray(percent), labelled)["UP", "Down"].Should().Be(0.104 / 1.004);
        Chain.FromMatrix(percent, numbered)[0, 1].Should().Be(0.104 / 1.004);
        Chain.FromMatrix(DenseMatrix.OfArray(percent), numbered)[0, 1].Should().Be(0.104 / 1.004);
    }

    [Fact]
    public void Trying_gives_the_chain_and_no_faults()
    {
        Chain.TryFromMatrix(UpDown, Table, out var chain, out var faults).Should().BeTrue();

        chain!["up", "down"].Should().Be(0.1);
        faults.Should().BeEmpty();
    }

    [Fact]
    public void Trying_gives_the_faults_and_no_chain()
    {
        Chain.TryFromMatrix(UpDown, new[,] { { 0.9, 0.2 }, { -0.5, 1.5 } }, out var chain, out var faults).Should().BeFalse();

        chain.Should().BeNull();
        faults.Select(fault => fault.Kind).Should().Equal(ChainFaultKind.RowSum, ChainFaultKind.Negative, ChainFaultKind.AboveOne);
    }

    [Fact]
    public void Trying_honours_the_options()
    {
        var options = new ChainOptions<string> { RowSums = RowSums.Rescale(0.2) };

        Chain.TryFromMatrix(UpDown, new[,] { { 0.9, 0.2 }, { 0.5, 0.5 } }, options, out var chain, out _).Should().BeTrue();

        chain!.RescaledRows.Should().ContainSingle();
    }

    [Fact]
    public void A_chain_of_one_state_stays_in_it()
    {
        var chain = Chain.FromMatrix(new[,] { { 1.0 } });

        chain.StateCount.Should().Be(1);
        chain[0, 0].Should().Be(1);
    }

    [Fact]
    public void Missing_arguments_are_refused()
    {
        var matrix = DenseMatrix.OfArray(Table);
        FluentActions.Invoking(() => Chain.FromMatrix((double[,])null!)).Should().Throw<ArgumentNullException>().WithParameterName("matrix");
        FluentActions.Invoking(() => Chain.FromMatrix((Matrix<double>)null!)).Should().Throw<ArgumentNullException>().WithParameterName("matrix");
        FluentActions.Invoking(() => Chain.FromMatrix(Table, null!)).Should().Throw<ArgumentNullException>().WithParameterName("options");
        FluentActions.Invoking(() => Chain.FromMatrix<string>(null!, Table)).Should().Throw<ArgumentNullException>().WithParameterName("states");
        FluentActions.Invoking(() => Chain.FromMatrix<string>(null!, matrix)).Should().Throw<ArgumentNullException>().WithParameterName("states");
        FluentActions.Invoking(() => Chain.FromMatrix(UpDown, (double[,])null!)).Should().Throw<ArgumentNullException>().WithParameterName("matrix");
        FluentActions.Invoking(() => Chain.FromMatrix(UpDown, (Matrix<double>)null!)).Should().Throw<ArgumentNullException>().WithParameterName("matrix");
        FluentActions.Invoking(() => Chain.FromMatrix(UpDown, Table, null!)).Should().Throw<ArgumentNullException>().WithParameterName("options");
        FluentActions.Invoking(() => Chain.FromMatrix(UpDown, matrix, null!)).Should().Throw<ArgumentNullException>().WithParameterName("options");
        FluentActions.Invoking(() => Chain.TryFromMatrix(UpDown, null!, out _, out _)).Should().Throw<ArgumentNullException>().WithParameterName("matrix");
    }
}
