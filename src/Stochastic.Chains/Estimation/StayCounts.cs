namespace Stochastic.Chains.Estimation;

/// <summary>How often items stayed in a state and how often they left it, by the number of steps they had been in it; the last entry counts all longer ones.</summary>
internal sealed class StayCounts
{
    private const int LongestAge = 100;

    private readonly long[] _stays = new long[LongestAge + 1];
    private readonly long[] _leaves = new long[LongestAge + 1];

    internal ReadOnlySpan<long> Stays => _stays.AsSpan(1);

    internal ReadOnlySpan<long> Leaves => _leaves.AsSpan(1);

    internal void AddLeave(long age) => _leaves[(int)Math.Min(age, LongestAge)]++;

    /// <summary>So many stays in a row, the first at the given age.</summary>
    internal void AddStays(long age, long count)
    {
        for (; count > 0 && age < LongestAge; age++, count--)
        {
            _stays[age]++;
        }

        _stays[LongestAge] = checked(_stays[LongestAge] + count);
    }

    internal void AddAll(StayCounts other)
    {
        for (var age = 0; age <= LongestAge; age++)
        {
            _stays[age] = checked(_stays[age] + other._stays[age]);
            _leaves[age] = checked(_leaves[age] + other._leaves[age]);
        }
    }
}
