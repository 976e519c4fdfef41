using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>Expected numbers in each state, and the law of the number in one state.</summary>
internal static class PopulationSolve<TState>
    where TState : notnull
{
    /// <summary>Beside the roundings of a step: what stays of a state, and what joins.</summary>
    private const int RoundingsPerStep = 4;
    private const double SmallestNormal = 2.2250738585072014e-308;

    internal static PopulationForecast<TState> Run(Population<TState> population, IEnumerable<Chain<TState>> periods, SolveOptions options)
    {
        var states = population.Chain.States;
        var chains = Propagation<TState>.Checked(states, periods).ToArray();
        options.RequireMemory(states.Count, sizeof(double) * (chains.Length + 1L) * (states.Count + 1L));
        var expected = new double[(chains.Length + 1) * states.Count];
        var losses = new double[chains.Length + 1];
        var report = options.Report("steps");
        var (roundings, staysInRange) = (0.0, true);
        Join(population, 0, expected.AsSpan(0, states.Count));
        for (var step = 1; step <= chains.Length; step++)
        {
            options.CancellationToken.ThrowIfCancellationRequested();
            var matrix = StepMatrix.Of(chains[step - 1]);
            var source = expected.AsSpan((step - 1) * states.Count, states.Count).ToArray();
            var target = expected.AsSpan(step * states.Count, states.Count);
            losses[step] = losses[step - 1] + Leave(source, population.Losses);
            staysInRange = staysInRange && StepPath<TState>.SmallestPositive(source) * matrix.SmallestProbability >= SmallestNormal;
            matrix.Multiply(source, target);
            Join(population, step, target);
            roundings += StepPath<TState>.RoundingsOf(matrix) + RoundingsPerStep;
            report?.Invoke((double)step / chains.Length);
        }

        return new PopulationForecast<TState>(population, chains, expected, losses, Certify(population, expected, losses, roundings, staysInRange, options));
    }

    /// <summary>
    /// The items that can be in a state at a step, in groups of the same probability to be there. One pass backwards: the probability of being
    /// in the state at the end, from each state at each step before.
    /// </summary>
    internal static List<PopulationGroup> Groups(Population<TState> population, Chain<TState>[] chains, int step, int state, CancellationToken cancellation)
    {
        var groups = new List<PopulationGroup>();
        var ahead = new double[population.Chain.StateCount];
        var behind = new double[ahead.Length];
        var keeps = Array.ConvertAll(population.Losses.ToArray(), loss => 1 - loss);
        ahead[state] = 1;
        var roundings = 0.0;
        for (var entry = step; ; entry--)
        {
            cancellation.ThrowIfCancellationRequested();
            AddGroups(population, entry, ahead, SubtractionFreeBound.OfRoundings(roundings), groups);
            if (entry == 0)
            {
                return groups;
            }

            var matrix = StepMatrix.Of(chains[entry - 1]);
            matrix.MultiplyColumn(ahead, behind);
            VectorLoops.Multiply(keeps, behind);
            (ahead, behind) = (behind, ahead);
            roundings += matrix.LargestOutdegree + matrix.StayRoundings + StepPath<TState>.RoundingsPerStep + RoundingsPerStep;
        }
    }

    private static void AddGroups(Population<TState> population, int entry, double[] ahead, double relative, List<PopulationGroup> groups)
    {
        var counts = new Dictionary<double, long>();
        for (var from = 0; from < ahead.Length; from++)
        {
            if (ahead[from] > 0 && population.Entering(entry, from) is var count and > 0)
            {
                counts[ahead[from]] = counts.GetValueOrDefault(ahead[from]) + count;
            }
        }

        groups.AddRange(counts.Select(pair => new PopulationGroup(pair.Value, Math.Min(1, pair.Key), relative)));
    }

    private static void Join(Population<TState> population, long step, Span<double> counts)
    {
        for (var state = 0; state < counts.Length; state++)
        {
            counts[state] += population.Entering(step, state);
        }
    }

    /// <summary>Takes out those that leave and returns how many they are.</summary>
    private static double Leave(double[] counts, ReadOnlySpan<double> losses)
    {
        var left = default(CompensatedSum);
        for (var state = 0; state < counts.Length; state++)
        {
            left.Add(counts[state] * losses[state]);
            counts[state] *= 1 - losses[state];
        }

        return left.Value;
    }

    private static Certificate Certify(
        Population<TState> population, double[] expected, double[] losses, double roundings, bool staysInRange, SolveOptions options)
    {
        var relative = SubtractionFreeBound.OfRoundings(roundings);
        var isProof = options.CertificateLevel == CertificateLevel.Proof && double.IsFinite(relative);
        var lost = expected.Length * (double)population.Chain.StateCount * double.Epsilon;
        return new Certificate
        {
            Method = "propagation",
            Reason = "One multiplication for each step; no power of the matrix is formed.",
            Residual = options.CertificateLevel >= CertificateLevel.Residual ? Residual(population, expected, losses) : double.PositiveInfinity,
            RelativeErrorBound = isProof && staysInRange ? relative : double.PositiveInfinity,
            AbsoluteErrorBound = isProof ? AbsoluteBound.From(relative, expected.Max()) + (staysInRange ? 0 : lost) : double.PositiveInfinity,
            Basis = isProof ? ErrorBasis.SubtractionFree : ErrorBasis.None,
            IsProof = isProof,
            Iterations = losses.Length - 1,
        };
    }

    /// <summary>How well the books balance: at each step, those present and those lost are those that ever came, relative to these.</summary>
    private static double Residual(Population<TState> population, double[] expected, double[] losses)
    {
        var states = population.Chain.StateCount;
        var (came, largest) = (0.0, 0.0);
        for (var step = 0; step < losses.Length; step++)
        {
            for (var state = 0; state < states; state++)
            {
                came += population.Entering(step, state);
            }

            var there = CompensatedSum.Of(expected.AsSpan(step * states, states)) + losses[step];
            largest = came == 0 ? largest : Math.Max(largest, Math.Abs((there / came) - 1));
        }

        return largest;
    }
}
