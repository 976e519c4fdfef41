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
            WorstError(proved, exact).Should().BeLessThanOrEqualTo(proved.Certificate.RelativeErrorBound, sample.ToString());
            WorstError(unproved, exact).Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(sample.StateCount), sample.ToString());
            checkedChains++;
        }

        checkedChains.Should().Be(ChainsPerFamily);
    }

    /// <summary>Any method at all: where something is proved, it holds; where the method gives up, it says so.</summary>
    [Theory]
    [MemberData(nameof(MethodsAndFamilies))]
    public void No_method_is_off_by_more_than_its_proof(string methodName, string familyName)
    {
        var method = Methods.Single(candidate => candidate.Name == methodName);
        foreach (var sample in ChainFamilies.Named(familyName).Samples(ChainsPerMethod, LargestSize / 2))
        {
            StationaryDistribution<int> shares;
            try
            {
                sample.ToChain().TryStationary(method, new SolveOptions(), out shares);
            }
            catch (NumericalRangeException refused)
            {
                refused.Message.Should().Contain("long-run share", sample.ToString());
                continue;
            }

            WorstError(shares, sample.ToExact().Stationary()).Should().BeLessThanOrEqualTo(shares.Certificate.RelativeErrorBound, sample.ToString());
        }
    }

    private const int ChainsPerMethod = 12;

    private static IReadOnlyList<IStationaryMethod> Methods { get; } =
    [
        new EliminationMethod(),
        new LinearSystemMethod(),
        new EigenMethod(),
        new PowerMethod { MaxIterations = 2000 },
        new GaussSeidelMethod { MaxIterations = 500 },
        new AggregationMethod { MaxIterations = 100 },
    ];

    public static TheoryData<string, string> MethodsAndFamilies
    {
        get
        {
            var data = new TheoryData<string, string>();
            foreach (var method in Methods)
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
}
