using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Stationary;

/// <summary>The property that the certificate stands for: no share is ever off by more than the proved bound, and direct shares keep their digits.</summary>
public class StationaryCertificateTests
{
    private const int ChainsPerFamily = 200;
    private const int LargestSize = 40;

    public static TheoryData<string> Families => [.. ChainFamilies.Irreducible.Select(family => family.Name)];

    [Theory]
    [MemberData(nameof(Families))]
    public void No_share_is_off_by_more_than_its_bound(string name)
    {
        var checkedChains = 0;
        foreach (var sample in ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize))
        {
            var shares = sample.ToChain().Stationary();
            var exact = sample.ToExact().Stationary();

            var worst = shares.ToArray().Zip(exact, (computed, truth) => truth.RelativeDifference(computed)).Max();

            shares.Certificate.IsProof.Should().BeTrue(sample.ToString());
            worst.Should().BeLessThanOrEqualTo(shares.Certificate.RelativeErrorBound, sample.ToString());
            worst.Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(sample.StateCount), sample.ToString());
            checkedChains++;
        }

        checkedChains.Should().Be(ChainsPerFamily);
    }
}
