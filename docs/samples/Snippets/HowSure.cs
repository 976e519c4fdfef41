using Stochastic.Chains;

namespace Snippets;

/// <summary>How far estimates can be trusted. All counts and paths are invented.</summary>
internal static class HowSure
{
    private static TransitionCounts<string> Crates { get; } = TransitionCounts.FromCounts(
        ["clean", "at shop", "dirty", "lost"],
        new long[,] { { 120, 480, 0, 0 }, { 0, 610, 540, 4 }, { 530, 0, 16, 0 }, { 0, 0, 0, 0 } });

    public static void Estimate()
    {
        TransitionCounts<string> counts = Crates;
        #region estimate
        // A crate in "lost" stays there: that row is known, not estimated.
        var options = new EstimateOptions<string> { Unobserved = UnobservedStates.Absorbing };
        TransitionEstimate<string> estimate = counts.Estimate(options);

        Console.WriteLine(estimate);
        Console.WriteLine($"Lost in a week at the shop: {estimate["at shop", "lost"]:P2}, between {estimate.Interval("at shop", "lost").Lower:P2} and {estimate.Interval("at shop", "lost").Upper:P2}");
        foreach (ThinRow<string> row in estimate.ThinRows)
        {
            Console.WriteLine($"Few observations: {row.State}, {row.Count}");
        }
        #endregion
    }

    public static void Prior()
    {
        TransitionCounts<string> counts = Crates;
        #region prior
        var options = new EstimateOptions<string>
        {
            Prior = DirichletPrior.Jeffreys<string>(),
            UnseenMoves = UnseenMoves.Impossible,
            Unobserved = UnobservedStates.Absorbing,
        };
        TransitionEstimate<string> estimate = counts.Estimate(options);

        Interval lost = estimate.Interval("at shop", "lost");
        Console.WriteLine($"Lost in a week at the shop: {estimate["at shop", "lost"]:P2}, with 95 % probability between {lost.Lower:P2} and {lost.Upper:P2}");
        #endregion
    }

    public static void Tests()
    {
        #region tests
        // An invented machine that always rests after exactly three weeks of work, for 40 rounds.
        string[] path = [.. Enumerable.Range(0, 160).Select(week => week % 4 < 3 ? "works" : "rests")];
        TransitionCounts<string> counts = TransitionCounts.FromPaths([path], new PathOptions<string> { KeepsHistory = true });

        Console.WriteLine(counts.TestIndependence().Finding);
        Console.WriteLine(counts.TestSecondOrder().Finding);
        Console.WriteLine(counts.TestStayLengths("works").Finding);
        #endregion
    }

    public static void Homogeneity()
    {
        #region homogeneity
        var summer = TransitionCounts.FromCounts(["out", "back"], new long[,] { { 300, 100 }, { 90, 60 } });
        var winter = TransitionCounts.FromCounts(["out", "back"], new long[,] { { 310, 60 }, { 70, 80 } });
        ChainTest test = new[] { ("summer", summer), ("winter", winter) }.TestHomogeneity();

        Console.WriteLine(test.Finding);
        foreach (TestedCell cell in test.Cells.Take(2))
        {
            Console.WriteLine($"{cell.Row}, {cell.Table} to {cell.Column}: {cell.Observed} counted, {cell.Expected:F1} expected");
        }
        #endregion
    }

    public static void Answer()
    {
        TransitionCounts<string> counts = Crates;
        #region answer
        var options = new ConfidenceOptions<string>
        {
            Estimate = new EstimateOptions<string> { UnseenMoves = UnseenMoves.Impossible, Unobserved = UnobservedStates.Absorbing },
            Draws = 4000,
            Seed = 2026,
        };
        AnswerConfidence weeks = counts.Confidence(chain => chain.TimeTo("lost").Mean("clean"), options);

        Console.WriteLine($"A crate lives {weeks.Estimate / 52:F0} years; with 95 % probability between {weeks.Interval.Lower / 52:F0} and {weeks.Interval.Upper / 52:F0}");
        Console.WriteLine($"{weeks.Draws} chains drawn, {weeks.StructurallyDifferentDraws} of another structure, {weeks.RefusedDraws} without an answer");
        #endregion
    }

    public static void Slope()
    {
        TransitionCounts<string> counts = Crates;
        #region slope
        var ends = new EstimateOptions<string> { Unobserved = UnobservedStates.Absorbing };
        DeltaConfidence weeks = counts.TimeError("clean", "lost", ends);

        Console.WriteLine($"A crate lives {weeks.Estimate / 52:F0} years, give or take {weeks.StandardError / 52:F0}");
        #endregion
    }

    public static void Numbers()
    {
        #region numbers
        var stream = new RandomNumbers(seed: 42, number: 7);
        Console.WriteLine($"{stream.NextBits():X16} {stream.NextBits():X16}");
        #endregion
    }
}
