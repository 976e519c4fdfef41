namespace Stochastic.Chains;

/// <summary>One thing that is wrong with an event log, and what to do about it.</summary>
/// <param name="Kind">What is wrong.</param>
/// <param name="Lines">
/// The lines of the file concerned, from 1; for events that come from no file, their numbers in the order read, from 1. Empty where the whole
/// log is concerned.
/// </param>
/// <param name="Message">A sentence that names the lines and the values and says what to do.</param>
/// <example>
/// <code>
/// catch (EventLogException refused)
/// {
///     foreach (LogFault fault in refused.Faults) { Console.WriteLine($"{fault.Kind}: {fault.Message}"); }
/// }
/// </code>
/// </example>
public sealed record LogFault(LogFaultKind Kind, IReadOnlyList<long> Lines, string Message)
{
    /// <summary>The sentence of the fault.</summary>
    public override string ToString() => Message;
}
