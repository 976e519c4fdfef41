namespace Stochastic.Chains.Internal;

/// <summary>The messages about estimates, tests and confidence.</summary>
internal static partial class Messages
{
    internal const string PriorWeightOutOfRange = "A weight of a prior counts observations. Give a number above 0 that is finite.";
    internal const string LevelOutOfRange = "The level must be above 0 and below 1, such as 0.95.";

    internal const string NothingToDraw = "There must be at least one thing to draw from.";
    internal const string UnknownConfidenceMethod = "The method is none of ConfidenceMethod. Give PosteriorSampling or ParametricBootstrap.";

    internal static string TooFewDraws(int draws, double level) =>
        $"{Text.Count(draws, "draw is", "draws are")} too few for an interval at {Text.Short(level)}. Give at least {Text.Count((long)Math.Ceiling(2 / (1 - level)))}.";

    internal static string AnswersDiffer(int expected, int found) =>
        $"The estimated chain has {Text.Count(expected, "answer", "answers")} and a drawn one {Text.Count(found)}. Give as many numbers at every call.";

    internal static string ImpossibleMoveCounted(object from, object to, long count) =>
        $"The move {Text.Quoted(from)} to {Text.Quoted(to)} is said to be impossible but was counted {Text.Count(count, "time", "times")}. " +
        "Correct the counts, or let the move be possible.";
}
