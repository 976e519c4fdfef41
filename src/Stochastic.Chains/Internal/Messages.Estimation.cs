namespace Stochastic.Chains.Internal;

/// <summary>The messages about counting moves and estimating chains from them.</summary>
internal static partial class Messages
{
    internal const string UnknownChoice = "The choice is none of UnobservedStates. Give one of Refuse, Absorbing and Drop.";
    internal const string NoStatesInPaths = "The paths have no states at all. Give at least one path with a state.";
    internal const string EmptyLog = "The log has no events. Give at least one.";
    internal const string NullFinalState = "A final state is null. Give every state a label.";
    internal const string SilenceNotPositive = "The span of silence must be above zero.";
    internal const string PeriodNotPositive = "A period must be longer than zero.";

    internal static string NullPath(long number) => $"Path number {Text.Count(number)} is null. Give an empty path for an item without states.";

    internal static string NullStateInPath(long path, long step) =>
        $"Step {Text.Count(step)} of path number {Text.Count(path)} is null. Give every state a label.";

    internal static string UnknownStateInPath(object state, long path, long step) =>
        $"Step {Text.Count(step)} of path number {Text.Count(path)} is {Text.Quoted(state)}, which is not in the list of states. Correct the label or add it to the list.";

    internal static string NegativeCount(object from, object to, long count) =>
        $"The count of {Text.Quoted(from)} to {Text.Quoted(to)} is {Text.Count(count)}, below zero. Give a whole number, 0 or more.";

    internal static string CountsNotSquare(int rows, int columns) =>
        $"The table of counts has {Text.Count(rows, "row", "rows")} and {Text.Count(columns, "column", "columns")}. It needs one row and one column for each state.";

    internal static string CountsOfDifferentStates<TState>(IReadOnlyCollection<TState> mine, IReadOnlyCollection<TState> others) =>
        $"The counts are over different states or the same in another order: {Text.List(mine)}; {Text.List(others)}. Count both with one list of states.";

    internal static string AllStatesDropped<TState>(IReadOnlyCollection<TState> states) =>
        $"No state is left when those never left are dropped, of {Text.List(states)}. Observe longer, or choose UnobservedStates.Absorbing.";

    internal static string LogPlace(bool isLine, long number) => isLine ? $"line {Text.Count(number)}" : $"event {Text.Count(number)}";

    internal static string NullItem(string place) => $"The item of {place} is null. Give every event its item.";

    internal static string NullStateInEvent(string place) => $"The state of {place} is null. Give every event its state.";

    internal static string UnknownStateInEvent(string place, object state, object item) =>
        $"Item {Text.Quoted(item)} is in {Text.Quoted(state)} ({place}), which is not in the list of states. Correct the label or add it to the list.";

    internal static string UnknownStateInOptions(object state) =>
        $"The options name {Text.Quoted(state)} as an end, but it is not in their list of states. Correct the label or add it to the list.";

    internal static string AfterLogEnd(string place, DateTimeOffset time, DateTimeOffset end) =>
        $"The time {LogText.Instant(time)} ({place}) is after the given end of the log, {LogText.Instant(end)}. Leave out later events, or give a later end.";

    internal static string TwoStates(object item, DateTimeOffset time, (object State, string Place) one, (object State, string Place) other) =>
        $"Item {Text.Quoted(item)} is in {Text.Quoted(one.State)} ({one.Place}) and in {Text.Quoted(other.State)} ({other.Place}) " +
        $"at one instant, {LogText.Instant(time)}. Remove one of them or correct a time.";

    internal static string PeriodAssumption(string period, long filled) =>
        $"the state of an item did not change between its events. Periods of {period}; " +
        $"{Text.Count(filled, "boundary without an event since the one before was", "boundaries without an event since the one before were")} filled with the state last seen.";

    internal static string SilenceAssumption(TimeSpan after, object movesTo, long items) =>
        $"an item unseen for more than {LogText.Span(after)} has moved to {Text.Quoted(movesTo)}; this was applied to {Text.Count(items, "item", "items")}.";

    internal static string ReturnAssumption(object movesTo, bool counted, long returns)
    {
        var taken = counted ? $"was in {Text.Quoted(movesTo)} meanwhile" : $"was never in {Text.Quoted(movesTo)}";
        return $"an item that came back after such a silence {taken}; {Text.Count(returns, "return was", "returns were")} seen.";
    }

    internal static string InvalidLog(IReadOnlyList<string> spelled, long count)
    {
        var rest = count - spelled.Count;
        var lines = string.Join(Environment.NewLine, spelled.Select(line => "- " + line));
        var end = rest > 0 ? $"{Environment.NewLine}- … and {Text.Count(rest)} more." : string.Empty;
        return $"The log is not valid ({Text.Count(count, "fault", "faults")}):{Environment.NewLine}{lines}{end}";
    }
}
