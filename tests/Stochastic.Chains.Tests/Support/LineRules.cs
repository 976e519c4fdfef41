namespace Stochastic.Chains.Tests.Support;

/// <summary>Chains on 0..n that move to neighbours only: urn, ruin, queues, repair, population, collecting.</summary>
internal static class LineRules
{
    /// <summary>Ehrenfest urn: i to i - 1 with i/N, to i + 1 with (N - i)/N.</summary>
    public static PublishedChain Urn(int balls) =>
        Line(balls, i => new(balls - i, balls), i => new(i, balls));

    /// <summary>Gambler's ruin: both ends absorb, up with p, down with 1 - p.</summary>
    public static PublishedChain AbsorbingWalk(int top, Rational up) =>
        Line(top, i => i == 0 || i == top ? 0 : up, i => i == 0 || i == top ? 0 : 1 - up);

    /// <summary>Circuits busy under a Poisson load and unit mean holding time; uniformized with load + circuits.</summary>
    public static PublishedChain LossSystem(int circuits, Rational load) =>
        Line(circuits, _ => load, i => i, load + circuits);

    /// <summary>A single server with room for a number of customers.</summary>
    public static PublishedChain Queue(int room, Rational birth, Rational death, Rational uniformizationRate) =>
        Line(room, _ => birth, _ => death, uniformizationRate);

    /// <summary>Machines down, one repairman; uniformized with the largest failure rate plus the repair rate.</summary>
    public static PublishedChain RepairShop(int machines, Rational failure, Rational repair) =>
        Line(machines, i => (machines - i) * failure, _ => repair, (machines * failure) + repair);

    /// <summary>Moran process: up r i/(r i + N - i) · (N - i)/N, down (N - i)/(r i + N - i) · i/N, else stay.</summary>
    public static PublishedChain Moran(int population, Rational fitness)
    {
        return Line(
            population,
            i => fitness * i / Total(i) * (population - i) / population,
            i => (population - i) / Total(i) * i / population);

        Rational Total(int mutants) => (fitness * mutants) + population - mutants;
    }

    /// <summary>Distinct coupons so far: i to i + 1 with (n - i)/n, else stay.</summary>
    public static PublishedChain Collector(int coupons) => Line(coupons, i => new(coupons - i, coupons), _ => 0);

    private static PublishedChain Line(int top, Func<int, Rational> up, Func<int, Rational> down) =>
        PublishedChain.FromOffDiagonals(top + 1, Moves(top, up, down));

    private static PublishedChain Line(int top, Func<int, Rational> up, Func<int, Rational> down, Rational uniformizationRate) =>
        PublishedChain.FromRates(top + 1, Moves(top, up, down), uniformizationRate);

    private static IEnumerable<(int From, int To, Rational Amount)> Moves(int top, Func<int, Rational> up, Func<int, Rational> down)
    {
        for (var i = 0; i <= top; i++)
        {
            if (i > 0)
            {
                yield return (i, i - 1, down(i));
            }

            if (i < top)
            {
                yield return (i, i + 1, up(i));
            }
        }
    }
}
