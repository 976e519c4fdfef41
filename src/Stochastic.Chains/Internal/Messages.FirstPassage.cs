namespace Stochastic.Chains.Internal;

/// <summary>Messages of the table of mean first passage times.</summary>
internal static partial class Messages
{
    internal static string PassageOutOfRange(object from, object to, long exponent) =>
        $"The mean time from {Text.Quoted(from)} to {Text.Quoted(to)} is about 10^{Power(exponent)}, which a double cannot hold. " +
        "Leave the state out, or ask TimeTo() for the other targets one by one.";

    internal static string NoKemenyConstant(IReadOnlyList<string> classes) =>
        $"The chain has {Text.Count(classes.Count)} recurrent classes, so it has no single Kemeny constant: {Some(classes)}. " +
        "Ask Absorption() for where things end, and make a chain of one class to get its constant.";
}
