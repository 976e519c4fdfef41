using MathNet.Numerics.Distributions;
using Stochastic.Chains.Estimation;
using Stochastic.Chains.Simulation;
using Xunit.Abstractions;

namespace Stochastic.Chains.Tests.Confidence;

/// <summary>
/// How often intervals of nominally 95 % hold the truth, on invented chains. For one probability the coverage is an exact sum over the binomial law; for other
/// answers counts are drawn from the true chain with a seed. Over so many rounds a coverage of 95 % scatters by 0.7 points either way.
/// </summary>
public sealed class CoverageTests(ITestOutputHelper output)
{
    private const int Rounds = 1000;
    private const int Draws = 199;
    private static readonly SolveOptions Plain = new() { CertificateLevel = CertificateLevel.None };

    [Fact]
    public void For_a_rare_move_the_simple_interval_fails_where_the_recommended_ones_hold()
    {
        // p = 0.02 from 200 observations: the exact coverage of each interval.
        var simple = ExactCoverage(0.02, 200, (count, total) =>
        {
            var half = Normal.InvCDF(0, 1, 0.975) * Math.Sqrt((double)count / total * (total - count) / total / total);
            return new Interval(((double)count / total) - half, ((double)count / total) + half, 0.95);
        });
        var score = ExactCoverage(0.02, 200, (count, total) => RowIntervals.Score(count, total, 0.95));
        var credible = ExactCoverage(0.02, 200, (count, total) => RowIntervals.Credible(count + 0.5, total - count + 0.5, 0.95));

        output.WriteLine($"simple {simple:P1}, score {score:P1}, Jeffreys {credible:P1}");
        simple.Should().BeLessThan(0.92);
        score.Should().BeInRange(0.93, 0.98);
        credible.Should().BeInRange(0.93, 0.97);
    }

    [Fact]
    public void Long_run_share_of_two_states_with_a_rare_move()
    {
        var truth = Chain.FromMatrix(new[,] { { 0.98, 0.02 }, { 0.30, 0.70 } });

        ShouldHoldItsLevel(truth, [200, 200], chain => chain.Stationary(Plain)[1], new() { Prior = DirichletPrior.Jeffreys<int>() });
    }

    [Fact]
    public void Long_run_share_of_a_dense_chain_of_five_states()
    {
        var truth = Chain.FromMatrix(new[,]
        {
            { 0.50, 0.20, 0.15, 0.10, 0.05 },
            { 0.10, 0.40, 0.20, 0.20, 0.10 },
            { 0.05, 0.15, 0.60, 0.10, 0.10 },
            { 0.20, 0.20, 0.20, 0.20, 0.20 },
            { 0.10, 0.05, 0.15, 0.30, 0.40 },
        });

        ShouldHoldItsLevel(truth, [100, 100, 100, 100, 100], chain => chain.Stationary(Plain)[2], new() { Prior = DirichletPrior.Jeffreys<int>() });
    }

    [Fact]
    public void Weeks_until_the_end_in_a_pool_of_crates()
    {
        // clean, at shop, dirty, in repair, lost, scrapped
        var truth = Chain.FromMatrix(new[,]
        {
            { 0.20, 0.80, 0.00, 0.00, 0.00, 0.00 },
            { 0.00, 0.50, 0.49, 0.00, 0.01, 0.00 },
            { 0.95, 0.00, 0.00, 0.05, 0.00, 0.00 },
            { 0.80, 0.00, 0.00, 0.00, 0.00, 0.20 },
            { 0.00, 0.00, 0.00, 0.00, 1.00, 0.00 },
            { 0.00, 0.00, 0.00, 0.00, 0.00, 1.00 },
        });

        ShouldHoldItsLevel(
            truth,
            [800, 1500, 700, 60, 0, 0],
            chain => chain.Absorption(Plain).MeanSteps(0),
            new() { UnseenMoves = UnseenMoves.Impossible, Unobserved = UnobservedStates.Absorbing });
    }

    private void ShouldHoldItsLevel(Chain<int> truth, long[] observations, Func<Chain<int>, double> answer, EstimateOptions<int> estimate)
    {
        var posterior = Coverage(truth, observations, answer, new() { Estimate = estimate, Draws = Draws });
        var bootstrap = Coverage(truth, observations, answer, new() { Estimate = estimate, Draws = Draws, Method = ConfidenceMethod.ParametricBootstrap });

        output.WriteLine($"posterior {posterior:P1}, bootstrap {bootstrap:P1}");
        posterior.Should().BeInRange(0.93, 0.97);
    }

    private static double Coverage(Chain<int> truth, long[] observations, Func<Chain<int>, double> answer, ConfidenceOptions<int> options)
    {
        var trueAnswer = answer(truth);
        var held = 0;
        for (var round = 0; round < Rounds; round++)
        {
            var confidence = DrawCounts(truth, observations, new RandomNumbers(2026, round)).Confidence(answer, options with { Seed = round });
            held += confidence.Interval.Contains(trueAnswer) ? 1 : 0;
        }

        return (double)held / Rounds;
    }

    /// <summary>Counts with so many observations in each row, as the true chain would give them.</summary>
    private static TransitionCounts<int> DrawCounts(Chain<int> truth, long[] observations, RandomNumbers stream)
    {
        var table = new long[truth.StateCount, truth.StateCount];
        for (var row = 0; row < truth.StateCount; row++)
        {
            var (left, rest) = (observations[row], 1.0);
            for (var column = 0; column < truth.StateCount; column++)
            {
                var drawn = column == truth.StateCount - 1 ? left : stream.NextBinomial(left, Math.Min(1, truth[row, column] / rest));
                table[row, column] = drawn;
                left -= drawn;
                rest = Math.Max(double.Epsilon, rest - truth[row, column]);
            }
        }

        return TransitionCounts.FromCounts(truth.States, table);
    }

    private static double ExactCoverage(double probability, int total, Func<long, long, Interval> interval) =>
        Enumerable.Range(0, total + 1).Where(count => interval(count, total).Contains(probability)).Sum(count => Binomial.PMF(probability, total, count));
}
