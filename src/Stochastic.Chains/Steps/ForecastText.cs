using System.Globalization;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Steps;

/// <summary>Writes figures by step and state as a table that fits a terminal.</summary>
internal static class ForecastText
{
    private const int RowsShown = 13;
    private const int ColumnsShown = 8;

    /// <summary>Steps downwards, evenly thinned where there are many; states across, of many those with the largest figures.</summary>
    internal static string Write<TState>(StateSpace<TState> states, ReadOnlySpan<double> values, int horizon, string format)
        where TState : notnull
    {
        var columns = Columns(states.Count, values);
        var table = new TextTable(["step", .. columns.Select(column => Text.Label(states[column]))]);
        var rows = Math.Min(horizon + 1, RowsShown);
        for (var row = 0; row < rows; row++)
        {
            var step = rows == 1 ? 0 : (int)((long)row * horizon / (rows - 1));
            var cells = new List<string> { Text.Count(step) };
            foreach (var column in columns)
            {
                cells.Add(values[(step * states.Count) + column].ToString(format, CultureInfo.InvariantCulture));
            }

            table.AddRow(cells);
        }

        var rest = states.Count - columns.Length;
        return rest > 0 ? $"{table}{Environment.NewLine}… and {Text.Count(rest, "more state", "more states")}" : table.ToString();
    }

    private static int[] Columns(int states, ReadOnlySpan<double> values)
    {
        var peaks = new double[states];
        for (var k = 0; k < values.Length; k++)
        {
            peaks[k % states] = Math.Max(peaks[k % states], values[k]);
        }

        return [.. Enumerable.Range(0, states).OrderByDescending(state => peaks[state]).Take(ColumnsShown).Order()];
    }
}
