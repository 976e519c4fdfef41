namespace Stochastic.Chains.Tests.Support;

/// <summary>A way to make hard chains of a kind, by size and seed; the states come out in shuffled order.</summary>
/// <param name="Name">What a failing test prints.</param>
/// <param name="MinimumSize">The fewest states that show the difficulty.</param>
/// <param name="MaximumSize">The most states that make sense.</param>
/// <param name="IsIrreducible">Whether every chain of the family is one communicating class.</param>
/// <param name="HasTarget">Whether state 0, before shuffling, is the target of the family.</param>
/// <param name="Generate">Makes the matrix before shuffling.</param>
internal sealed record ChainFamily(
    string Name,
    int MinimumSize,
    int MaximumSize,
    bool IsIrreducible,
    bool HasTarget,
    Func<int, SplitMix64, double[,]> Generate)
{
    public SampleChain Create(int size, ulong seed)
    {
        var random = new SplitMix64(seed);
        var matrix = Generate(Math.Clamp(size, MinimumSize, MaximumSize), random);
        var count = matrix.GetLength(0);
        var place = random.NextPermutation(count);
        var shuffled = new double[count, count];
        for (var i = 0; i < count; i++)
        {
            for (var j = 0; j < count; j++)
            {
                shuffled[place[i], place[j]] = matrix[i, j];
            }
        }

        return new(Name, size, seed, shuffled, HasTarget ? place[0] : null);
    }

    /// <summary>Chains of all sizes from the smallest to the largest, round and round, with seeds 0, 1, 2...</summary>
    public IEnumerable<SampleChain> Samples(int count, int largestSize)
    {
        var largest = Math.Max(MinimumSize, Math.Min(MaximumSize, largestSize));
        for (var k = 0; k < count; k++)
        {
            yield return Create(MinimumSize + (k % (largest - MinimumSize + 1)), (ulong)k);
        }
    }
}
