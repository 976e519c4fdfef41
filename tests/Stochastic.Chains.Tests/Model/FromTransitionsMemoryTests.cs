namespace Stochastic.Chains.Tests.Model;

public class FromTransitionsMemoryTests
{
    private const int States = 100_000;
    private const int MovesPerState = 10;

    /// <summary>
    /// Everything that is allocated on the way, freed or not, is counted: more than what is held at any one time, so a bound on it
    /// bounds the peak too. The labels exist beforehand and are references, so that a debug build, which boxes what it compares
    /// with null, measures the same.
    /// </summary>
    [Fact]
    public void A_million_moves_are_read_with_less_than_four_times_the_memory_of_the_chain()
    {
        const long BytesOfMoves = 12L * States * MovesPerState;
        const long BytesOfRowStarts = 4L * (States + 1);
        const long BytesOfStates = (8L + 28L) * States; // the list, and a dictionary entry with its bucket

        var labels = Enumerable.Range(0, States).Select(k => $"s{k}").ToArray();
        Chain.FromTransitions(Moves(labels[..100])); // warm up
        var before = GC.GetAllocatedBytesForCurrentThread();
        var chain = Chain.FromTransitions(Moves(labels));
        var allocated = GC.GetAllocatedBytesForCurrentThread() - before;

        chain.TransitionCount.Should().Be(States * MovesPerState);
        chain.Storage.Should().Be(MatrixStorage.CompressedSparseRows);
        allocated.Should().BeGreaterThan(BytesOfMoves, "otherwise the measure itself is broken");
        allocated.Should().BeLessThan(4 * (BytesOfMoves + BytesOfRowStarts + BytesOfStates));
    }

    private static IEnumerable<Transition<string>> Moves(string[] labels)
    {
        for (var from = 0; from < labels.Length; from++)
        {
            for (var k = MovesPerState; k > 0; k--)
            {
                yield return new Transition<string>(labels[from], labels[(int)((from + (7919L * k)) % labels.Length)], 1.0 / MovesPerState);
            }
        }
    }
}
