using System.Globalization;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>Writes a chain as text: one line for a large chain, a table of probabilities for a small one.</summary>
internal static class ChainText
{
    private const int LargestTable = 12;

    internal static string Write<TState>(Chain<TState> chain)
        where TState : notnull
    {
        var heading = $"Chain of {Text.Count(chain.StateCount, "state", "states")}, {Text.Count(chain.TransitionCount, "transition", "transitions")}";
        if (chain.StateCount > LargestTable)
        {
            return $"{heading}: {Text.List(chain.States)}";
        }

        var table = new TextTable(["from \\ to", .. chain.States.Select(state => Text.Label(state))]);
        foreach (var from in chain.States)
        {
            table.AddRow([Text.Label(from), .. chain.States.Select(to => Cell(chain[from, to]))]);
        }

        return $"{heading}{Environment.NewLine}{table}";
    }

    private static string Cell(double probability) =>
        probability == 0 ? "·" : probability.ToString("G4", CultureInfo.InvariantCulture);
}
