using System.Globalization;

namespace Stochastic.Chains.Internal;

/// <summary>A small table with a row of figures for each of the first states, and the count of the rest; the same in every culture.</summary>
internal static class StateTable
{
    private const int MostRows = 24;

    /// <summary>Writes the states with their figures, by position.</summary>
    internal static string Write<TState>(IReadOnlyList<TState> states, IReadOnlyList<string> header, Func<int, double[]> figures)
    {
        var table = new TextTable(header);
        for (var position = 0; position < Math.Min(states.Count, MostRows); position++)
        {
            table.AddRow([Text.Label(states[position]), .. figures(position).Select(figure => figure.ToString("G6", CultureInfo.InvariantCulture))]);
        }

        var rest = states.Count - MostRows;
        return rest > 0 ? $"{table}{Environment.NewLine}… and {Text.Count(rest)} more states" : table.ToString();
    }
}
