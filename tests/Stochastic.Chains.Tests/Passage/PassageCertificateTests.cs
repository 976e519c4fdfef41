using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Passage;

/// <summary>No mean time and no probability is ever off by more than the proved bound, and direct answers keep their digits.</summary>
public class PassageCertificateTests
{
    private const int ChainsPerFamily = 60;
    private const int LargestSize = 30;

    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    [Theory]
    [MemberData(nameof(Families))]
    public void No_hitting_time_is_off_by_more_than_its_bound(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize))
        {
            var target = sample.Target ?? (int)(sample.Seed % (ulong)sample.StateCount);
            var times = sample.ToChain().TimeTo(target);
            var exact = sample.ToExact();
            var means = exact.HittingMean(target);
            var reaching = exact.ReachingProbability(target);

            for (var state = 0; state < sample.StateCount; state++)
            {
                double.IsFinite(times.Values[state]).Should().Be(means[state] is not null, sample.ToString());
                if (means[state] is { } mean)
                {
                    Check(mean, times.Values[state], times.Certificate, sample);
                }

                Check(reaching[state], times.ReachingProbabilities[state], times.Certificate, sample);
            }
        }
    }

    [Theory]
    [MemberData(nameof(Families))]
    public void No_absorption_figure_is_off_by_more_than_its_bound(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize))
        {
            var absorption = sample.ToChain().Absorption();
            var exact = sample.ToExact();
            var probabilities = exact.AbsorptionProbabilities();
            var means = exact.AbsorptionMean();

            for (var state = 0; state < sample.StateCount; state++)
            {
                Check(means[state], absorption.MeanSteps(state), absorption.Certificate, sample);
                for (var end = 0; end < absorption.Ends.Count; end++)
                {
                    var into = exact.Structure.RecurrentClasses[end].States[0];
                    Check(probabilities[state, end], absorption.Probability(state, into), absorption.Certificate, sample);
                }
            }
        }
    }

    private static void Check(Rational exact, double computed, Certificate certificate, SampleChain sample)
    {
        var error = exact.RelativeDifference(computed);
        certificate.IsProof.Should().BeTrue(sample.ToString());
        error.Should().BeLessThanOrEqualTo(certificate.RelativeErrorBound, sample.ToString());
        error.Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(sample.StateCount), sample.ToString());
    }
}
