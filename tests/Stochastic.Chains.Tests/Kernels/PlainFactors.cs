using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

/// <summary>The factors of <see cref="GeneralReduction{TNumber}"/> in doubles, and substitution with them.</summary>
internal sealed class PlainFactors : IFactors
{
    private readonly double[] _table;
    private readonly int _columns;
    private readonly int _pivots;
    private readonly GeneralReduction<double> _reduction;

    internal PlainFactors(double[] table, int rows, int columns, int pivots)
    {
        _table = [.. table];
        _columns = columns;
        _pivots = pivots;
        _reduction = new GeneralReduction<double>(_table, rows, columns, pivots);
        _reduction.Eliminate(null, CancellationToken.None);
    }

    public bool SolveRight(Span<double> values)
    {
        _reduction.SolveRight(values);
        return IsUsable(values);
    }

    public bool SolveLeft(Span<double> values)
    {
        for (var state = 0; state < _pivots; state++)
        {
            values[state] /= _reduction.Sums[state];
            for (var later = state + 1; later < _pivots; later++)
            {
                values[later] += values[state] * _table[(state * _columns) + later];
            }
        }

        for (var state = _pivots - 1; state > 0; state--)
        {
            for (var earlier = 0; earlier < state; earlier++)
            {
                values[earlier] += values[state] * _table[(state * _columns) + earlier];
            }
        }

        return IsUsable(values);
    }

    private static bool IsUsable(ReadOnlySpan<double> values)
    {
        foreach (var value in values)
        {
            if (!(value == 0 || double.IsNormal(value)))
            {
                return false;
            }
        }

        return true;
    }
}
