using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>The input of a chain breaks one or more rules. Carries all faults, not just the first.</summary>
/// <remarks>
/// Nothing is repaired silently. <see cref="Faults"/> lists up to <see cref="MaxListedFaults"/> faults and, when there are more,
/// ends with one of kind <see cref="ChainFaultKind.Unlisted"/>; the message spells out the first <see cref="MaxSpelledFaults"/>.
/// </remarks>
/// <example>
/// <code>
/// try { _ = Chain.FromMatrix(states, matrix); }
/// catch (InvalidChainException invalid)
/// {
///     foreach (ChainFault fault in invalid.Faults) { Console.WriteLine(fault.Message); }
/// }
/// </code>
/// </example>
public sealed class InvalidChainException : ArgumentException
{
    /// <summary>The largest number of faults that are listed one by one: 1000.</summary>
    public const int MaxListedFaults = 1000;

    /// <summary>The largest number of faults that the message spells out: 20.</summary>
    public const int MaxSpelledFaults = 20;

    internal InvalidChainException(IReadOnlyList<ChainFault> faults, long faultCount)
        : base(Messages.InvalidChain([.. faults.Take(MaxSpelledFaults).Select(fault => fault.Message)], faultCount))
    {
        Faults = faults;
        FaultCount = faultCount;
    }

    /// <summary>Gets the faults, in the order in which they were found.</summary>
    public IReadOnlyList<ChainFault> Faults { get; }

    /// <summary>Gets the number of faults, those not listed included.</summary>
    public long FaultCount { get; }
}
