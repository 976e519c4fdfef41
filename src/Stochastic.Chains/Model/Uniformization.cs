using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>
/// Turns rates per unit of time into probabilities per step: with a uniformization rate Λ above every state's total rate, a step
/// moves with probability rate / Λ and stays otherwise (Jensen 1953). Λ is taken as a power of two, so the division is exact and the
/// off-diagonal data lose nothing.
/// </summary>
internal static class Uniformization<TState>
    where TState : notnull
{
    /// <summary>The largest total above which no power of two is left: just below 2¹⁰²³.</summary>
    private const double LargestTotal = double.MaxValue / 2;

    internal static (CompressedRows Rows, double Rate)? Apply(StateSpace<TState> states, CompressedRows rates, FaultCollector faults)
    {
        var totals = new double[states.Count];
        for (var row = 0; row < states.Count; row++)
        {
            totals[row] = CheckedTotal(states, row, rates, faults);
        }

        if (faults.HasFaults)
        {
            return null;
        }

        var rate = PowerOfTwoAbove(totals.Max());
        var moves = new TripletList();
        for (var row = 0; row < states.Count; row++)
        {
            AddRow(states, row, rates, totals[row], rate, moves, faults);
        }

        return faults.HasFaults ? null : (moves.ToCompressedRows(states.Count), rate);
    }

    private static double CheckedTotal(StateSpace<TState> states, int row, CompressedRows rates, FaultCollector faults)
    {
        var from = states[row];
        var columns = rates.RowColumns(row);
        var values = rates.RowValues(row);
        for (var k = 0; k < columns.Length; k++)
        {
            var to = states[columns[k]];
            if (!double.IsFinite(values[k]))
            {
                faults.Add(ChainFaultKind.NotFinite, [from, to], values[k], Messages.RateNotFinite(from, to, values[k]));
            }
            else if (values[k] < 0)
            {
                faults.Add(ChainFaultKind.Negative, [from, to], values[k], Messages.NegativeRate(from, to, values[k]));
            }
            else if (columns[k] == row)
            {
                faults.Add(ChainFaultKind.SelfRate, [from], values[k], Messages.SelfRate(from, values[k]));
            }

            if (k > 0 && columns[k] == columns[k - 1])
            {
                faults.Add(ChainFaultKind.DuplicateTransition, [from, to], values[k], Messages.DuplicateTransition(from, to));
            }
        }

        var total = CompensatedSum.Of(values);
        if (total > LargestTotal && !values.Contains(double.PositiveInfinity))
        {
            faults.Add(ChainFaultKind.RateOutOfRange, [from], total, Messages.RatesTooLarge(from, total));
        }

        return total;
    }

    private static void AddRow(StateSpace<TState> states, int row, CompressedRows rates, double total, double rate, TripletList moves, FaultCollector faults)
    {
        var columns = rates.RowColumns(row);
        var values = rates.RowValues(row);
        for (var k = 0; k < columns.Length; k++)
        {
            var probability = values[k] / rate;
            if (!double.IsNormal(probability))
            {
                var to = states[columns[k]];
                faults.Add(ChainFaultKind.RateOutOfRange, [states[row], to], values[k], Messages.RateTooSmall(states[row], to, values[k], rate));
            }

            moves.Add(row, columns[k], probability);
        }

        moves.Add(row, row, 1 - (total / rate));
    }

    /// <summary>The smallest power of two above a total rate, so that every state keeps a chance to stay; 1 when nothing moves.</summary>
    private static double PowerOfTwoAbove(double largest) =>
        largest == 0 ? 1 : Math.ScaleB(1, Math.ILogB(largest) + 1);
}
