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
            var chain = sample.ToChain();
            var exact = sample.ToExact().Stationary();
            var proved = chain.Stationary();
            var unproved = chain.Stationary(new SolveOptions { CertificateLevel = CertificateLevel.None });

            proved.Certificate.IsProof.Should().BeTrue(sample.ToString());
            proved.Certificate.RelativeErrorBound.Should().BeLessThanOrEqualTo(Tolerances.FourRoundings, sample.ToString());
            LargestDifference(proved, exact).Should().BeLessThanOrEqualTo(proved.Certificate.AbsoluteErrorBound, sample.ToString());
            WorstError(proved, exact).Should().BeLessThanOrEqualTo(proved.Certificate.RelativeErrorBound, sample.ToString());
            WorstError(unproved, exact).Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(sample.StateCount), sample.ToString());
            checkedChains++;
        }

        checkedChains.Should().Be(ChainsPerFamily);
    }

    /// <summary>Any method at all: where something is proved, it holds; where the method gives up, it says so.</summary>
    [Theory]
    [MemberData(nameof(MethodsAndFamilies))]
    public void No_method_is_off_by_more_than_its_proof_and_the_proof_is_useful(string methodName, string familyName)
    {
        var method = StationaryMethods.Named(methodName);
        foreach (var sample in ChainFamilies.Named(familyName).Samples(ChainsPerMethod, LargestSize / 2))
        {
            if (!method.TryAnswer(sample.ToChain(), out var shares))
            {
                continue;
            }

            var exact = sample.ToExact().Stationary();
            var error = WorstError(shares, exact);
            error.Should().BeLessThanOrEqualTo(shares.Certificate.RelativeErrorBound, sample.ToString());
            LargestDifference(shares, exact).Should().BeLessThanOrEqualTo(shares.Certificate.AbsoluteErrorBound, sample.ToString());
            shares.Certificate.RelativeErrorBound.Should().BeLessThanOrEqualTo(
                UsefulBound.For(familyName, error), "{0}, off by {1}", sample, error);
        }
    }

    private const int ChainsPerMethod = 12;

    public static TheoryData<string, string> MethodsAndFamilies
    {
        get
        {
            var data = new TheoryData<string, string>();
            foreach (var method in StationaryMethods.All)
            {
                foreach (var family in ChainFamilies.Irreducible)
                {
                    data.Add(method.Name, family.Name);
                }
            }

            return data;
        }
    }

    private static double WorstError(StationaryDistribution<int> shares, Rational[] exact) =>
        shares.ToArray().Zip(exact, (computed, truth) => truth.RelativeDifference(computed)).Max();

    private static double LargestDifference(StationaryDistribution<int> shares, Rational[] exact) =>
        shares.ToArray().Zip(exact, (computed, truth) => Rational.Abs(Rational.FromDouble(computed) - truth).ToDouble()).Max();
}
