using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>Proved bounds on the relative and the absolute error of every entry of an n-step matrix, and what they rest on.</summary>
internal readonly record struct NStepBounds(double Relative, double Absolute, ErrorBasis Basis)
{
    /// <summary>Makes up for evaluating the bounds in rounded arithmetic.</summary>
    private const double Evaluation = 1.001;

    internal static NStepBounds None { get; } = new(double.PositiveInfinity, double.PositiveInfinity, ErrorBasis.None);

    internal static NStepBounds Exact { get; } = new(0, 0, ErrorBasis.Structure);

    /// <summary>Of a power by squaring: for each entry the better of the entrywise bound and that of its row.</summary>
    internal static NStepBounds Of(PowerErrors errors, ReadOnlySpan<double> values)
    {
        var size = errors.Rows.Length;
        var entrywise = Evaluation * Upward.ExponentialMinusOne(errors.Relative);
        var (relative, absolute) = (0.0, 0.0);
        for (var row = 0; row < size; row++)
        {
            var ofRow = Evaluation * errors.Rows[row];
            foreach (var value in values.Slice(row * size, size))
            {
                // While no product left the range, a zero is a move that is impossible, and exact.
                var ofEntry = double.IsFinite(entrywise) ? value * entrywise : double.PositiveInfinity;
                absolute = Math.Max(absolute, Math.Min(ofRow, ofEntry));
                relative = Math.Max(relative, ofEntry == 0 ? 0 : Math.Min(RelativeTo(value, ofRow), entrywise));
            }
        }

        return new NStepBounds(relative, Math.Min(1, absolute), relative < entrywise ? ErrorBasis.Contraction : ErrorBasis.SubtractionFree);
    }

    /// <summary>Of entries with one bound for each column; entries that are certainly zero are exact.</summary>
    internal static NStepBounds Of(ReadOnlySpan<double> columnBounds, ReadOnlySpan<double> values, Func<int, bool> isPossible, ErrorBasis basis)
    {
        var (relative, absolute) = (0.0, 0.0);
        for (var index = 0; index < values.Length; index++)
        {
            if (isPossible(index))
            {
                var bound = Evaluation * columnBounds[index % columnBounds.Length];
                absolute = Math.Max(absolute, bound);
                relative = Math.Max(relative, RelativeTo(values[index], bound));
            }
        }

        return double.IsFinite(absolute) ? new NStepBounds(relative, Math.Min(1, absolute), basis) : None;
    }

    /// <summary>The certificate of a matrix, or of rows of it, with these bounds.</summary>
    internal Certificate ToCertificate(string method, string reason, ReadOnlySpan<double> values, int states, long iterations, SolveOptions options) => new()
    {
        Method = method,
        Reason = reason,
        Residual = options.CertificateLevel >= CertificateLevel.Residual ? LargestDeviation(values, states) : double.PositiveInfinity,
        RelativeErrorBound = Relative,
        AbsoluteErrorBound = Absolute,
        Basis = Basis,
        IsProof = double.IsFinite(Absolute),
        Iterations = iterations,
    };

    private static double RelativeTo(double value, double bound) =>
        bound == 0 ? 0 : value > bound ? Upward.Divide(bound, Upward.LowerDifference(value, bound)) : double.PositiveInfinity;

    /// <summary>The largest |row sum − 1|.</summary>
    private static double LargestDeviation(ReadOnlySpan<double> values, int states)
    {
        var largest = 0.0;
        for (var start = 0; start < values.Length; start += states)
        {
            largest = Math.Max(largest, Math.Abs(CompensatedSum.Of(values.Slice(start, states)) - 1));
        }

        return largest;
    }
}
