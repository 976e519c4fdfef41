namespace Stochastic.Chains.Internal;

/// <summary>The messages about estimates, tests and confidence.</summary>
internal static partial class Messages
{
    internal const string PriorWeightOutOfRange = "A weight of a prior counts observations. Give a number above 0 that is finite.";
    internal const string LevelOutOfRange = "The level must be above 0 and below 1, such as 0.95.";

    internal static string ImpossibleMoveCounted(object from, object to, long count) =>
        $"The move {Text.Quoted(from)} to {Text.Quoted(to)} is said to be impossible but was counted {Text.Count(count, "time", "times")}. " +
        "Correct the counts, or let the move be possible.";
}
