using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>The quasi-stationary distribution by inverse iteration with the subtraction-free factors.</summary>
/// <remarks>
/// x · A⁻¹ has the same vector for its largest eigenvalue 1 / (1 − λ), so that x ← x · A⁻¹ · P converges to it by the factor (1 − λ) λ₂ / (1 − λ₂) λ: A⁻¹ is fast where ends
/// are rare, the step P where they are not. A⁻¹ is not negative: for any positive x the ratios (x · A⁻¹)ᵢ / xᵢ enclose that eigenvalue (Collatz 1942; Wielandt 1950).
/// </remarks>
internal static class QuasiStationarySolve<TState>
    where TState : notnull
{
    private const int MostIterations = 10_000;
    private const int MostWithoutProgress = 8;
    private const double UnitRoundoff = Refinement.UnitRoundoff;

    internal static QuasiStationaryDistribution<TState> Of(Chain<TState> chain, SolveOptions options)
    {
        var structure = chain.Structure();
        var transient = structure.Classes.Where(group => !group.IsRecurrent).ToArray();
        if (transient.Length == 0)
        {
            throw new ChainStructureException(Messages.NothingToLeave, chain.States.Take(1).Cast<object>());
        }

        if (transient.All(group => group.Period == 0))
        {
            throw new ChainStructureException(Messages.NothingStays, [transient[0].States[0]]);
        }

        var slowest = transient.Length == 1 ? transient[0] : Slowest(chain, transient, options);
        var reached = chain.Matrix.OnGraph<bool[], Reachability>(new Reachability(slowest.Members.Take(1)));
        int[] members = [.. structure.TransientPositions.Where(state => reached[state])];
        using var system = Reduce(chain, members, options);
        var isSlowest = slowest.Members.ToHashSet();
        var start = Array.ConvertAll(members, member => isSlowest.Contains(member) ? 1.0 : 0);
        var (shares, iterations, isConverged) = Iterate(system, start, options);
        var (low, high, next, error) = Enclose(system, shares);
        var values = new double[chain.StateCount];
        for (var k = 0; k < members.Length; k++)
        {
            values[members[k]] = next[k];
        }

        // Steps per visit: A is in probabilities per step, so the eigenvalue is 1 / (1 − λ) in steps.
        var decay = 2 / (low + high) * (chain.UniformizationRate ?? 1);
        var certificate = new Certificate
        {
            Method = "inverse iteration",
            Reason = "Factors free of subtraction; the rate is enclosed by ratios, the shares have no proved bound.",
            Residual = options.CertificateLevel >= CertificateLevel.Residual ? (high - low) / low : double.PositiveInfinity,
            Iterations = iterations,
        };
        return isConverged
            ? new(chain.States, values, decay, DecayBound(error, low, high, options), certificate)
            : throw new ConvergenceException(
                Messages.NotConverged(certificate.Method, iterations, (high - low) / low, Messages.SlowQuasiStationary), values, certificate, Messages.SlowQuasiStationary);
    }

    /// <summary>
    /// The class that is left most slowly. Of several that are left equally slowly the one counts into which all the others lead: what has come there
    /// outnumbers what is still before it more and more.
    /// </summary>
    private static CommunicatingClass<TState> Slowest(Chain<TState> chain, CommunicatingClass<TState>[] classes, SolveOptions options)
    {
        var stays = Array.ConvertAll(classes, group => (Class: group, Stay: StayOf(chain, group, options)));
        var longest = stays.Max(stay => stay.Stay.Low);
        var tied = stays.Where(stay => stay.Stay.High >= longest).Select(stay => stay.Class).ToArray();
        var last = tied.Where(group => tied.All(other => chain.Structure().CanReach(other.States[0], group.States[0]))).ToArray();
        return last.Length == 1
            ? last[0]
            : throw new ChainStructureException(Messages.SeveralSlowestClasses(tied[0].States[0], tied[1].States[0]), [tied[0].States[0], tied[1].States[0]]);
    }

    /// <summary>Bounds of 1 / (1 − λ) for one class by itself, with room for rounding.</summary>
    private static (double Low, double High) StayOf(Chain<TState> chain, CommunicatingClass<TState> group, SolveOptions options)
    {
        using var system = Reduce(chain, group.Members, options);
        var start = new double[group.Members.Length];
        start.AsSpan().Fill(1);
        var (shares, _, _) = Iterate(system, start, options);
        var (low, high, _, _) = Enclose(system, shares);
        var room = Tolerance(start.Length);
        return (low * (1 - room), high * (1 + room));
    }

    private static ExitSystem<TState> Reduce(Chain<TState> chain, int[] members, SolveOptions options)
    {
        var exitOf = new int[chain.StateCount];
        return new ExitSystem<TState>(chain, members, exits: 1, exitOf, options);
    }

    private static double Tolerance(int states) => 8 * (states + 4) * UnitRoundoff;

    private static (double[] Shares, int Iterations, bool IsConverged) Iterate(ExitSystem<TState> system, double[] start, SolveOptions options)
    {
        var current = start;
        var best = double.PositiveInfinity;
        var stalled = 0;
        for (var iteration = 1; iteration <= MostIterations; iteration++)
        {
            options.CancellationToken.ThrowIfCancellationRequested();
            double[] next = [.. current];
            system.IterateLeft(next);
            var (low, high) = Ratios(current, next);
            var width = (high - low) / low;
            stalled = width < best ? 0 : stalled + 1;
            best = Math.Min(best, width);
            if (width <= UnitRoundoff || (best <= Tolerance(start.Length) && stalled >= MostWithoutProgress))
            {
                Normalize(next);
                return (next, iteration, true);
            }

            current = system.Step(next);
            Normalize(current);
        }

        return (current, MostIterations, best <= Tolerance(start.Length));
    }

    /// <summary>One more solve, as careful as the options ask for; its ratios enclose 1 / (1 − λ).</summary>
    private static (double Low, double High, double[] Next, double Error) Enclose(ExitSystem<TState> system, double[] shares)
    {
        var solution = system.SolveLeft(Array.ConvertAll(shares, share => (ScaledDoubleDouble)share));
        var next = Array.ConvertAll(solution.Values, value => value.ToDouble());
        var (low, high) = Ratios(shares, next);
        Normalize(next);
        return (low, high, next, solution.RelativeErrorBound);
    }

    private static (double Low, double High) Ratios(double[] before, double[] after)
    {
        var (low, high) = (double.PositiveInfinity, 0.0);
        for (var k = 0; k < before.Length; k++)
        {
            var ratio = after[k] / before[k];
            low = Math.Min(low, ratio);
            high = Math.Max(high, ratio);
        }

        return (low, high);
    }

    private static void Normalize(double[] values)
    {
        var sum = CompensatedSum.Of(values);
        for (var k = 0; k < values.Length; k++)
        {
            values[k] /= sum;
        }
    }

    private static double DecayBound(double error, double low, double high, SolveOptions options)
    {
        return options.CertificateLevel == CertificateLevel.Proof && error < 0.25
            ? (((high - low) / low) + (2 * error) + (8 * UnitRoundoff)) * SubtractionFreeBound.SecondOrder
            : double.PositiveInfinity;
    }
}
