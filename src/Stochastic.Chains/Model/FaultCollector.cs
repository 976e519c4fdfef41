using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>Gathers every fault of an input, listing up to a limit and counting the rest.</summary>
internal sealed class FaultCollector
{
    private readonly List<ChainFault> _faults = [];
    private long _count;

    internal bool HasFaults => _count > 0;

    internal void Add(ChainFaultKind kind, IEnumerable<object?> states, double value, string message)
    {
        _count++;
        if (_faults.Count < InvalidChainException.MaxListedFaults)
        {
            _faults.Add(new ChainFault(kind, [.. states.Select(Text.Label)], value, message));
        }
    }

    internal void ThrowIfAny()
    {
        if (HasFaults)
        {
            throw ToException();
        }
    }

    internal InvalidChainException ToException() => new(ToList(), _count);

    /// <summary>The faults found; when some were not listed, a last entry counts them.</summary>
    internal IReadOnlyList<ChainFault> ToList()
    {
        var rest = _count - _faults.Count;
        return rest == 0
            ? [.. _faults]
            : [.. _faults, new ChainFault(ChainFaultKind.Unlisted, [], rest, Messages.UnlistedFaults(rest))];
    }
}
