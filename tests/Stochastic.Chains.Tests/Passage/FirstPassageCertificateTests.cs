using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Passage;

/// <summary>No mean first passage time is ever off by more than the proved bound, and each keeps its digits.</summary>
public class FirstPassageCertificateTests
{
    private const int ChainsPerFamily = 60;
    private const int LargestSize = 24;

    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    public static TheoryData<int> Sizes => [1, 2, 3, 15, 16, 17, 31, 32, 33, 63, 64, 65, 95, 96, 97, 127, 128, 129, 255, 256, 257];

    [Theory]
    [MemberData(nameof(Families))]
    public void No_time_is_off_by_more_than_its_bound(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize))
        {
            var exact = sample.ToExact();
            var expected = exact.MeanFirstPassage();
            var table = sample.ToChain().MeanFirstPassage();

            table.Certificate.IsProof.Should().BeTrue(sample.ToString());
            for (var from = 0; from < sample.StateCount; from++)
            {
                for (var to = 0; to < sample.StateCount; to++)
                {
                    var context = $"{sample}, from {from} to {to}";
                    var isFinite = double.IsFinite(table[from, to]);
                    isFinite.Should().Be(expected[from, to] is not null, context);
                    if (expected[from, to] is { } time)
                    {
                        var error = time.RelativeDifference(table[from, to]);
                        error.Should().BeLessThanOrEqualTo(table.Certificate.RelativeErrorBound, context);
                        error.Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(sample.StateCount), context);
                    }
                }
            }
        }
    }

    [Theory]
    [MemberData(nameof(Sizes))]
    public void Tables_of_every_size_around_the_edges_of_blocks_keep_their_digits(int size)
    {
        foreach (var family in new[] { "random dense", "nearly decomposable", "random sparse" })
        {
            var sample = ChainFamilies.Named(family).Create(size, 7);
            var oracle = new DoubleDoubleChain(sample.Matrix);
            var table = sample.ToChain().MeanFirstPassage();

            for (var to = 0; to < sample.StateCount; to += Math.Max(1, sample.StateCount / 5))
            {
                var expected = oracle.HittingMean(to);
                for (var from = 0; from < sample.StateCount; from++)
                {
                    if (from != to)
                    {
                        var error = expected[from].RelativeDifference(table[from, to]);
                        error.Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(sample.StateCount), $"{sample}, from {from} to {to}");
                        error.Should().BeLessThanOrEqualTo(table.Certificate.RelativeErrorBound);
                    }
                }
            }
        }
    }
}
