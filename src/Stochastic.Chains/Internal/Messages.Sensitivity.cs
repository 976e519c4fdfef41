namespace Stochastic.Chains.Internal;

/// <summary>The messages about derivatives.</summary>
internal static partial class Messages
{
    internal const string DerivativeReason = "made of answers that have certificates of their own; differences may lose digits, so no bound is given";

    internal static string NotIrreducible(int classes) =>
        $"The chain has {Text.Count(classes, "communicating class", "communicating classes")}; this question needs a single one. " +
        "Ask AbsorptionDerivative for ends, or make a chain of one class.";

    internal static string NoTimeDerivative(object target, object from) =>
        $"{Text.Quoted(target)} may never be reached from {Text.Quoted(from)}, so the mean time is infinite and has no derivative. Ask AbsorptionDerivative for the probability instead.";

    internal static string ChangeInClosedClass(object state) =>
        $"{Text.Quoted(state)} is in a closed class, and a change of its row may open that class, where the probability jumps. Change rows of transient states only.";

    internal static string ChangeNotFinite(object from, object to, double rate) =>
        $"The change of {Text.Quoted(from)} to {Text.Quoted(to)} is {Text.Number(rate)}. Give a finite number.";

    internal static string ChangeBelowZero(object from, object to, double rate) =>
        $"The probability of {Text.Quoted(from)} to {Text.Quoted(to)} is 0 and cannot change by {Text.Number(rate)}. Take the change from a move that is possible.";

    internal static string ChangesDoNotCancel(object state, double sum) =>
        $"The changes of the row of {Text.Quoted(state)} sum to {Text.Number(sum)}. Let what one move gains be lost by others, so that they sum to 0.";
}
