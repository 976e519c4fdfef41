using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>Takes every state by itself through a number of steps, and divides each row by its sum at the end.</summary>
internal sealed class PropagatedRows(StepMatrix matrix, int size, long steps, SolveOptions options)
{
    /// <summary>Beside the additions of a step: the row sum, the division by it, the stay, and the product.</summary>
    private const int RoundingsPerStep = 8;

    private const double SecondOrder = 1.01;
    private const int RowsPerPiece = 16;

    private readonly double[] _corrections = new double[size];
    private readonly bool[] _leavesRange = new bool[size];

    internal double[] Run(Action<double>? report)
    {
        var values = new double[size * size];
        var sharing = new WorkSharing(options.Parallelism, options.CancellationToken);
        var pieces = (size + RowsPerPiece - 1) / RowsPerPiece;
        var done = 0;
        sharing.Run(pieces, piece =>
        {
            var spare = new double[size];
            for (var row = piece * RowsPerPiece; row < Math.Min(size, (piece + 1) * RowsPerPiece); row++)
            {
                Propagate(row, values.AsSpan(row * size, size), spare);
            }

            report?.Invoke((double)Interlocked.Increment(ref done) / pieces);
        });
        return values;
    }

    /// <summary>
    /// Each step adds a fixed number of roundings to every entry; what fell below the normal range leaves an absolute bound only. The
    /// division of a row changes it by its sum, as measured, and one rounding.
    /// </summary>
    internal NStepBounds Bounds(double[] values)
    {
        var roundings = ((double)steps * (matrix.LargestIndegree + matrix.StayRoundings + RoundingsPerStep)) + 1;
        var relative = SubtractionFreeBound.OfRoundings(roundings) + (SecondOrder * _corrections.Max());
        if (!double.IsFinite(relative))
        {
            return NStepBounds.None;
        }

        var absolute = relative * values.Max();
        return _leavesRange.Contains(true)
            ? new NStepBounds(double.PositiveInfinity, absolute + (2.0 * steps * size * double.Epsilon), ErrorBasis.SubtractionFree)
            : new NStepBounds(relative, absolute, ErrorBasis.SubtractionFree);
    }

    private void Propagate(int start, Span<double> row, double[] spare)
    {
        Span<double> current = row;
        Span<double> next = spare;
        current[start] = 1;
        for (var step = 0L; step < steps; step++)
        {
            options.CancellationToken.ThrowIfCancellationRequested();
            _leavesRange[start] |= NormalRange.SmallestNonzero(current) * matrix.SmallestProbability < NormalRange.Smallest;
            matrix.Multiply(current, next);
            if (current.SequenceEqual(next))
            {
                break; // the same numbers give the same numbers: nothing changes any more
            }

            var swapped = current;
            current = next;
            next = swapped;
        }

        var sum = VectorLoops.Sum(current);
        _corrections[start] = Math.Abs(sum - 1);
        VectorLoops.Divide(current, sum, row);
    }
}
