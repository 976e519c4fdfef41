using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>Which transient states are surely passed on the way from a transient state to the end.</summary>
internal sealed class SureWays
{
    private readonly int[] _next;

    private SureWays(int[] next) => _next = next;

    /// <summary>Whether there is any such pair of states.</summary>
    internal bool HasAny => Array.Exists(_next, next => next < _next.Length - 1);

    /// <summary>The ways among the transient states, numbered in the order given. A few passes over their transitions.</summary>
    internal static SureWays Among(TransitionMatrix matrix, int[] transient)
    {
        var numberOf = new int[matrix.Size];
        Array.Fill(numberOf, transient.Length);
        for (var k = 0; k < transient.Length; k++)
        {
            numberOf[transient[k]] = k;
        }

        var starts = new List<int> { 0 };
        var targets = new List<int>();
        foreach (var state in transient)
        {
            foreach (var (to, _) in matrix.Row(state))
            {
                targets.Add(numberOf[to]);
            }

            starts.Add(targets.Count);
        }

        starts.Add(targets.Count);
        var moves = new SparseGraph([.. starts], [.. targets]);
        return new SureWays(Dominators.Immediate(default(ReversedGraph).Run(moves), moves, transient.Length));
    }

    /// <summary>The states that are surely passed after a state, one after the other.</summary>
    internal IEnumerable<int> After(int state)
    {
        for (var next = _next[state]; next < _next.Length - 1; next = _next[next])
        {
            yield return next;
        }
    }
}
