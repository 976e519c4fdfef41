namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// Distributions after a time in <see cref="RoundedNumber"/>: Σ qᵏ/k! · v_k over Σ qᵏ/k!, with v_k the distribution after k steps and q the mean
/// number of steps. Sums, products and quotients of non-negative numbers only.
/// </summary>
internal static class RoundedTimes
{
    private const int SmallestPower = 400;
    private const int BitsKnown = 200;

    /// <summary>The distribution, each entry known to within <see cref="KnownTo"/>.</summary>
    public static Rational[] After(ExactChain chain, int start, Rational jumps)
    {
        var step = RoundedSteps.OneStep(chain);
        RoundedNumber[][] distribution = [RoundedSteps.Identity(chain.StateCount)[start]];
        var sums = new RoundedNumber[chain.StateCount];
        var (weight, total) = (RoundedNumber.Quotient(1, 1), default(RoundedNumber));
        for (var k = 0; !IsEnough(weight, jumps, k); k++)
        {
            for (var state = 0; state < sums.Length; state++)
            {
                sums[state] += weight * distribution[0][state];
            }

            total += weight;
            weight *= RoundedNumber.Quotient(jumps.Numerator, jumps.Denominator * (k + 1));
            distribution = RoundedSteps.Multiply(distribution, step);
        }

        return Array.ConvertAll(sums, sum => sum.ToRational() / total.ToRational());
    }

    /// <summary>Far fewer roundings are made than would cost 2⁻²⁰⁰ of an entry, and what was cut off is far below any double.</summary>
    public static Rational KnownTo(Rational entry) => (entry * Rational.Pow(2, -BitsKnown)) + Rational.Pow(10, 1 - SmallestPower);

    /// <summary>From k > 2 q on each weight is less than half the one before, so that all the rest is less than twice the next.</summary>
    private static bool IsEnough(RoundedNumber weight, Rational jumps, int k) =>
        (Rational)k > 2 * jumps && weight.ToRational() <= Rational.Pow(10, -SmallestPower);
}
