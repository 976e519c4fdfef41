using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>Checks rows of probabilities one by one, rescales those that the options allow, and gathers the faults.</summary>
/// <param name="states">The labels as given: they only name what is wrong, so they may themselves be null or repeated.</param>
/// <param name="rowSums">What is done with a sum that is not one.</param>
/// <param name="faults">Takes the faults.</param>
internal sealed class RowValidator<TState>(IReadOnlyList<TState> states, RowSums rowSums, FaultCollector faults)
    where TState : notnull
{
    private readonly List<RescaledRow<TState>> _rescaled = [];

    internal IReadOnlyList<RescaledRow<TState>> Rescaled => _rescaled.AsReadOnly();

    /// <summary>Checks every row in turn.</summary>
    /// <param name="rows">The nonzero entries; rescaled in place where that is allowed.</param>
    /// <param name="refused">What was given to labels that are faults themselves: it counts, so that one wrong label is one fault.</param>
    internal void CheckAll(CompressedRows rows, IReadOnlyDictionary<int, double> refused)
    {
        for (var row = 0; row < rows.RowCount; row++)
        {
            Check(row, rows.RowColumns(row), rows.RowValues(row), refused.GetValueOrDefault(row));
        }
    }

    /// <summary>Checks the nonzero entries of a row, columns ascending; divides the values by their sum where that is allowed.</summary>
    internal void Check(int row, ReadOnlySpan<int> columns, Span<double> values, double refused)
    {
        var from = states[row];
        if (columns.IsEmpty && refused == 0)
        {
            faults.Add(ChainFaultKind.EmptyRow, [from], 0, Messages.EmptyRow(from));
            return;
        }

        var tolerance = RowSums.Tolerance(columns.Length + (refused == 0 ? 0 : 1));
        var allowed = tolerance + rowSums.MaxDeviation; // 1.1 − 1 is above 0.1 in doubles
        var sum = default(CompensatedSum);
        sum.Add(refused);
        for (var k = 0; k < columns.Length; k++)
        {
            CheckEntry(row, columns[k], values[k], 1 + allowed);
            if (k > 0 && columns[k] == columns[k - 1])
            {
                var to = states[columns[k]];
                faults.Add(ChainFaultKind.DuplicateTransition, [from, to], values[k], Messages.DuplicateTransition(from, to));
            }

            sum.Add(values[k]);
        }

        CheckSum(from, sum.Value, tolerance, allowed, values);
    }

    private void CheckEntry(int row, int column, double value, double largest)
    {
        if (value >= 0 && value <= largest)
        {
            return;
        }

        var (from, to) = (states[row], states[column]);
        if (!double.IsFinite(value))
        {
            faults.Add(ChainFaultKind.NotFinite, [from, to], value, Messages.NotFinite(from, to, value));
        }
        else if (value < 0)
        {
            faults.Add(ChainFaultKind.Negative, [from, to], value, Messages.Negative(from, to, value));
        }
        else
        {
            faults.Add(ChainFaultKind.AboveOne, [from, to], value, Messages.AboveOne(from, to, value));
        }
    }

    private void CheckSum(TState from, double sum, double tolerance, double allowed, Span<double> values)
    {
        if (!double.IsFinite(sum))
        {
            return; // an entry that is not finite has been reported, and the sum says nothing more
        }

        var deviation = Math.Abs(sum - 1);
        if (deviation <= tolerance)
        {
            return;
        }

        if (deviation > allowed)
        {
            faults.Add(ChainFaultKind.RowSum, [from], sum, Messages.RowSum(from, sum));
            return;
        }

        foreach (ref var value in values)
        {
            value /= sum;
        }

        _rescaled.Add(new RescaledRow<TState>(from, sum));
    }
}
