using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>Takes a distribution through a number of steps, one multiplication each.</summary>
internal static class Propagation<TState>
    where TState : notnull
{
    /// <summary>Beside the additions of a step: the row sum, the division by it, the stay, and the product.</summary>
    private const int RoundingsPerStep = 8;
    private const double SmallestNormal = 2.2250738585072014e-308;
    private const int StepsBetweenReports = 1 << 10;

    internal static StepDistribution<TState> Run(ChainStart<TState> start, long steps, SolveOptions options)
    {
        var chain = start.Chain;
        var matrix = chain.Derive(static chain => new StepMatrix(chain.Matrix));
        var report = options.Report("steps");
        var current = start.Distribution.ToArray();
        var next = new double[current.Length];
        var staysInRange = true;
        var made = 0L;
        while (made < steps)
        {
            options.CancellationToken.ThrowIfCancellationRequested();
            staysInRange = staysInRange && SmallestPositive(current) * matrix.SmallestProbability >= SmallestNormal;
            matrix.Multiply(current, next);
            made++;
            if (current.AsSpan().SequenceEqual(next))
            {
                break; // the same numbers give the same numbers: nothing changes any more
            }

            (current, next) = (next, current);
            if (made % StepsBetweenReports == 0)
            {
                report?.Invoke((double)made / steps);
            }
        }

        return new StepDistribution<TState>(chain.States, current, steps, Certify(current, matrix, steps, made, staysInRange, options));
    }

    private static Certificate Certify(double[] values, StepMatrix matrix, long steps, long made, bool staysInRange, SolveOptions options)
    {
        var relative = SubtractionFreeBound.OfRoundings((double)steps * (matrix.LargestIndegree + matrix.StayRoundings + RoundingsPerStep));
        var isProof = options.CertificateLevel == CertificateLevel.Proof && double.IsFinite(relative);
        var lost = (double)steps * values.Length * double.Epsilon;
        return new Certificate
        {
            Method = "propagation",
            Reason = made < steps
                ? "One multiplication for each step; stopped early because a step changed nothing any more."
                : "One multiplication for each step; no power of the matrix is formed.",
            Residual = options.CertificateLevel >= CertificateLevel.Residual ? Math.Abs(CompensatedSum.Of(values) - 1) : double.PositiveInfinity,
            RelativeErrorBound = isProof && staysInRange ? relative : double.PositiveInfinity,
            AbsoluteErrorBound = isProof ? (relative * values.Max()) + (staysInRange ? 0 : lost) : double.PositiveInfinity,
            Basis = isProof ? ErrorBasis.SubtractionFree : ErrorBasis.None,
            IsProof = isProof,
            Iterations = made,
        };
    }

    private static double SmallestPositive(double[] values)
    {
        var smallest = double.PositiveInfinity;
        foreach (var value in values)
        {
            if (value > 0 && value < smallest)
            {
                smallest = value;
            }
        }

        return smallest;
    }
}
