namespace Stochastic.Chains.Estimation;

/// <summary>Gathers every fault of a log, listing up to a limit and counting the rest.</summary>
internal sealed class LogFaultCollector
{
    private readonly List<LogFault> _faults = [];
    private long _count;

    internal bool HasFaults => _count > 0;

    internal void Add(LogFaultKind kind, IReadOnlyList<long> lines, string message)
    {
        _count++;
        if (_faults.Count < EventLogException.MaxListedFaults)
        {
            _faults.Add(new LogFault(kind, lines, message));
        }
    }

    /// <exception cref="EventLogException">There are faults.</exception>
    internal void ThrowIfAny()
    {
        if (HasFaults)
        {
            throw new EventLogException(_faults.AsReadOnly(), _count);
        }
    }
}
