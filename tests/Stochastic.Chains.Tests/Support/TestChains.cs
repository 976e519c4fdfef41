using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Support;

/// <summary>Chains of the library from the inputs of the tests, in either storage.</summary>
internal static class TestChains
{
    public static Chain<int> ToChain(this PublishedChain published) => published.UniformizationRate is null
        ? published.ToStepChain()
        : Chain.FromRates(published.Rates.Select(move => new TransitionRate<int>(move.From, move.To, move.Rate.ToDouble())));

    public static Chain<int> ToStepChain(this PublishedChain published) =>
        Chain.FromTransitions(Enumerable.Range(0, published.StateCount), published.Transitions.Select(ToTransition));

    public static Chain<int> ToChain(this SampleChain sample) =>
        Chain.FromTransitions(Enumerable.Range(0, sample.StateCount), sample.Transitions.Select(ToTransition));

    /// <summary>The same chain with its probabilities held as compressed sparse rows, whatever the density rule says.</summary>
    public static Chain<TState> AsSparse<TState>(this Chain<TState> chain)
        where TState : notnull
    {
        var moves = new TripletList();
        foreach (var (from, to, probability) in chain.Transitions)
        {
            moves.Add(chain.States.IndexOf(from), chain.States.IndexOf(to), probability);
        }

        return new Chain<TState>(chain.States, TransitionMatrix.FromSparse(moves.ToCompressedRows(chain.StateCount)), [], chain.UniformizationRate);
    }

    private static Transition<int> ToTransition((int From, int To, double Probability) move) => new(move.From, move.To, move.Probability);
}
