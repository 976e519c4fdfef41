using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>An event log breaks one or more rules. Carries all faults, not just the first.</summary>
/// <remarks>
/// Nothing is repaired or left out silently. <see cref="Faults"/> lists up to <see cref="MaxListedFaults"/> faults, and
/// <see cref="FaultCount"/> counts them all; the message spells out the first <see cref="MaxSpelledFaults"/>.
/// </remarks>
/// <example>
/// <code>
/// try { _ = EventLog.CountCsv("scans.csv", columns); }
/// catch (EventLogException refused) { Console.WriteLine(refused.Message); }   // names each line and what to do
/// </code>
/// </example>
public sealed class EventLogException : ArgumentException
{
    /// <summary>The largest number of faults that are listed one by one: 1000.</summary>
    public const int MaxListedFaults = 1000;

    /// <summary>The largest number of faults that the message spells out: 20.</summary>
    public const int MaxSpelledFaults = 20;

    internal EventLogException(IReadOnlyList<LogFault> faults, long faultCount)
        : base(Messages.InvalidLog([.. faults.Take(MaxSpelledFaults).Select(fault => fault.Message)], faultCount))
    {
        Faults = faults;
        FaultCount = faultCount;
    }

    /// <summary>Gets the faults, in the order in which they were found: those of single lines first.</summary>
    public IReadOnlyList<LogFault> Faults { get; }

    /// <summary>Gets the number of faults, those not listed included.</summary>
    public long FaultCount { get; }
}
