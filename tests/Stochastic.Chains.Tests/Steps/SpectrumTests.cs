using System.Numerics;
using Stochastic.Chains.Tests.Kernels;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Steps;

public class SpectrumTests
{
    private const int ChainsPerFamily = 10;
    private const int LargestSize = 14;

    private static readonly Chain<string> Weather = Chain.Build<string>(rows => rows
        .Row("rain", ("rain", 0.5), ("nice", 0.25), ("snow", 0.25))
        .Row("nice", ("rain", 0.5), ("snow", 0.5))
        .Row("snow", ("rain", 0.25), ("nice", 0.25), ("snow", 0.5)));

    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    [Fact]
    public void The_weather_of_Oz_has_the_eigenvalues_one_a_quarter_and_minus_a_quarter()
    {
        // KS-WEATHER: Kemeny and Snell, Finite Markov Chains, 1960; characteristic polynomial verified exactly.
        var spectrum = Weather.Spectrum();

        spectrum.HasOrthogonalVectors.Should().BeTrue();
        spectrum.IsDiagonalizable.Should().BeTrue();
        EigenChecks.LargestMismatch(spectrum.Eigenvalues.ToArray(), [1, 0.25, -0.25]).Should().BeLessThan(EigenChecks.Bound(3));
        spectrum.Eigenvalues[0].Should().Be(Complex.One);
        spectrum.SubdominantEigenvalue!.Value.Real.Should().BeApproximately(0.25, EigenChecks.Bound(3));
        spectrum.SpectralGap.Should().BeApproximately(0.75, EigenChecks.Bound(3));
        spectrum.RelaxationTime.Should().BeApproximately(4.0 / 3, EigenChecks.Bound(3));
        spectrum.LeftVectors[0]["nice"].Real.Should().BeApproximately(0.2, Tolerances.FourRoundings);
        spectrum.RightVectors[0].Values.ToArray().Should().OnlyContain(entry => entry == Complex.One);
        spectrum.ToString().Should().Be("3 eigenvalues: 1; 0.25; -0.25; relaxation time 1.333 steps");
    }

    [Theory]
    [MemberData(nameof(Families))]
    public void Vectors_solve_their_equations_are_paired_and_the_eigenvalues_are_in_order(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize))
        {
            var chain = sample.ToChain();
            var spectrum = chain.Spectrum();
            var moduli = spectrum.Eigenvalues.Select(Complex.Abs).ToArray();
            var roots = chain.Structure().RecurrentClasses.Sum(group => group.Period);

            spectrum.Eigenvalues.Should().HaveCount(sample.StateCount, sample.ToString());
            spectrum.Eigenvalues.Take(chain.Structure().RecurrentClasses.Count).Should().OnlyContain(value => value == Complex.One, sample.ToString());
            moduli.Count(modulus => modulus > 1 - Tolerances.FourRoundings).Should().BeGreaterThanOrEqualTo(roots, sample.ToString());
            moduli.Max().Should().BeLessThanOrEqualTo(1 + Tolerances.UnitRoundoff, sample.ToString());
            foreach (var (value, index) in spectrum.Eigenvalues.Select((value, index) => (value, index)).Where(item => item.value.Imaginary > 0))
            {
                spectrum.Eigenvalues[index + 1].Should().Be(Complex.Conjugate(value), sample.ToString());
                spectrum.RightVectors[index + 1].Values.ToArray().Should().Equal(spectrum.RightVectors[index].Values.ToArray().Select(Complex.Conjugate));
            }

            double.IsNaN(spectrum.ConditionNumber).Should().BeFalse(sample.ToString());
            spectrum.Certificate.Residual.Should().BeLessThan(1e-12, sample.ToString());
            if (spectrum.ConditionNumber < 1e4)
            {
                LargestDefect(spectrum).Should().BeLessThan(EigenChecks.Bound(sample.StateCount) * spectrum.ConditionNumber, sample.ToString());
            }
        }
    }

    [Fact]
    public void A_periodic_chain_has_the_roots_of_one_and_no_gap()
    {
        var ring = Chain.Build<int>(rows => rows.Row(0, (1, 1.0)).Row(1, (2, 1.0)).Row(2, (0, 1.0)));
        var spectrum = ring.Spectrum();

        spectrum.Eigenvalues.Select(Complex.Abs).Should().OnlyContain(modulus => Math.Abs(modulus - 1) <= Tolerances.FourRoundings);
        spectrum.SpectralGap.Should().Be(0);
        spectrum.RelaxationTime.Should().Be(double.PositiveInfinity);
        spectrum.NStep(1_000_000_000).Values.ToArray().Should().Equal(0, 1, 0, 0, 0, 1, 1, 0, 0);
    }

    [Fact]
    public void Each_recurrent_class_has_its_eigenvalue_one()
    {
        var pool = Chain.Build<string>(rows => rows
            .Row("use", ("use", 0.5), ("lost", 0.3), ("scrapped", 0.2)).Row("lost", ("lost", 1.0)).Row("scrapped", ("scrapped", 1.0)));
        var spectrum = pool.Spectrum();

        spectrum.Eigenvalues.Should().Equal(1, 1, 0.5);
        spectrum.SpectralGap.Should().Be(0);
        spectrum.NStep("use", 200)["lost"].Should().BeApproximately(0.6, Tolerances.FourRoundings);
    }

    [Fact]
    public void A_single_state_has_one_eigenvalue()
    {
        var spectrum = Chain.FromMatrix(new[,] { { 1.0 } }).Spectrum();

        spectrum.Eigenvalues.Should().Equal(Complex.One);
        spectrum.SubdominantEigenvalue.Should().BeNull();
        spectrum.SpectralGap.Should().Be(1);
        spectrum.ConditionNumber.Should().Be(1);
        spectrum.NStep(1000).Values.ToArray().Should().Equal(1);
    }

    [Fact]
    public void A_chain_without_a_full_set_of_vectors_says_so_and_proves_nothing()
    {
        // One Jordan block of order three for the eigenvalue one half.
        var ageing = Chain.FromMatrix(new[,] { { 0.5, 0.5, 0, 0 }, { 0, 0.5, 0.5, 0 }, { 0, 0, 0.5, 0.5 }, { 0, 0, 0, 1 } });
        var spectrum = ageing.Spectrum();
        var power = spectrum.NStep(7);

        spectrum.IsDiagonalizable.Should().BeFalse();
        spectrum.Certificate.IsProof.Should().BeFalse();
        spectrum.LeftVectors.SelectMany(vector => vector.Values.ToArray()).Should().OnlyContain(entry => Complex.IsFinite(entry));
        power.Certificate.Should().Match<Certificate>(certificate => !certificate.IsProof && certificate.AbsoluteErrorBound == double.PositiveInfinity);
        power.Invoking(result => result.Require(absoluteError: 0.1)).Should().Throw<AccuracyException>();
    }

    [Fact]
    public void Reversible_chains_take_the_symmetric_form_and_others_do_not()
    {
        ChainFamilies.Named("reflecting path").Create(8, 1).ToChain().Spectrum().HasOrthogonalVectors.Should().BeTrue();
        ChainFamilies.Named("random dense").Create(8, 1).ToChain().Spectrum().HasOrthogonalVectors.Should().BeFalse();
        ChainFamilies.Named("absorbing path").Create(8, 1).ToChain().Spectrum().HasOrthogonalVectors.Should().BeFalse();
        ChainFamilies.Named("identity").Create(4, 1).ToChain().Spectrum().IsDiagonalizable.Should().BeTrue();
    }

    [Theory]
    [InlineData(20)]
    [InlineData(129)]
    public void Eigenvalues_are_no_farther_from_those_of_MathNet_than_is_proved(int states)
    {
        var chain = ChainFamilies.Named("random dense").Create(states, 5).ToChain();
        var reference = chain.ToMatrix().Evd().EigenValues;
        var spectrum = chain.Spectrum();

        EigenChecks.LargestMismatch(spectrum.Eigenvalues.ToArray(), [.. reference])
            .Should().BeLessThan(spectrum.Certificate.AbsoluteErrorBound).And.BeLessThan(EigenChecks.Bound(states) * states);
    }

    [Fact]
    public void Spectra_are_refused_where_the_iteration_is_cancelled()
    {
        Weather.Invoking(chain => chain.Spectrum(new SolveOptions { CancellationToken = new CancellationToken(true) })).Should().Throw<OperationCanceledException>();
        Weather.Spectrum(new SolveOptions { CertificateLevel = CertificateLevel.None }).Certificate.Residual.Should().Be(double.PositiveInfinity);
    }

    /// <summary>The largest entry of |W V − I|.</summary>
    private static double LargestDefect(SpectralDecomposition<int> spectrum) =>
        (from left in Enumerable.Range(0, spectrum.Eigenvalues.Count)
         from right in Enumerable.Range(0, spectrum.Eigenvalues.Count)
         let product = EigenChecks.Product(spectrum.LeftVectors[left].Values.ToArray(), spectrum.RightVectors[right].Values.ToArray())
         select Complex.Abs(product - (left == right ? 1 : 0))).Max();
}
