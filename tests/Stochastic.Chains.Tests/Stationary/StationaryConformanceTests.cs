using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Stationary;

/// <summary>Every method on every published case with long-run shares, in both storages.</summary>
public class StationaryConformanceTests
{
    private const int Storages = 2;
    private const int FewestCases = 40;
    private const int FewUnproved = 4;
    private const int FewestRefused = 4;

    /// <summary>The decompositions that are there for comparison take too long beyond this; two published cases have more states.</summary>
    private const int LargestDecomposed = 300;

    public static TheoryData<string> MethodNames => StationaryMethods.Names;

    /// <summary>Zeros of transient states are compared as well: anything else in their place is infinitely wrong.</summary>
    [Theory]
    [MemberData(nameof(MethodNames))]
    public void Published_shares_are_within_what_the_certificate_proves(string name)
    {
        var method = StationaryMethods.Named(name);
        var (answers, proved) = (0, 0);
        foreach (var published in PublishedShares.All.Where(candidate => IsInReach(method, candidate)))
        {
            var exact = published.ExactAsGiven();
            foreach (var chain in new[] { published.Chain, published.Chain.AsSparse() })
            {
                if (!method.TryAnswer(chain, out var shares))
                {
                    continue;
                }

                var bound = shares.Certificate.RelativeErrorBound;

                (exact is null ? 0 : WorstError(shares, exact)).Should().BeLessThanOrEqualTo(bound, published.ToString());
                WorstError(shares, published).Should().BeLessThanOrEqualTo(bound + Tolerances.RoundedInput(chain.StateCount), published.ToString());
                answers++;
                proved += shares.Certificate.IsProof ? 1 : 0;
            }
        }

        answers.Should().BeGreaterThanOrEqualTo(Storages * FewestCases, "a few chains lie outside the range of all but the most careful methods");
        proved.Should().BeGreaterThanOrEqualTo(answers - FewUnproved, "an iteration that was stopped early may be too far off");
    }

    [Theory]
    [InlineData("state reduction")]
    [InlineData("plain reduction")]
    public void Published_shares_have_the_digits_that_a_method_without_subtraction_keeps(string name)
    {
        foreach (var published in PublishedShares.All)
        {
            foreach (var chain in new[] { published.Chain, published.Chain.AsSparse() })
            {
                var shares = chain.Stationary(StationaryMethods.Named(name));

                WorstError(shares, published).Should().BeLessThanOrEqualTo(published.Query.Case.SuggestedRelativeTolerance, published.ToString());
            }
        }
    }

    [Theory]
    [MemberData(nameof(MethodNames))]
    public void Published_chains_with_several_recurrent_classes_are_refused(string name)
    {
        PublishedShares.WithSeveralClasses.Should().HaveCountGreaterThanOrEqualTo(FewestRefused);
        foreach (var chain in PublishedShares.WithSeveralClasses)
        {
            chain.Invoking(it => it.Stationary(StationaryMethods.Named(name))).Should().Throw<ChainStructureException>();
        }
    }

    private static bool IsInReach(IStationaryMethod method, PublishedShares published) =>
        method is not (LinearSystemMethod or EigenMethod) || published.Chain.StateCount <= LargestDecomposed;

    private static double WorstError(StationaryDistribution<int> shares, Rational[] exact) =>
        shares.ToArray().Zip(exact, (computed, truth) => truth.RelativeDifference(computed)).Max();

    private static double WorstError(StationaryDistribution<int> shares, PublishedShares published) =>
        published.Shares.Max(pair => pair.Share.RelativeDifference(shares[pair.State]));
}
