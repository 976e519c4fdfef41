using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Stationary;

/// <summary>Two groups of states that hardly ever exchange anything: where methods that subtract lose what they compute.</summary>
public class WeakCouplingTests
{
    private const double There = 1e-12;
    private const double Back = 3e-12;

    /// <summary>Two groups of three states; from one to the other a move in 10¹², back one in 3 · 10¹¹.</summary>
    private static readonly double[,] Matrix =
    {
        { 0.2, 0.5, 0.3 - There, There, 0, 0 },
        { 0.3, 0.3, 0.4, 0, 0, 0 },
        { 0.6, 0.3, 0.1, 0, 0, 0 },
        { 0, 0, 0, 0.1, 0.7, 0.2 },
        { 0, 0, 0, 0.4, 0.5, 0.1 },
        { Back, 0, 0, 0.3, 0.4, 0.3 - Back },
    };

    private static readonly Rational[] Exact = ExactChain.FromMatrix(Matrix).Stationary();

    public static TheoryData<string> MethodsThatSubtract => ["linear system (LU)", "eigenvector (QR iteration)"];

    [Theory]
    [MemberData(nameof(MethodsThatSubtract))]
    public void Lu_and_eigenvectors_report_a_bound_that_covers_what_they_lose(string name)
    {
        var shares = Chain.FromMatrix(Matrix).Stationary(StationaryMethods.Named(name));

        WorstError(shares).Should().BeGreaterThan(1e-8, "the loss is what the certificate has to show");
        shares.Certificate.RelativeErrorBound.Should().BeGreaterThanOrEqualTo(WorstError(shares));
        shares.Certificate.AbsoluteErrorBound.Should().BeGreaterThanOrEqualTo(LargestDifference(shares)).And.BeLessThan(0.01);
    }

    [Theory]
    [MemberData(nameof(MethodsThatSubtract))]
    [InlineData("power method")]
    [InlineData("Gauss-Seidel method")]
    public void Polished_shares_of_any_method_are_right_to_the_last_digits_and_proved_so(string name)
    {
        foreach (var chain in new[] { Chain.FromMatrix(Matrix), Chain.FromMatrix(Matrix).AsSparse() })
        {
            var shares = chain.Stationary(new PolishedMethod(StationaryMethods.Named(name)));

            shares.Certificate.Method.Should().Be($"{name}, polished");
            shares.Certificate.Reason.Should().Contain("Then refined");
            shares.Certificate.Basis.Should().Be(ErrorBasis.RefinedMonotone);
            shares.Certificate.RelativeErrorBound.Should().BeLessThanOrEqualTo(Tolerances.FourRoundings);
            WorstError(shares).Should().BeLessThanOrEqualTo(shares.Certificate.RelativeErrorBound);
        }
    }

    [Fact]
    public void Shares_are_polished_at_every_level_of_evidence()
    {
        var polished = new PolishedMethod(new LinearSystemMethod());

        var shares = Chain.FromMatrix(Matrix).Stationary(polished, new SolveOptions { CertificateLevel = CertificateLevel.None });

        WorstError(shares).Should().BeLessThanOrEqualTo(Tolerances.FourRoundings);
        shares.Certificate.IsProof.Should().BeFalse();
    }

    [Fact]
    public void Shares_that_are_proved_already_or_cannot_be_refined_are_left_as_they_are()
    {
        var proved = Chain.FromMatrix(Matrix).Stationary(new PolishedMethod(new EliminationMethod()));
        proved.ToArray().Should().Equal(Chain.FromMatrix(Matrix).Stationary(new EliminationMethod()).ToArray());

        // The coupling is far below what refinement can follow.
        var torn = Chain.FromMatrix(new[,] { { 0.5, 0.5 - 1e-16, 1e-40, 0 }, { 0.25, 0.75, 0, 0 }, { 0, 2e-40, 0.5, 0.5 }, { 0, 0, 0.75, 0.25 } });
        var method = new PowerMethod { MaxIterations = 50 };
        torn.TryStationary(method, new SolveOptions(), out var given);
        torn.TryStationary(new PolishedMethod(method), new SolveOptions(), out var polished);
        polished.ToArray().Should().Equal(given.ToArray());
        polished.Certificate.Reason.Should().Contain("Left as it was");
        polished.Certificate.IsProof.Should().Be(given.Certificate.IsProof);
    }

    private static double WorstError(StationaryDistribution<int> shares) =>
        shares.ToArray().Zip(Exact, (computed, truth) => truth.RelativeDifference(computed)).Max();

    private static double LargestDifference(StationaryDistribution<int> shares) =>
        shares.ToArray().Zip(Exact, (computed, truth) => Rational.Abs(Rational.FromDouble(computed) - truth).ToDouble()).Max();
}
