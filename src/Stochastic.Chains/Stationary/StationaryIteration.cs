using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Stationary;

/// <summary>
/// Repeats a sweep over a positive vector until it settles. Stops when the largest relative change of an entry, that change summed
/// up at the rate at which changes have been shrinking, and the relative residual are all within the tolerance; or when changes
/// have reached the rounding of a double.
/// </summary>
internal static class StationaryIteration
{
    private const int Window = 16;
    private const double Rounding = 4.4408920985006262e-16;

    /// <summary>A residual that is nothing but rounding: changes that no longer shrink are then rounding too.</summary>
    private const double RoundingOfResidual = 4 * Rounding;

    internal static StationaryVector Run(StationaryProblem problem, double tolerance, int maxIterations, string reason, Action<double[]> sweep)
    {
        var current = new double[problem.StateCount];
        current.AsSpan().Fill(1.0 / current.Length);
        var previous = new double[current.Length];
        var changes = new Queue<double>();
        var report = problem.Options.Report("iterations");
        for (var made = 1; made <= maxIterations; made++)
        {
            problem.Options.CancellationToken.ThrowIfCancellationRequested();
            current.CopyTo(previous, 0);
            sweep(current);
            Normalize(current);
            var change = LargestRelativeChange(previous, current);
            report?.Invoke((double)made / maxIterations);
            var isSettled = IsSettled(changes, change, tolerance);
            var hasStalled = !isSettled && change <= tolerance && changes.Count == Window && change >= changes.Peek();
            if ((isSettled || hasStalled) && Residual(problem, current) <= (hasStalled ? RoundingOfResidual : Math.Max(tolerance, Rounding)))
            {
                return new StationaryVector(current) { HasConverged = true, Reason = reason, Iterations = made };
            }

            changes.Enqueue(change);
            if (changes.Count > Window)
            {
                changes.Dequeue();
            }
        }

        return new StationaryVector(current) { HasConverged = false, Reason = reason, Iterations = maxIterations };
    }

    /// <summary>The largest |inflow − outflow| / outflow over the states.</summary>
    internal static double Residual(StationaryProblem problem, double[] values)
    {
        var largest = 0.0;
        for (var to = 0; to < values.Length; to++)
        {
            var outflow = values[to] * problem.Outflows[to];
            largest = Math.Max(largest, Math.Abs(Inflow(problem, values, to) - outflow) / outflow);
        }

        return largest;
    }

    /// <summary>The flow into a state from all others.</summary>
    internal static double Inflow(StationaryProblem problem, double[] values, int to)
    {
        var columns = problem.Inflows.RowColumns(to);
        var rates = problem.Inflows.RowValues(to);
        var inflow = 0.0;
        for (var k = 0; k < columns.Length; k++)
        {
            inflow = Math.FusedMultiplyAdd(values[columns[k]], rates[k], inflow);
        }

        return inflow;
    }

    private static bool IsSettled(Queue<double> changes, double change, double tolerance)
    {
        if (change <= Rounding)
        {
            return true;
        }

        if (change > tolerance || changes.Count < Window)
        {
            return false;
        }

        var rate = Math.Pow(change / changes.Peek(), 1.0 / Window);
        return rate < 1 && change * rate / (1 - rate) <= tolerance;
    }

    private static void Normalize(double[] values)
    {
        var sum = CompensatedSum.Of(values);
        for (var k = 0; k < values.Length; k++)
        {
            values[k] /= sum;
        }
    }

    private static double LargestRelativeChange(double[] before, double[] after)
    {
        var largest = 0.0;
        for (var k = 0; k < after.Length; k++)
        {
            largest = Math.Max(largest, Math.Abs(after[k] - before[k]) / after[k]);
        }

        return largest;
    }
}
