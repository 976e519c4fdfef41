using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>
/// A question has no single answer because of how the states hang together. The message names the states or classes that
/// stand in the way and the call that does answer.
/// </summary>
/// <example>
/// <code>
/// try { _ = chain.Stationary(); }
/// catch (ChainStructureException noSingleAnswer) { Console.WriteLine(noSingleAnswer.Message); }
/// </code>
/// </example>
public sealed class ChainStructureException : InvalidOperationException
{
    internal ChainStructureException(string message, IEnumerable<object> states)
        : base(message) => States = [.. states.Select(Text.Label)];

    /// <summary>Gets the texts of the states that stand in the way: one of each class, or all of a set.</summary>
    public IReadOnlyList<string> States { get; }
}
