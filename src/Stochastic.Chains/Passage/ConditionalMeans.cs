using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>
/// Mean times over the futures that reach a target: with the reaching probabilities f, A · x = f gives the mean of the time where it is
/// reached and zero elsewhere, and x / f is the mean of those that reach it.
/// </summary>
internal static class ConditionalMeans<TState>
    where TState : notnull
{
    /// <summary>Fills the means of the members, from where reaching is possible; the target is exit 0 and everything else exit 1.</summary>
    internal static void Fill(
        Chain<TState> chain, int[] members, int[] exitOf, double[] reaching, double[] means, Certificate evidence, SolveEvidence totals, SolveOptions options)
    {
        using var system = new ExitSystem<TState>(chain, members, exits: 2, exitOf, options);
        var solution = system.MeanTimes(Array.ConvertAll(members, member => reaching[member]));
        var weighted = new double[means.Length];
        for (var k = 0; k < members.Length; k++)
        {
            weighted[members[k]] = solution.Values[k];
            means[members[k]] = solution.Values[k] / reaching[members[k]];
        }

        var divided = solution with
        {
            Values = Array.ConvertAll(members, member => means[member]),
            RelativeErrorBound = BoundOf(solution.RelativeErrorBound, evidence.RelativeErrorBound),
        };
        ScaledDoubleDouble[] given = [.. members.Select(member => (ScaledDoubleDouble)reaching[member] / (chain.UniformizationRate ?? 1))];
        totals.Add(divided, () => system.Residual(given, Array.ConvertAll(weighted, value => (ScaledDoubleDouble)value)));
    }

    /// <summary>The bound of a quotient whose parts carry the error of the probabilities: once in the divisor, once in the right-hand side.</summary>
    private static double BoundOf(double solve, double probabilities) => probabilities < 0.25
        ? Upward.Divide(
            Upward.Add(Upward.Add(solve, 2 * probabilities), 2 * Refinement.UnitRoundoff), Upward.LowerDifference(1, Upward.Add(2 * probabilities, solve))) *
            SubtractionFreeBound.SecondOrder
        : double.PositiveInfinity;
}
