namespace Stochastic.Chains.Internal;

/// <summary>The catalogue of messages about models and their input. Each carries the values, says what to do and ends with a period.</summary>
internal static partial class Messages
{
    private const double LargestDeviationToRescale = 0.99;

    internal const string NoStates = "The chain has no states. Give at least one.";
    internal const string DeviationOutOfRange = "The largest deviation to rescale must be above 0 and below 1.";
    internal const string WeightsSumToZero = "All weights are zero, so they describe no distribution. Give at least one positive weight.";
    internal const string RowAfterBuild = "The chain has been built already. Give its rows inside the call of Chain.Build.";

    internal static string NullRow(int position) =>
        $"Row number {Text.Count(position + 1)} is given for a null state. Give every state a label.";

    internal static string NullStateInList(int position) =>
        $"The state at position {Text.Count(position)} is null. Give every state a label.";

    internal static string NullStateInMove(long position) =>
        $"Move number {Text.Count(position + 1)} names a null state. Give every state a label.";

    internal static string DuplicateState(object state, int first, int second) =>
        $"State {Text.Quoted(state)} is listed at positions {Text.Count(first)} and {Text.Count(second)}. List each state once.";

    internal static string DuplicateRow(object state) =>
        $"State {Text.Quoted(state)} is given two rows. Give all its moves in one.";

    internal static string UnknownStateInMove(object state, object? from, object? to) =>
        $"The move {Text.Quoted(from)} to {Text.Quoted(to)} names {Text.Quoted(state)}, which is not in the list of states. Correct the label or add it to the list.";

    internal static string UnknownState<TState>(TState state, IReadOnlyCollection<TState> known) =>
        $"{Text.Quoted(state)} is not one of the chain's {Text.Count(known.Count, "state", "states")}: {Text.List(known)}. Correct the label.";

    internal static string NotSquare(int rows, int columns) =>
        $"The matrix has {Text.Count(rows, "row", "rows")} and {Text.Count(columns, "column", "columns")}. A transition matrix has one row and one column for each state.";

    internal static string WrongStateCount(int states, int rows) =>
        $"There are {Text.Count(states, "state", "states")} for a matrix of {Text.Count(rows, "row", "rows")}. Give one state for each row.";

    internal static string EmptyRow(object state) =>
        $"State {Text.Quoted(state)} has no move out of it. Give the probabilities of its moves, or a move to itself with probability 1 if it is never left.";

    internal static string NotFinite(object from, object to, double value) =>
        $"The probability of {Text.Quoted(from)} to {Text.Quoted(to)} is {Text.Number(value)}. Give a number from 0 to 1.";

    internal static string Negative(object from, object to, double value) =>
        $"The probability of {Text.Quoted(from)} to {Text.Quoted(to)} is {Text.Number(value)}, below zero. Give a number from 0 to 1.";

    internal static string AboveOne(object from, object to, double value) =>
        $"The probability of {Text.Quoted(from)} to {Text.Quoted(to)} is {Text.Number(value)}, above one. Give a number from 0 to 1.";

    internal static string RowSum(object state, double sum)
    {
        var deviation = Math.Abs(sum - 1);
        var side = sum > 1 ? "above" : "below";
        var advice = deviation < LargestDeviationToRescale
            ? $"Correct its probabilities, or allow a rescaling with RowSums.Rescale of {Text.ShortAtLeast(deviation)} or more."
            : "Correct its probabilities: they are parts of 1.";
        return $"The row of {Text.Quoted(state)} sums to {Text.Number(sum)}, {Text.Short(deviation)} {side} one. {advice}";
    }

    internal static string DuplicateTransition(object from, object to) =>
        $"The move {Text.Quoted(from)} to {Text.Quoted(to)} is given more than once. Give it once, with its whole probability.";

    internal static string RateNotFinite(object from, object to, double value) =>
        $"The rate of {Text.Quoted(from)} to {Text.Quoted(to)} is {Text.Number(value)}. Give a number of moves per unit of time, 0 or more.";

    internal static string NegativeRate(object from, object to, double value) =>
        $"The rate of {Text.Quoted(from)} to {Text.Quoted(to)} is {Text.Number(value)}, below zero. Give a number of moves per unit of time, 0 or more.";

    internal static string SelfRate(object state, double value) =>
        $"The rate {Text.Number(value)} leads from {Text.Quoted(state)} to itself. Leave it out: in continuous time staying is not a move.";

    internal static string RatesTooLarge(object from, double total) =>
        $"The rates out of {Text.Quoted(from)} sum to {Text.Number(total)}, more than can be computed with. Use a shorter unit of time, in which the rates are smaller.";

    internal static string RateTooSmall(object from, object to, double value, double largest) =>
        $"The rate {Text.Number(value)} of {Text.Quoted(from)} to {Text.Quoted(to)} is too small to be stored beside the largest, about {Text.Short(largest)}. " +
        "Correct one of the two, or give the move the rate 0 if it may be left out.";

    internal static string UnobservedRow(object state) =>
        $"State {Text.Quoted(state)} was never seen to be followed by anything, so its probabilities are unknown. Observe longer, " +
        "or choose UnobservedStates.Absorbing or UnobservedStates.Drop.";

    internal static string UnlistedFaults(long count) =>
        $"{Text.Count(count, "more fault is", "more faults are")} not listed. Correct those above and try again.";

    internal static string InvalidChain(IReadOnlyList<string> spelled, long count)
    {
        var rest = count - spelled.Count;
        var lines = string.Join(Environment.NewLine, spelled.Select(line => "- " + line));
        var end = rest > 0 ? $"{Environment.NewLine}- … and {Text.Count(rest)} more." : string.Empty;
        return $"The chain is not valid ({Text.Count(count, "fault", "faults")}):{Environment.NewLine}{lines}{end}";
    }

    internal static string WeightNotValid(object state, double value) =>
        $"The weight of {Text.Quoted(state)} is {Text.Number(value)}. Give a finite number, 0 or more.";

    internal static string ProbabilityNotValid(object state, double value) =>
        $"The probability of {Text.Quoted(state)} is {Text.Number(value)}. Give a number from 0 to 1.";

    internal static string RepeatedState(object state) =>
        $"State {Text.Quoted(state)} is given twice. Give it once, with its whole share.";

    internal static string DistributionSum(double sum) =>
        $"The probabilities sum to {Text.Number(sum)}. They must sum to 1; use Distribution.FromWeights to divide counts or weights by their sum.";

    internal static string DifferentStates(int mine, int other) =>
        $"The two distributions are not over the same states in the same order ({Text.Count(mine, "state", "states")} and {Text.Count(other)}). Use distributions over the states of one chain.";

    internal static string MemoryLimit(int states, long required, long limit) =>
        $"This takes, for {Text.Count(states, "state", "states")}, {Text.Count(required)} bytes of working memory; the limit is {Text.Count(limit)}. " +
        "Raise SolveOptions.MemoryLimit if the machine has it.";
}
