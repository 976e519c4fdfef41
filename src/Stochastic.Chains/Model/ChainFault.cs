namespace Stochastic.Chains;

/// <summary>One thing that is wrong with the input of a chain, and what to do about it.</summary>
/// <param name="Kind">What is wrong.</param>
/// <param name="States">The texts of the states concerned: for a move, from and to; for a row, its state; may be empty.</param>
/// <param name="Value">The value that broke the rule: the probability, the row's sum, the position in a list; see <paramref name="Kind"/>.</param>
/// <param name="Message">A sentence that names the states and the value and says what to do.</param>
/// <example>
/// <code>
/// if (!Chain.TryFromMatrix(states, matrix, out var chain, out var faults))
/// {
///     foreach (ChainFault fault in faults) { Console.WriteLine($"{fault.Kind}: {fault.Message}"); }
/// }
/// </code>
/// </example>
public sealed record ChainFault(ChainFaultKind Kind, IReadOnlyList<string> States, double Value, string Message)
{
    /// <summary>The sentence of the fault.</summary>
    public override string ToString() => Message;
}
