using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Stationary;

/// <summary>Two groups of states that hardly ever exchange anything: where methods that subtract lose what they compute.</summary>
public class WeakCouplingTests
{
    [Fact]
    public void Lu_and_eigenvectors_report_a_bound_that_covers_what_they_lose_at_weak_coupling()
    {
        // Two groups of three states; from one to the other a move in 10^12, back one in 3 · 10^11.
        const double there = 1e-12;
        const double back = 3e-12;
        var matrix = new[,]
        {
            { 0.2, 0.5, 0.3 - there, there, 0, 0 },
            { 0.3, 0.3, 0.4, 0, 0, 0 },
            { 0.6, 0.3, 0.1, 0, 0, 0 },
            { 0, 0, 0, 0.1, 0.7, 0.2 },
            { 0, 0, 0, 0.4, 0.5, 0.1 },
            { back, 0, 0, 0.3, 0.4, 0.3 - back },
        };
        var chain = Chain.FromMatrix(matrix);
        var exact = ExactChain.FromMatrix(matrix).Stationary();

        foreach (var method in new IStationaryMethod[] { new LinearSystemMethod(), new EigenMethod() })
        {
            chain.TryStationary(method, new SolveOptions(), out var shares);
            var error = shares.ToArray().Zip(exact, (computed, truth) => truth.RelativeDifference(computed)).Max();

            error.Should().BeGreaterThan(1e-8, "the loss is what the certificate has to show");
            shares.Certificate.RelativeErrorBound.Should().BeGreaterThanOrEqualTo(error, method.Name);
            shares.Certificate.AbsoluteErrorBound.Should().BeGreaterThanOrEqualTo(LargestDifference(shares, exact), method.Name).And.BeLessThan(0.01);
        }

        chain.Stationary().Certificate.RelativeErrorBound.Should().BeLessThanOrEqualTo(Tolerances.FourRoundings);
    }

    private static double LargestDifference(StationaryDistribution<int> shares, Rational[] exact) =>
        shares.ToArray().Zip(exact, (computed, truth) => Rational.Abs(Rational.FromDouble(computed) - truth).ToDouble()).Max();
}
