using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Estimation;

/// <summary>Writes an estimate as text: one line for many states, a table with standard errors for few.</summary>
internal static class EstimateText
{
    private const int LargestTable = 12;

    internal static string Write<TState>(TransitionEstimate<TState> estimate)
        where TState : notnull
    {
        var heading = $"Estimate from {Text.Count(estimate.Fit.ObservationCount, "move", "moves")} between {Text.Count(estimate.States.Count, "state", "states")}, " +
            (estimate.Options.Prior is null ? "maximum likelihood" : "posterior mean");
        if (estimate.States.Count > LargestTable)
        {
            return $"{heading}: {Text.List(estimate.States)}";
        }

        var table = new TextTable(["from \\ to", .. estimate.States.Select(state => Text.Label(state)), "moves"]);
        foreach (var from in estimate.States)
        {
            table.AddRow([Text.Label(from), .. estimate.States.Select(to => Cell(estimate, from, to)), Text.Count(estimate.TotalFrom(estimate.States.IndexOf(from)))]);
        }

        return $"{heading}{Environment.NewLine}{table}";
    }

    private static string Cell<TState>(TransitionEstimate<TState> estimate, TState from, TState to)
        where TState : notnull
    {
        var (probability, error) = (estimate[from, to], estimate.StandardError(from, to));
        return probability == 0 ? "·" : error == 0 ? Text.Short(probability) : $"{Text.Short(probability)} ±{Text.Short(error)}";
    }
}
