namespace Stochastic.Chains.Internal;

/// <summary>What tests of counts say.</summary>
internal static partial class Messages
{
    internal const string NothingToTest = "There is nothing to compare: too few different moves were counted.";
    internal const string NoHistory =
        "These counts do not tell what came before a move. Count with KeepsHistory = true in PathOptions or LogOptions.";
    internal const string Stays = "stays";
    internal const string Leaves = "leaves";
    internal const string OrMore = " or more";

    private const double TinyProbability = 0.001;

    internal static string TooFewGroups(int count) => $"There {(count == 1 ? "is" : "are")} {Text.Count(count, "group", "groups")} to compare. Give at least two.";

    internal static string StayRow(int first, int last) => first == last ? $"after {Text.Count(first, "step", "steps")}" : $"after {Text.Count(first)} to {Text.Count(last)} steps";

    internal static string StayRowFrom(int first) => $"after {Text.Count(first)} or more steps";

    internal static string IndependenceFinding(bool differs) => differs
        ? "The next state depends on the present one, so a chain says more than fixed shares"
        : "No dependence of the next state on the present one shows: fixed shares describe these counts as well as a chain";

    internal static string SecondOrderFinding(bool differs) => differs
        ? "The state before the present one matters too, so a chain of these states forgets something that matters"
        : "No dependence on the state before the present one shows: the present state is enough for these counts";

    internal static string HomogeneityFinding(bool differs) => differs
        ? "The groups move differently, so one chain does not describe them all"
        : "No difference between the groups shows: one chain describes these counts";

    internal static string StayFinding(object state, bool differs) => differs
        ? $"The time already spent in {Text.Quoted(state)} matters, so its stays are not as a chain needs them"
        : $"No influence of the time already spent in {Text.Quoted(state)} shows: its stays are as a chain needs them";

    internal static string Finding(string conclusion, double ratio, double probability, long degreesOfFreedom) =>
        $"{conclusion} (likelihood ratio {Text.Short(ratio)} with {Text.Count(degreesOfFreedom, "degree", "degrees")} of freedom, {PValue(probability)}).";

    internal static string SmallExpectedCounts(int small, int cells, double smallest) =>
        $"Of {Text.Count(cells, "expected count", "expected counts")} {Text.Count(small, "is", "are")} below 5, the smallest {Text.Short(smallest)}: " +
        "take the p-value as a rough figure, or observe longer.";

    private static string PValue(double value) => value < TinyProbability ? "p < 0.001" : $"p = {Text.Short(Math.Round(value, 3))}";
}
