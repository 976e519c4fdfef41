using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>Makes a chain over some of the states of another one.</summary>
internal static class ReducedChain<TState>
    where TState : notnull
{
    internal static Chain<TState> Without(Chain<TState> chain, bool[] leftOut)
    {
        int[] kept = [.. Enumerable.Range(0, leftOut.Length).Where(state => !leftOut[state])];
        if (kept.Length == 0)
        {
            throw new ChainStructureException(Messages.NothingLeft, []);
        }

        var moves = new TripletList();
        var rescaled = new List<RescaledRow<TState>>();
        var position = PositionsOf(kept, leftOut.Length);
        foreach (var from in kept)
        {
            AddRow(chain, from, position, moves, rescaled);
        }

        return Over(chain, kept, moves, [.. rescaled]);
    }

    /// <summary>A chain over kept states, in their order, from moves between their positions.</summary>
    internal static Chain<TState> Over(Chain<TState> chain, int[] kept, TripletList moves, IReadOnlyList<RescaledRow<TState>> rescaled) => new(
        StateSpace.Of(kept.Select(state => chain.States[state]), chain.States.Comparer),
        TransitionMatrix.FromCompressedRows(moves.ToCompressedRows(kept.Length)),
        rescaled,
        chain.UniformizationRate);

    /// <summary>The position of each state among those kept; −1 for the others.</summary>
    internal static int[] PositionsOf(int[] kept, int count)
    {
        var positions = new int[count];
        positions.AsSpan().Fill(-1);
        for (var position = 0; position < kept.Length; position++)
        {
            positions[kept[position]] = position;
        }

        return positions;
    }

    private static void AddRow(Chain<TState> chain, int from, int[] position, TripletList moves, List<RescaledRow<TState>> rescaled)
    {
        var (sum, gone) = (default(CompensatedSum), false);
        foreach (var (to, probability) in chain.Matrix.Row(from))
        {
            sum.Add(position[to] >= 0 ? probability : 0);
            gone |= position[to] < 0;
        }

        if (chain.UniformizationRate is not null)
        {
            AddRates(chain, from, position, moves);
            return;
        }

        if (sum.Value == 0)
        {
            throw new ChainStructureException(Messages.OnlyMovesOut(chain.States[from]), [chain.States[from]]);
        }

        var divisor = gone ? sum.Value : 1;
        foreach (var (to, probability) in chain.Matrix.Row(from))
        {
            if (position[to] >= 0)
            {
                moves.Add(position[from], position[to], probability / divisor);
            }
        }

        if (gone)
        {
            rescaled.Add(new RescaledRow<TState>(chain.States[from], sum.Value));
        }
        else
        {
            rescaled.AddRange(chain.RescaledRows.Where(row => chain.States.Require(row.State) == from));
        }
    }

    /// <summary>Rates stay as they are; what led out becomes a stay.</summary>
    private static void AddRates(Chain<TState> chain, int from, int[] position, TripletList moves)
    {
        var rest = default(CompensatedSum);
        rest.Add(1);
        foreach (var (to, probability) in chain.Matrix.Row(from))
        {
            if (to != from && position[to] >= 0)
            {
                rest.Add(-probability);
                moves.Add(position[from], position[to], probability);
            }
        }

        moves.Add(position[from], position[from], rest.Value);
    }
}
