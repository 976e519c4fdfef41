using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Sensitivity;

/// <summary>The changes of a chain's probabilities by position, checked: finite, rows summing to zero, nothing pushed below zero.</summary>
internal sealed class Direction
{
    private const double Rounding = 1e-12;

    private readonly SortedDictionary<int, List<(int Column, double Rate)>> _rows = [];

    private Direction()
    {
    }

    internal IEnumerable<(int Row, List<(int Column, double Rate)> Changes)> Rows => _rows.Select(row => (row.Key, row.Value));

    /// <exception cref="ArgumentException">The changes are not a direction of this chain.</exception>
    internal static Direction Of<TState>(Chain<TState> chain, IEnumerable<ProbabilityChange<TState>> changes)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(changes);
        var direction = new Direction();
        foreach (var change in changes)
        {
            var (row, column) = (chain.States.Require(change.From), chain.States.Require(change.To));
            if (!double.IsFinite(change.Rate))
            {
                throw new ArgumentException(Messages.ChangeNotFinite(change.From, change.To, change.Rate), nameof(changes));
            }

            if (change.Rate < 0 && chain.Matrix[row, column] == 0)
            {
                throw new ArgumentException(Messages.ChangeBelowZero(change.From, change.To, change.Rate), nameof(changes));
            }

            if (!direction._rows.TryGetValue(row, out var entries))
            {
                direction._rows[row] = entries = [];
            }

            entries.Add((column, change.Rate));
        }

        foreach (var (row, entries) in direction.Rows)
        {
            var (sum, size) = (default(CompensatedSum), 0.0);
            foreach (var (_, rate) in entries)
            {
                sum.Add(rate);
                size += Math.Abs(rate);
            }

            if (Math.Abs(sum.Value) > Rounding * size)
            {
                throw new ArgumentException(Messages.ChangesDoNotCancel(chain.States[row], sum.Value), nameof(changes));
            }
        }

        return direction;
    }

    /// <summary>For each changed row the change of the mean of a figure over its next states.</summary>
    internal IEnumerable<(int Row, double Change)> MeanChanges(Func<int, double> figure)
    {
        foreach (var (row, entries) in Rows)
        {
            var sum = default(CompensatedSum);
            foreach (var (column, rate) in entries)
            {
                sum.Add(rate * figure(column));
            }

            yield return (row, sum.Value);
        }
    }
}
