using Stochastic.Chains.Estimation;

namespace Stochastic.Chains.Tests.Estimation;

public class PairComparerTests
{
    [Fact]
    public void Pairs_of_a_thousand_states_hardly_share_hash_codes()
    {
        const int states = 1000;
        var codes = new HashSet<int>();
        for (var from = 0; from < states; from++)
        {
            for (var to = 0; to < states; to++)
            {
                codes.Add(PairComparer.Instance.GetHashCode(((long)from << 32) | (uint)to));
            }
        }

        codes.Should().HaveCountGreaterThan(states * states * 9 / 10);
    }

    [Fact]
    public void Many_pairs_are_counted_rightly()
    {
        var counts = TransitionCounts.FromPath(Enumerable.Range(0, 40_000).Select(step => (int)((long)step * step % 997)));

        counts.TotalCount.Should().Be(39_999);
        counts.Moves.Sum(move => move.Count).Should().Be(39_999);
    }
}
