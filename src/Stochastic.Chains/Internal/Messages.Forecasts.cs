namespace Stochastic.Chains.Internal;

/// <summary>Messages of forecasts, populations and times.</summary>
internal static partial class Messages
{
    internal const string NoRates =
        "The chain was given per step, so it knows no unit of time. Ask After() for a number of steps, or make the chain from rates with Chain.FromRates.";

    internal const string ProbabilityOutOfUnit = "Give a probability from 0 to 1.";

    internal static string NoChainForPeriod(int period) => $"The chain of period {Text.Count(period)} is null. Give one chain for each period.";

    internal static string StateMissingInPeriod(object state, int period) =>
        $"The chain of period {Text.Count(period)} does not have the state {Text.Quoted(state)}. Make the chains of all periods over the same list of states.";

    internal static string StateAddedInPeriod(object state, int period) =>
        $"The chain of period {Text.Count(period)} has the state {Text.Quoted(state)}, which the start does not have. Make the chains of all periods over the same list of states.";

    internal static string StateOrderInPeriod(object expected, object found, int position, int period) =>
        $"The chain of period {Text.Count(period)} lists {Text.Quoted(found)} at position {Text.Count(position)}, where the start lists {Text.Quoted(expected)}. " +
        "Make the chains of all periods over the same list of states, in the same order.";

    internal static string StepOutOfForecast(long step, long horizon) =>
        $"Step {Text.Count(step)} is outside the forecast, which goes from step 0 to step {Text.Count(horizon)}.";

    internal static string TimeNotValid(double time) => $"The time is {Text.Number(time)}. Give a finite number, 0 or more, in the unit of the rates.";

    internal static string TimeTooLong(double time, double rate, double jumps, double most) =>
        $"The time {Text.Number(time)} at {Text.Number(rate)} steps per unit of time takes about {Text.Short(jumps)} steps; at most {Text.Short(most)} are made. " +
        "Ask a shorter time, or LongRun() for what comes in the end.";

    internal static string CountNotValid(object state, long count, long most) =>
        $"The number in {Text.Quoted(state)} is {Text.Count(count)}. Give 0 or more, and at most {Text.Count(most)} altogether.";

    internal static string LossNotValid(object state, double probability) =>
        $"The probability of leaving from {Text.Quoted(state)} is {Text.Number(probability)}. Give a number from 0 to 1.";

    internal static string PopulationTooLarge(long items, long most) =>
        $"The distribution of a count among {Text.Count(items)} items is not computed; the most is {Text.Count(most)}. " +
        "Ask Expected() and StandardDeviation(), or count in larger units.";

    internal static string RecruitmentStepNotValid(long step) => $"Recruitment is asked for in step {Text.Count(step)}. Steps count from 1.";
}
