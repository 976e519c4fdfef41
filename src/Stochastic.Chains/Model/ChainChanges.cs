using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>Chains made from other chains. The old one stays as it is; labels and the unit of time are kept.</summary>
public static class ChainChanges
{
    /// <summary>Makes a chain in which some states are never left once they are entered.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain to start from.</param>
    /// <param name="states">The states to end in.</param>
    /// <returns>A chain with the same moves from all other states; from these only the stay.</returns>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <remarks>
    /// What has arrived by a certain time, without counting anything twice, is then the share that stands in these states. O(transitions).
    /// </remarks>
    /// <example>
    /// <code>double failedWithinAYear = pump.MakeAbsorbing("failed").StartingIn("new").After(52)["failed"];</code>
    /// </example>
    public static Chain<TState> MakeAbsorbing<TState>(this Chain<TState> chain, params IEnumerable<TState> states)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(states);
        var ends = new bool[chain.StateCount];
        foreach (var state in states)
        {
            ends[chain.States.Require(state)] = true;
        }

        var moves = new TripletList();
        for (var from = 0; from < ends.Length; from++)
        {
            if (ends[from])
            {
                moves.Add(from, from, 1);
                continue;
            }

            foreach (var (to, probability) in chain.Matrix.Row(from))
            {
                moves.Add(from, to, probability);
            }
        }

        var rescaled = chain.RescaledRows.Where(row => !ends[chain.States.Require(row.State)]);
        return new Chain<TState>(
            chain.States, TransitionMatrix.FromCompressedRows(moves.ToCompressedRows(ends.Length)), [.. rescaled], chain.UniformizationRate);
    }
}
