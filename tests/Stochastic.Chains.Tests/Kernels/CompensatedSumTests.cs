using System.Numerics;
using Stochastic.Chains.Kernels;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Kernels;

public class CompensatedSumTests
{
    public static TheoryData<string> Families => ["probabilities", "graded", "cancelling", "ill-scaled", "subnormal", "increasing"];

    /// <summary>
    /// Ogita, Rump and Oishi (2005), SIAM J. Sci. Comput. 26, 1955–1988, proposition 4.5: |sum − exact| ≤ u |exact| + γ² Σ |term| with
    /// γ = (n − 1) u / (1 − (n − 1) u); checked with n in the place of (n − 1) / (1 − (n − 1) u), in whole numbers.
    /// </summary>
    [Theory]
    [MemberData(nameof(Families))]
    public void The_error_of_a_sum_is_within_the_published_bound(string family)
    {
        var random = new Random(2005);
        for (var round = 0; round < 200; round++)
        {
            var terms = Terms(family, 1 + random.Next(300), random);
            var exact = ExactSum.Of(terms);
            var size = ExactSum.Of(terms.Select(Math.Abs));
            var error = BigInteger.Abs(ExactSum.Scaled(CompensatedSum.Of(terms)) - exact);

            var bound = (BigInteger.Abs(exact) << 53) + (terms.Length * (BigInteger)terms.Length * size);
            ((error << 106) <= bound).Should().BeTrue($"round {round} of {family} has {terms.Length} terms");
        }
    }

    [Fact]
    public void A_plain_sum_breaks_the_same_bound_so_that_the_check_can_fail()
    {
        double[] terms = [1, .. Enumerable.Repeat(1e-16, 100)];
        var exact = ExactSum.Of(terms);

        var error = BigInteger.Abs(ExactSum.Scaled(terms.Sum()) - exact);

        ((error << 106) <= (exact << 53) + (101 * 101 * exact)).Should().BeFalse();
        CompensatedSum.Of(terms).Should().Be(1 + 1e-14);
    }

    [Fact]
    public void A_small_term_between_large_opposite_ones_is_not_lost()
    {
        CompensatedSum.Of([1e16, 1, -1e16]).Should().Be(1);
        CompensatedSum.Of([1, 1e100, 1, -1e100]).Should().Be(2);
    }

    [Fact]
    public void Nothing_sums_to_zero_and_one_term_to_itself()
    {
        CompensatedSum.Of([]).Should().Be(0);
        CompensatedSum.Of([double.Epsilon]).Should().Be(double.Epsilon);
    }

    [Fact]
    public void An_infinite_term_makes_the_sum_infinite()
    {
        CompensatedSum.Of([1, double.PositiveInfinity, 2]).Should().Be(double.PositiveInfinity);
        CompensatedSum.Of([1, double.NegativeInfinity]).Should().Be(double.NegativeInfinity);
    }

    [Fact]
    public void An_overflow_is_infinite_and_a_contradiction_is_not_a_number()
    {
        CompensatedSum.Of([double.MaxValue, double.MaxValue, 1]).Should().Be(double.PositiveInfinity);
        CompensatedSum.Of([double.PositiveInfinity, double.NegativeInfinity]).Should().Be(double.NaN);
        CompensatedSum.Of([1, double.NaN]).Should().Be(double.NaN);
    }

    private static double[] Terms(string family, int count, Random random)
    {
        double Scaled(int lowest, int highest) => Math.ScaleB(1 + random.NextDouble(), random.Next(lowest, highest));
        return family switch
        {
            "probabilities" => [.. Enumerable.Range(0, count).Select(_ => random.NextDouble() / count)],
            "graded" => [.. Enumerable.Range(0, count).Select(k => Math.ScaleB(1 + random.NextDouble(), -3 * k))],
            "cancelling" => [.. Enumerable.Range(0, count).Select(_ => Scaled(0, 60)).SelectMany(term => new[] { term, -term * (1 + 1e-15) }).OrderBy(_ => random.Next())],
            "ill-scaled" => [.. Enumerable.Range(0, count).Select(_ => Scaled(-1000, 1000) * (random.Next(2) == 0 ? 1 : -1))],
            "subnormal" => [.. Enumerable.Range(0, count).Select(_ => random.Next(1, 1000) * double.Epsilon)],
            _ => [.. Enumerable.Range(0, count).Select(k => Math.ScaleB(1 + random.NextDouble(), k))],
        };
    }
}
