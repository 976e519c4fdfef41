using System.Globalization;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>Writes a distribution as a small table.</summary>
internal static class DistributionText
{
    private const int LargestTable = 12;
    private const int ShownOfMany = 10;

    internal static string Write<TState>(Distribution<TState> distribution)
        where TState : notnull
    {
        var table = new TextTable(["state", "probability"]);
        var isSmall = distribution.Count <= LargestTable;
        IEnumerable<KeyValuePair<TState, double>> shown = isSmall ? distribution : distribution.MostLikely(ShownOfMany);
        foreach (var (state, probability) in shown)
        {
            table.AddRow([Text.Label(state), probability.ToString("G6", CultureInfo.InvariantCulture)]);
        }

        return isSmall ? table.ToString() : $"{table}{Environment.NewLine}… and {Text.Count(distribution.Count - ShownOfMany)} more states";
    }
}
