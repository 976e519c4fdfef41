using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Steps;

/// <summary>No probability after n steps is ever off by more than the proved bound; what cannot happen has probability exactly zero.</summary>
public class StepCertificateTests
{
    private const int ChainsPerFamily = 12;
    private const int LargestSize = 12;

    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    [Theory]
    [MemberData(nameof(Families))]
    public void No_probability_is_off_by_more_than_its_bound(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize))
        {
            foreach (var steps in new[] { 0, 1, 2, 7, 40 })
            {
                var after = sample.ToChain().StartingIn(0).After(steps);
                var exact = sample.ToExact().NStepRow(0, steps);

                for (var state = 0; state < sample.StateCount; state++)
                {
                    Check(exact[state], after.Values[state], after.Certificate, $"{sample}, {steps} steps");
                }
            }
        }
    }

    private static void Check(Rational exact, double computed, Certificate certificate, string because)
    {
        if (exact.IsZero)
        {
            computed.Should().Be(0, because);
            return;
        }

        certificate.IsProof.Should().BeTrue(because);
        Rational.Abs(exact - Rational.FromDouble(computed)).ToDouble().Should().BeLessThanOrEqualTo(certificate.AbsoluteErrorBound, because);
        if (double.IsFinite(certificate.RelativeErrorBound))
        {
            exact.RelativeDifference(computed).Should().BeLessThanOrEqualTo(certificate.RelativeErrorBound, because);
        }
    }
}
