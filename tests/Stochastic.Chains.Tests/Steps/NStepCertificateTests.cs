using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Steps;

/// <summary>No entry of a power is ever off by more than the proved bound, whatever the method; what cannot happen is exactly zero.</summary>
public class NStepCertificateTests
{
    private const int ChainsPerFamily = 8;
    private const int LargestSize = 8;
    private const int FewChains = 4;
    private const int SmallSize = 5;

    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    private static NStepMethod[] Methods => [new SquaringMethod(), new PropagationMethod(), new SpectralMethod()];

    [Theory]
    [MemberData(nameof(Families))]
    public void No_entry_is_off_by_more_than_its_bound(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize))
        {
            var chain = sample.ToChain();
            var exact = sample.ToExact();
            foreach (var steps in new[] { 0, 2, 3, 7, 29, 64 })
            {
                var truth = exact.NStepMatrix(steps);
                foreach (var method in Methods)
                {
                    Check(truth, chain.NStep(steps, method), $"{sample}, {steps} steps, {method}", isExact: true);
                }

                Check(truth, chain.NStep(steps), $"{sample}, {steps} steps, method chosen", isExact: true);
            }
        }
    }

    [Theory]
    [MemberData(nameof(Families))]
    public void No_entry_is_off_by_more_than_its_bound_after_very_many_steps(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(FewChains, SmallSize))
        {
            var chain = sample.ToChain();
            var exact = sample.ToExact();
            foreach (var steps in new[] { 4096L, 1_000_000_000L })
            {
                var truth = RoundedSteps.NStepMatrix(exact, steps);
                foreach (var method in new NStepMethod[] { new SquaringMethod(), new SpectralMethod() })
                {
                    Check(truth, chain.NStep(steps, method), $"{sample}, {steps} steps, {method}", isExact: false);
                }

                Check(truth, chain.NStep(steps), $"{sample}, {steps} steps, method chosen", isExact: false);
            }
        }
    }

    [Theory]
    [MemberData(nameof(Families))]
    public void A_row_from_the_spectrum_is_not_off_by_more_than_its_bound(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(FewChains, LargestSize))
        {
            var spectrum = sample.ToChain().Spectrum();
            foreach (var steps in new[] { 0, 1, 2, 30, 100 })
            {
                var row = spectrum.NStep(0, steps);
                var truth = sample.ToExact().NStepRow(0, steps);

                row.Values.ToArray().Sum().Should().BeApproximately(1, Tolerances.SumOfOne(4 * sample.StateCount));
                foreach (var (exact, computed) in truth.Zip(row.ToArray()))
                {
                    Check(exact, computed, row.Certificate, $"{sample}, {steps} steps", isExact: true);
                }
            }
        }
    }

    [Theory]
    [InlineData("random dense")]
    [InlineData("random sparse")]
    [InlineData("periodic")]
    [InlineData("defective")]
    public void Squaring_proves_every_entry_to_ten_digits_after_a_billion_steps_where_the_start_is_forgotten(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(FewChains, SmallSize))
        {
            var certificate = sample.ToChain().NStep(1_000_000_000, new SquaringMethod()).Certificate;

            certificate.IsProof.Should().BeTrue(sample.ToString());
            certificate.AbsoluteErrorBound.Should().BeLessThan(1e-10, sample.ToString());
        }
    }

    [Fact]
    public void A_billion_steps_of_two_states_match_the_closed_form()
    {
        // P^n = 1 pi + (1 − a − b)^n (I − 1 pi): general mathematics; the second term has died out.
        var chain = Chain.FromMatrix(new[,] { { 0.75, 0.25 }, { 0.125, 0.875 } });

        foreach (var method in new NStepMethod[] { new SquaringMethod(), new SpectralMethod() })
        {
            var power = chain.NStep(1_000_000_000, method).Require(relativeError: 1e-12);

            power[0, 0].Should().BeApproximately(1.0 / 3, Tolerances.FourRoundings);
            power[1, 1].Should().BeApproximately(2.0 / 3, Tolerances.FourRoundings);
        }
    }

    private static void Check(Rational[,] truth, NStepMatrix<int> power, string because, bool isExact)
    {
        var size = truth.GetLength(0);
        power.Certificate.IsProof.Should().Be(double.IsFinite(power.Certificate.AbsoluteErrorBound), because);
        double.IsNaN(power.Certificate.RelativeErrorBound).Should().BeFalse(because);
        for (var from = 0; from < size; from++)
        {
            power.Row(from).Values.ToArray().Sum().Should().BeApproximately(1, Tolerances.SumOfOne(4 * size), because);
            for (var to = 0; to < size; to++)
            {
                power[from, to].Should().BeInRange(0, 1, because);
                Check(truth[from, to], power[from, to], power.Certificate, because, isExact);
            }
        }
    }

    /// <summary>The rounded oracle gives zero for what is merely tiny; only the exact one tells what is impossible.</summary>
    private static void Check(Rational exact, double computed, Certificate certificate, string because, bool isExact)
    {
        if (exact.IsZero && isExact)
        {
            computed.Should().Be(0, because);
            return;
        }

        Rational.Abs(exact - Rational.FromDouble(computed)).ToDouble().Should().BeLessThanOrEqualTo(certificate.AbsoluteErrorBound, because);
        if (double.IsFinite(certificate.RelativeErrorBound) && !exact.IsZero)
        {
            exact.RelativeDifference(computed).Should().BeLessThanOrEqualTo(certificate.RelativeErrorBound, because);
        }
    }
}
