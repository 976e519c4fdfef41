using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>The distribution of the number of steps until a target is first reached, and its quantiles.</summary>
internal static class PassageTimes<TState>
    where TState : notnull
{
    private const int FirstLook = 16;
    private const int NumbersPerStep = 3;
    private const int StepsBetweenReports = 1 << 10;

    /// <summary>Doubling multiplies tables; it is worth it once so many steps have cost as much as so many multiplications.</summary>
    private const double Multiplications = 20;

    internal static PassageTimeDistribution<TState> Distribution(Chain<TState> chain, SurvivorSteps survivors, TState from, int maxSteps, SolveOptions options)
    {
        options.RequireMemory(chain.StateCount, NumbersPerStep * sizeof(double) * (long)maxSteps);
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

        var staysInRange = Continue(survivors, factor, step, exactly, within, beyond, options.CancellationToken) && survivors.StaysInRange;
        return new(from, chain.States, exactly, within, beyond, Certify(survivors, made, staysInRange, within, beyond, options));
    }

    /// <summary>The smallest number of steps within which the target is reached with at least a probability.</summary>
    /// <param name="powers">Makes the tables of doubling when so many steps are needed that they pay.</param>
    /// <param name="survivors">At the start.</param>
    /// <param name="question">The probability, and whether arriving is certain.</param>
    /// <param name="start">The position of the start among those on the way; −1 in the target.</param>
    /// <param name="onTheWay">The number of states on the way.</param>
    /// <param name="transitions">The number of transitions of the chain.</param>
    /// <param name="options">Cancellation, progress and memory.</param>
    internal static double Quantile(
        Func<StoppedPowers> powers, SurvivorSteps survivors, QuantileQuestion question, int start, int onTheWay, long transitions, SolveOptions options)
    {
        var report = options.Report("steps");
        var mostSteps = Math.Max(1 << 14, Multiplications * onTheWay * onTheWay * onTheWay / Math.Max(transitions, 1));
        for (var step = 0L; ; step++)
        {
            if (question.IsReached(survivors.Arrived, survivors.OnTheWay))
            {
                return step;
            }

            // A probability as large as that of ever arriving is reached only where all arrive within as many steps as there are states.
            if (survivors.OnTheWay == 0 || (question.IsLimit && step > onTheWay))
            {
                return double.PositiveInfinity;
            }

            if (step >= mostSteps)
            {
                using var doubled = powers();
                return doubled.Quantile(start, question, options.CancellationToken);
            }

            options.CancellationToken.ThrowIfCancellationRequested();
            survivors.Step();
            if (step % StepsBetweenReports == 0)
            {
                report?.Invoke(survivors.Arrived / question.Probability);
            }
        }
    }

    /// <summary>Fills in the steps that were not made; false when a number left the range in which it rounds once.</summary>
    private static bool Continue(
        SurvivorSteps survivors, double factor, int from, double[] exactly, double[] within, double[] beyond, CancellationToken cancellation)
    {
        var staysInRange = true;
        var (arriving, losing, onTheWay) = (survivors.ArrivedNow, survivors.LostNow, survivors.OnTheWay);
        var (arrived, lost) = (default(CompensatedSum), default(CompensatedSum));
        arrived.Add(survivors.Arrived);
        lost.Add(survivors.Lost);
        for (var step = from + 1; step < exactly.Length; step++)
        {
            if (step % StepsBetweenReports == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            staysInRange = Shrink(ref arriving, factor) & Shrink(ref losing, factor) & Shrink(ref onTheWay, factor) & staysInRange;
            arrived.Add(arriving);
            lost.Add(losing);
            (exactly[step], within[step], beyond[step]) = (arriving, arrived.Value, onTheWay + lost.Value);
        }

        return staysInRange;
    }

    /// <summary>Multiplies by the factor; false where the product is not normal, though a zero times anything and anything times no one left are exact.</summary>
    private static bool Shrink(ref double value, double factor)
    {
        var before = value;
        value *= factor;
        return before == 0 || factor == 0 || value >= NormalRange.Smallest;
    }

    private static Certificate Certify(SurvivorSteps survivors, int made, bool staysInRange, double[] within, double[] beyond, SolveOptions options)
    {
        var steps = within.Length - 1;
        var continued = steps > made;
        var relative = SubtractionFreeBound.OfRoundings(steps * survivors.RoundingsOfStep * (continued ? 4 : 1));
        var isProof = options.CertificateLevel == CertificateLevel.Proof && double.IsFinite(relative);
        var lost = staysInRange ? 0 : (double)steps * within.Length * NormalRange.Smallest;
        return new Certificate
        {
            Method = "propagation",
            Reason = continued
                ? "Step by step until every state shrank by the same factor but for rounding, which then holds for all further steps."
                : "Step by step; what arrives is added up, nothing is subtracted.",
            Residual = options.CertificateLevel >= CertificateLevel.Residual ? Math.Abs(within[^1] + beyond[^1] - 1) : double.PositiveInfinity,
            RelativeErrorBound = isProof && staysInRange ? relative : double.PositiveInfinity,
            AbsoluteErrorBound = isProof ? AbsoluteBound.From(relative, 1) + lost : double.PositiveInfinity,
            Basis = isProof ? ErrorBasis.SubtractionFree : ErrorBasis.None,
            IsProof = isProof,
            Iterations = made,
        };
    }
}
