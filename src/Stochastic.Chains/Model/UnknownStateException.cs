using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>A label was used in a question that is not one of the states of the chain.</summary>
/// <example>
/// <code>
/// try { _ = chain.Row("misspelt"); }
/// catch (UnknownStateException unknown) { Console.WriteLine(unknown.Message); }   // names the label and the states there are
/// </code>
/// </example>
public sealed class UnknownStateException : KeyNotFoundException
{
    private UnknownStateException(string message, string state)
        : base(message) => State = state;

    /// <summary>Gets the text of the label that was not found.</summary>
    public string State { get; }

    internal static UnknownStateException For<TState>(TState state, IReadOnlyCollection<TState> known) =>
        new(Messages.UnknownState(state, known), Text.Label(state));
}
