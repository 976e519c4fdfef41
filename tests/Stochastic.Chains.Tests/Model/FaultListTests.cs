using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Model;

public class FaultListTests
{
    [Fact]
    public void All_faults_of_a_matrix_are_in_one_exception()
    {
        double[,] matrix =
        {
            { 0.5, 0.25, 0, 0 },
            { 0, 0, 0, 0 },
            { double.NaN, -0.5, 1.75, 0 },
            { 0, 0, 0, 1 },
        };

        var refusal = Refusal.Of(() => Chain.FromMatrix(["a", "b", "c", "d"], matrix));

        refusal.Faults.Select(fault => (fault.Kind, fault.States[0])).Should().Equal(
            (ChainFaultKind.RowSum, "a"),
            (ChainFaultKind.EmptyRow, "b"),
            (ChainFaultKind.NotFinite, "c"),
            (ChainFaultKind.Negative, "c"),
            (ChainFaultKind.AboveOne, "c"));
        refusal.FaultCount.Should().Be(5);
        refusal.Message.Should().StartWith("The chain is not valid (5 faults):");
        foreach (var fault in refusal.Faults)
        {
            refusal.Message.Should().Contain("- " + fault.Message);
        }
    }

    [Theory]
    [InlineData("table")]
    [InlineData("dense")]
    [InlineData("sparse")]
    public void Faults_of_the_states_and_of_the_rows_are_in_one_exception(string kind)
    {
        double[,] table = { { 0.5, 0.25, 0 }, { 0, 1, 0 }, { 1.5, 0, -0.5 } };
        string[] states = ["a", "a", null!];

        var refusal = Refusal.Of(() => kind switch
        {
            "table" => Chain.FromMatrix(states, table),
            "dense" => Chain.FromMatrix(states, Matrix<double>.Build.DenseOfArray(table)),
            _ => Chain.FromMatrix(states, Matrix<double>.Build.SparseOfArray(table)),
        });

        refusal.Faults.Select(fault => fault.Kind).Should().Equal(
            ChainFaultKind.DuplicateState, ChainFaultKind.NullState, ChainFaultKind.RowSum, ChainFaultKind.AboveOne, ChainFaultKind.Negative);
        refusal.Faults[^1].States.Should().Equal("null", "null");
    }

    [Fact]
    public void An_invalid_chain_is_an_argument_exception()
    {
        FluentActions.Invoking(() => Chain.FromMatrix(new double[1, 1])).Should().Throw<ArgumentException>();
    }

    [Theory]
    [InlineData(20, false)]
    [InlineData(21, true)]
    [InlineData(1000, true)]
    public void The_message_spells_out_twenty_faults_and_counts_the_rest(int faults, bool isCut)
    {
        var refusal = Refusal.Of(() => Chain.FromTransitions(Halves(faults)));

        refusal.FaultCount.Should().Be(faults);
        refusal.Faults.Should().HaveCount(faults);
        var lines = refusal.Message.Split(Environment.NewLine);
        lines.Should().HaveCount(isCut ? 22 : 21);
        lines[20].Should().Contain("'19'");
        if (isCut)
        {
            lines[21].Should().Be($"- … and {faults - 20} more.");
        }
    }

    [Fact]
    public void A_thousand_faults_are_all_listed()
    {
        var refusal = Refusal.Of(() => Chain.FromTransitions(Halves(InvalidChainException.MaxListedFaults)));

        refusal.Faults.Should().HaveCount(1000).And.OnlyContain(fault => fault.Kind == ChainFaultKind.RowSum);
    }

    [Theory]
    [InlineData(1001, "1 more fault is not listed. Correct those above and try again.")]
    [InlineData(5000, "4,000 more faults are not listed. Correct those above and try again.")]
    public void Beyond_a_thousand_a_last_entry_counts_the_rest(int faults, string sentence)
    {
        Chain.TryFromTransitions(Halves(faults), out _, out var listed).Should().BeFalse();
        var refusal = Refusal.Of(() => Chain.FromTransitions(Halves(faults)));

        refusal.Faults.Should().HaveCount(1001);
        refusal.FaultCount.Should().Be(faults);
        refusal.Faults.Take(1000).Should().OnlyContain(fault => fault.Kind == ChainFaultKind.RowSum);
        refusal.Faults[^1].Kind.Should().Be(ChainFaultKind.Unlisted);
        refusal.Faults[^1].Value.Should().Be(faults - 1000);
        refusal.Faults[^1].States.Should().BeEmpty();
        refusal.Faults[^1].Message.Should().Be(sentence);
        listed.Select(fault => fault.Message).Should().Equal(refusal.Faults.Select(fault => fault.Message));
        refusal.Message.Should().Contain($"({faults:N0} faults)".Replace(".", ",", StringComparison.Ordinal));
    }

    private static IEnumerable<Transition<int>> Halves(int count) => Enumerable.Range(0, count).Select(k => new Transition<int>(k, k, 0.5));
}
