namespace Stochastic.Chains.Estimation;

/// <summary>
/// Hashes pairs packed into one number. The hash code of a long is the exclusive or of its halves, which gives all pairs of a few thousand states the same few
/// thousand codes; a multiplication spreads them first (Knuth 1998, multiplicative hashing).
/// </summary>
internal sealed class PairComparer : IEqualityComparer<long>
{
    private const ulong GoldenRatio = 0x9E3779B97F4A7C15;

    internal static PairComparer Instance { get; } = new();

    public bool Equals(long x, long y) => x == y;

    public int GetHashCode(long obj) => (int)(((ulong)obj * GoldenRatio) >> 32);
}
