using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>A solve would need more working memory than its options allow. Refused before any of it was taken.</summary>
/// <example>
/// <code>
/// try { _ = chain.Stationary(new SolveOptions { MemoryLimit = 100_000_000 }); }
/// catch (MemoryLimitException tooLarge) { Console.WriteLine(tooLarge.RequiredBytes); }
/// </code>
/// </example>
public sealed class MemoryLimitException : InvalidOperationException
{
    internal MemoryLimitException(int states, long requiredBytes, long limitBytes)
        : base(Messages.MemoryLimit(states, requiredBytes, limitBytes))
    {
        RequiredBytes = requiredBytes;
        LimitBytes = limitBytes;
    }

    /// <summary>Gets the working memory that the solve would need, in bytes.</summary>
    public long RequiredBytes { get; }

    /// <summary>Gets the working memory that the options allow, in bytes.</summary>
    public long LimitBytes { get; }
}
