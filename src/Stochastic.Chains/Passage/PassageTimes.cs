using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>The distribution of the number of steps until a target is first reached, and its quantiles.</summary>
internal static class PassageTimes<TState>
    where TState : notnull
{
    private const int FirstLook = 16;
    private const int StepsBetweenReports = 1 << 10;

    /// <summary>Doubling multiplies tables; it is worth it once so many steps have cost as much as so many multiplications.</summary>
    private const double Multiplications = 20;

    internal static PassageTimeDistribution<TState> Distribution(Chain<TState> chain, SurvivorSteps survivors, TState from, int maxSteps, SolveOptions options)
    {
        var report = options.Report("steps");
        var (exactly, within, beyond) = (new double[maxSteps + 1], new double[maxSteps + 1], new double[maxSteps + 1]);
        var (step, nextLook, factor, made) = (0, FirstLook, 0.0, 0);
        while (true)
        {
            (exactly[step], within[step], beyond[step]) = (survivors.ArrivedNow, survivors.Arrived, survivors.OnTheWay + survivors.Lost);
            if (step == maxSteps || (step >= nextLook && survivors.TryFindFactor(out factor)))
            {
                break;
            }

            nextLook = step >= nextLook ? 2 * nextLook : nextLook;
            options.CancellationToken.ThrowIfCancellationRequested();
            survivors.Step();
            step++;
            made = step;
            if (step % StepsBetweenReports == 0)
            {
                report?.Invoke((double)step / maxSteps);
            }
        }

        Continue(survivors, factor, step, exactly, within, beyond);
        return new(from, chain.States, exactly, within, beyond, Certify(survivors, made, within, beyond, options));
    }

    /// <summary>
    /// The smallest number of steps within which the target is reached with at least a probability that is below that of ever reaching it.
    /// </summary>
    internal static double Quantile(Func<StoppedPowers> powers, SurvivorSteps survivors, double probability, int start, int onTheWay, long transitions, SolveOptions options)
    {
        var report = options.Report("steps");
        var mostSteps = Math.Max(1 << 14, Multiplications * onTheWay * onTheWay * onTheWay / Math.Max(transitions, 1));
        for (var step = 0L; ; step++)
        {
            if (survivors.Arrived >= probability)
            {
                return step;
            }

            if (survivors.Arrived + survivors.OnTheWay < probability)
            {
                return double.PositiveInfinity;
            }

            if (step >= mostSteps)
            {
                using var doubled = powers();
                return doubled.Quantile(start, probability, options.CancellationToken);
            }

            options.CancellationToken.ThrowIfCancellationRequested();
            survivors.Step();
            if (step % StepsBetweenReports == 0)
            {
                report?.Invoke(survivors.Arrived / probability);
            }
        }
    }

    private static void Continue(SurvivorSteps survivors, double factor, int from, double[] exactly, double[] within, double[] beyond)
    {
        var (arriving, losing, onTheWay) = (survivors.ArrivedNow, survivors.LostNow, survivors.OnTheWay);
        var (arrived, lost) = (default(CompensatedSum), default(CompensatedSum));
        arrived.Add(survivors.Arrived);
        lost.Add(survivors.Lost);
        for (var step = from + 1; step < exactly.Length; step++)
        {
            arriving *= factor;
            losing *= factor;
            onTheWay *= factor;
            arrived.Add(arriving);
            lost.Add(losing);
            (exactly[step], within[step], beyond[step]) = (arriving, arrived.Value, onTheWay + lost.Value);
        }
    }

    private static Certificate Certify(SurvivorSteps survivors, int made, double[] within, double[] beyond, SolveOptions options)
    {
        var steps = within.Length - 1;
        var continued = steps > made;
        var relative = SubtractionFreeBound.OfRoundings(steps * survivors.RoundingsOfStep * (continued ? 4 : 1));
        var isProof = options.CertificateLevel == CertificateLevel.Proof && double.IsFinite(relative);
        var lost = survivors.StaysInRange ? 0 : (double)steps * within.Length * double.Epsilon;
        return new Certificate
        {
            Method = "propagation",
            Reason = continued
                ? "Step by step until every state shrank by the same factor but for rounding, which then holds for all further steps."
                : "Step by step; what arrives is added up, nothing is subtracted.",
            Residual = options.CertificateLevel >= CertificateLevel.Residual ? Math.Abs(within[^1] + beyond[^1] - 1) : double.PositiveInfinity,
            RelativeErrorBound = isProof && survivors.StaysInRange ? relative : double.PositiveInfinity,
            AbsoluteErrorBound = isProof ? AbsoluteBound.From(relative, 1) + lost : double.PositiveInfinity,
            Basis = isProof ? ErrorBasis.SubtractionFree : ErrorBasis.None,
            IsProof = isProof,
            Iterations = made,
        };
    }
}
