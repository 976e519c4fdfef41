namespace Stochastic.Chains.Internal;

/// <summary>Messages of questions that have no single answer, or none that a double can hold.</summary>
internal static partial class Messages
{
    private const double DecimalDigitsPerBit = 0.30102999566398120;

    internal static string SeveralRecurrentClasses(IReadOnlyList<string> classes) =>
        $"The chain has {Text.Count(classes.Count, "recurrent class", "recurrent classes")}, so its long-run shares depend on the start: {Some(classes)}. " +
        "Ask StationaryPerClass() for the shares inside each, and Absorption() for the probability of ending in each.";

    internal static string ShareTooSmall(object state) =>
        $"The long-run share of {Text.Quoted(state)} is smaller than a double can hold (about 10^-308). " +
        "Leave the state out, or ask TimeTo() for how long it takes to get there.";

    internal static string TimeOutOfRange(object state, long exponent) =>
        $"The mean time from {Text.Quoted(state)} is about 10^{Power(exponent)}, larger than a double can hold. Treat the target as unreachable in practice.";

    internal static string ProbabilityOutOfRange(object state, long exponent) =>
        $"The probability from {Text.Quoted(state)} is about 10^{Power(exponent)}, smaller than a double can hold. Treat the end as impossible in practice.";

    internal const string NoTargets = "No target states are given. Name at least one.";

    internal static string TransientEnd(object state) =>
        $"{Text.Quoted(state)} is transient: nothing ends there. Ask TimeTo({Text.Quoted(state)}).ReachingProbability for the probability of ever reaching it.";

    internal static string NegativeSteps(long steps) => $"The number of steps is {Text.Count(steps)}. Give 0 or more.";

    private static string Some(IReadOnlyList<string> items)
    {
        const int shown = 5;
        var text = string.Join("; ", items.Take(shown));
        return items.Count > shown ? $"{text}; and {Text.Count(items.Count - shown)} more" : text;
    }

    private static string Power(long exponent) => Text.Count((long)Math.Round(exponent * DecimalDigitsPerBit));
}
