using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>Makes a chain from another one by changing rows.</summary>
internal static class ChangedRows<TState>
    where TState : notnull
{
    /// <summary>Copies a chain; a row that comes out different is no longer listed as rescaled.</summary>
    /// <param name="chain">The chain to copy.</param>
    /// <param name="change">Given a state and its moves by column, changes the moves; zeros are left out.</param>
    internal static Chain<TState> Of(Chain<TState> chain, Action<int, SortedDictionary<int, double>> change)
    {
        var moves = new TripletList();
        var isChanged = new bool[chain.StateCount];
        for (var from = 0; from < chain.StateCount; from++)
        {
            var row = new SortedDictionary<int, double>();
            foreach (var (to, probability) in chain.Matrix.Row(from))
            {
                row[to] = probability;
            }

            var before = row.ToArray();
            change(from, row);
            isChanged[from] = !before.AsSpan().SequenceEqual(row.ToArray());
            foreach (var (to, probability) in row)
            {
                if (probability != 0)
                {
                    moves.Add(from, to, probability);
                }
            }
        }

        var rescaled = chain.RescaledRows.Where(row => !isChanged[chain.States.Require(row.State)]);
        return new Chain<TState>(
            chain.States, TransitionMatrix.FromCompressedRows(moves.ToCompressedRows(isChanged.Length)), [.. rescaled], chain.UniformizationRate);
    }
}
