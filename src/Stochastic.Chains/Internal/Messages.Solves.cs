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

    internal static string MomentOutOfRange(object state, long exponent) =>
        $"The figure of the time from {Text.Quoted(state)} is about 10^{Power(exponent)}, outside what a double can hold. Ask for the standard deviation instead.";

    internal static string VisitsOutOfRange(object state, long exponent) =>
        $"The mean number of visits to {Text.Quoted(state)} is about 10^{Power(exponent)}, outside what a double can hold.";

    internal static string BeyondHorizon(int steps, int horizon) =>
        $"The distribution was computed for 0 to {Text.Count(horizon)} steps; {Text.Count(steps)} was asked for. Ask for a longer horizon.";

    internal static string TimedChainHasNoSteps(double rate) =>
        $"The chain was made from rates, so its time is not counted in steps (it makes {Text.Short(rate)} of them per unit of time on average, stays included). " +
        "Ask MakeAbsorbing(targets).StartingIn(from).AfterTime(t) for the probability of having arrived by a time.";

    internal static string ProbabilityBetweenZeroAndOne(double value) => $"The probability is {Text.Number(value)}. Give a number above 0 and below 1.";

    internal static string OnBothSides(object state) => $"{Text.Quoted(state)} is on both sides, so neither can come first. Name different states.";

    internal static string RecurrentVisits(object state) =>
        $"{Text.Quoted(state)} is recurrent: once entered it is visited for ever. Ask Stationary() or StationaryPerClass() for its long-run share.";

    internal static string ConditionalTooSmall(object from, object to) =>
        $"The move from {Text.Quoted(from)} to {Text.Quoted(to)} becomes less likely than a double can hold once the end is given. Leave it out of the chain first.";

    internal const string NoTransientStates = "The chain has no transient states, so its fundamental matrix is empty and there is nothing to copy.";

    internal const string NothingToLeave = "The chain has no transient states: nothing is left for good. Ask Stationary() for the long-run shares.";

    internal static string SeveralSlowestClasses(object first, object second) =>
        $"The classes of {Text.Quoted(first)} and {Text.Quoted(second)} are left equally slowly, so where things stand depends on the start for ever. " +
        "Ask StartingIn(…).After(n) for a given start.";

    internal const string SlowQuasiStationary = "Two parts of the transient states are left almost equally slowly. Ask StartingIn(…).After(n) for a given start.";

    internal const string NothingLeft = "All states are left out. Keep at least one.";

    internal const string ChangeTheRates = "The chain was made from rates. Change the rates and make it again with Chain.FromRates.";

    internal const string NotReversed =
        "Some states cannot be reached from some others, so the chain has no moves backwards from where it never is. Ask Without(…) or Censor(…) for the chain of one class first.";

    internal static string OnlyMovesOut(object state) =>
        $"{Text.Quoted(state)} can only move into states that are left out. Leave it out too, or give it another row with With(…) first.";

    internal static string MayNeverReturn(object state) =>
        $"The chain may enter {Text.Quoted(state)} and never come back to the states that are looked at. Look at it too.";

    internal static string ShiftToItself(object state) => $"Both moves lead to {Text.Quoted(state)}. Name two different states.";

    internal static string ShiftTooMuch(object from, object takenFrom, double amount, double available) =>
        $"{Text.Number(amount)} cannot be taken from the move {Text.Quoted(from)} to {Text.Quoted(takenFrom)}, whose probability is {Text.Number(available)}. " +
        "Give an amount above 0 that is not larger.";

    internal static string NotLumpable(object one, double high, object other, double low, object group, object into) =>
        $"{Text.Quoted(one)} and {Text.Quoted(other)} are both in the group {Text.Quoted(group)}, but move into the group {Text.Quoted(into)} with the probabilities " +
        $"{Text.Number(high)} and {Text.Number(low)}. Separate them, or ask CoarsestLumping(…) for groups that can be taken together.";

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
