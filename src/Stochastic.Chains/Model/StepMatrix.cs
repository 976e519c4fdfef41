using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>
/// The matrix that a step multiplies with: the off-diagonal probabilities as given; where a stay was given, max(0, 1 − their sum) on
/// the diagonal, else nothing; each row divided by its sum. Made once for a chain and kept with it.
/// </summary>
internal sealed class StepMatrix
{
    private const double SumErrorUnit = 4.4408920985006262e-16;

    private readonly TransitionMatrix _matrix;
    private readonly double[] _stays;
    private readonly double[] _sums;

    internal StepMatrix(TransitionMatrix matrix)
    {
        _matrix = matrix;
        _stays = new double[matrix.Size];
        _sums = new double[matrix.Size];
        SmallestProbability = double.PositiveInfinity;
        var indegrees = new int[matrix.Size];
        for (var row = 0; row < matrix.Size; row++)
        {
            ReadRow(row, indegrees);
        }

        LargestIndegree = indegrees.Max();
    }

    /// <summary>The number of states.</summary>
    internal int Size => _sums.Length;

    /// <summary>The largest number of moves, stays included, that lead into one state.</summary>
    internal int LargestIndegree { get; }

    /// <summary>
    /// The largest relative error of a stay, in units of 2⁻⁵³: one minus a compensated sum of k terms is off by at most 2⁻⁵³ of
    /// itself and k² · 2⁻¹⁰⁴, which matters where the stay is tiny.
    /// </summary>
    internal double StayRoundings { get; private set; } = 1;

    /// <summary>The smallest positive probability of a step.</summary>
    internal double SmallestProbability { get; private set; }

    /// <summary>The probability that a step stays in a state, before its row is divided by its sum.</summary>
    internal double Stay(int state) => _stays[state];

    /// <summary>Multiplies a distribution with the chain: target = source · P. Rows of probability zero are skipped.</summary>
    internal void Multiply(ReadOnlySpan<double> source, Span<double> target)
    {
        target.Clear();
        for (var row = 0; row < source.Length; row++)
        {
            if (source[row] == 0)
            {
                continue;
            }

            var weight = source[row] / _sums[row];
            var stayed = Math.FusedMultiplyAdd(weight, _stays[row], target[row]);
            _matrix.AddScaledRow(row, weight, target);
            target[row] = stayed;
        }
    }

    private void ReadRow(int row, int[] indegrees)
    {
        var off = default(CompensatedSum);
        var rest = default(CompensatedSum);
        rest.Add(1);
        var canStay = false;
        var terms = 1.0;
        foreach (var (column, probability) in _matrix.Row(row))
        {
            indegrees[column]++;
            if (column == row)
            {
                canStay = true;
                continue;
            }

            terms++;
            off.Add(probability);
            rest.Add(-probability);
            SmallestProbability = Math.Min(SmallestProbability, probability);
        }

        _stays[row] = canStay ? Math.Max(0, rest.Value) : 0;
        off.Add(_stays[row]);
        _sums[row] = off.Value;
        if (_stays[row] > 0)
        {
            SmallestProbability = Math.Min(SmallestProbability, _stays[row]);
            StayRoundings = Math.Max(StayRoundings, 1 + (terms * terms * SumErrorUnit / _stays[row]));
        }
    }
}
