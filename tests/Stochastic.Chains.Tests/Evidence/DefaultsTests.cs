using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Evidence;

public class DefaultsTests
{
    [Fact]
    public void A_solve_asks_for_proof_within_two_gibibytes_and_is_not_cancelled()
    {
        var options = new SolveOptions();

        options.CertificateLevel.Should().Be(CertificateLevel.Proof);
        options.CancellationToken.Should().Be(CancellationToken.None);
        options.Progress.Should().BeNull();
        options.MemoryLimit.Should().Be(2_147_483_648);
    }

    [Fact]
    public void A_certificate_that_says_nothing_bounds_nothing()
    {
        var certificate = new Certificate { Method = "m", Reason = "r" };

        certificate.Residual.Should().Be(double.PositiveInfinity);
        certificate.RelativeErrorBound.Should().Be(double.PositiveInfinity);
        certificate.AbsoluteErrorBound.Should().Be(double.PositiveInfinity);
        certificate.Basis.Should().Be(ErrorBasis.None);
        certificate.IsProof.Should().BeFalse();
        certificate.Iterations.Should().Be(0);
        ((int)default(ErrorBasis)).Should().Be((int)ErrorBasis.None, "no status may mean success by default");
    }

    [Fact]
    public void A_certificate_reads_the_same_in_every_culture()
    {
        using var culture = new CommaCulture();

        new Certificate { Method = "State reduction", Reason = "r", Residual = 1.5e-16, RelativeErrorBound = 2.5e-14, Basis = ErrorBasis.SubtractionFree, IsProof = true }
            .ToString().Should().Be("State reduction; residual 1.5E-16; relative error at most 2.5E-14 (proved: SubtractionFree)");
    }
}
