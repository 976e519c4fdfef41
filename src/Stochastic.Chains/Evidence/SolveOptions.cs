namespace Stochastic.Chains;

/// <summary>How a question is to be computed, whatever the method. Accepted by every solve.</summary>
/// <example>
/// <code>
/// var options = new SolveOptions { CertificateLevel = CertificateLevel.Residual, CancellationToken = token };
/// var shares = chain.Stationary(options);
/// </code>
/// </example>
public sealed record SolveOptions
{
    /// <summary>Gets how much evidence the result carries. Default: <see cref="CertificateLevel.Proof"/>.</summary>
    public CertificateLevel CertificateLevel { get; init; } = CertificateLevel.Proof;

    /// <summary>Gets the token that cancels the computation. Default: none.</summary>
    public CancellationToken CancellationToken { get; init; } = CancellationToken.None;

    /// <summary>Gets where progress is reported, now and then. Default: nowhere.</summary>
    public IProgress<SolveProgress>? Progress { get; init; }

    /// <summary>
    /// Gets the largest working memory of one solve, in bytes. A solve that needs more is refused with the size it would need,
    /// before it takes any. Default: 2 GiB.
    /// </summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to less than 0.</exception>
    public long MemoryLimit
    {
        get;
        init
        {
            ArgumentOutOfRangeException.ThrowIfNegative(value);
            field = value;
        }
    }
    = 2L << 30;

    /// <summary>
    /// Gets the number of threads that a solve may use, 1 or more. The answer has the same bits for any number. Default: 1, so that
    /// a busy server keeps its other cores.
    /// </summary>
    /// <exception cref="ArgumentOutOfRangeException">Set to less than 1.</exception>
    public int Parallelism
    {
        get;
        init
        {
            ArgumentOutOfRangeException.ThrowIfLessThan(value, 1);
            field = value;
        }
    }
    = 1;

    /// <summary>Refuses a solve that would need more memory than allowed, or more numbers than an array can hold.</summary>
    /// <exception cref="MemoryLimitException">Too much.</exception>
    internal void RequireMemory(int states, long bytes)
    {
        if (bytes > MemoryLimit || bytes / sizeof(double) > Array.MaxLength)
        {
            throw new MemoryLimitException(states, bytes, MemoryLimit);
        }
    }

    /// <summary>What a kernel calls with the part that is done, or null when nobody listens.</summary>
    internal Action<double>? Report(string stage) =>
        Progress is { } progress ? fraction => progress.Report(new SolveProgress(stage, fraction)) : null;
}
