using System.Globalization;

namespace Stochastic.Chains.Tests.Support;

/// <summary>The cases whose input is a rule in words: which rule, with which arguments.</summary>
internal static class PublishedRules
{
    public static PublishedChain ChainFor(PublishedQuery query) => query.Case.Id switch
    {
        "EHRENFEST-20" => LineRules.Urn(20),
        "FELLER-RUIN" => LineRules.AbsorbingWalk(query.IntegerArgument("a"), query.RationalArgument("p")),
        "ERLANG-B" => LineRules.LossSystem(query.IntegerArgument("circuits"), query.RationalArgument("load")),
        "MM1K" => LineRules.Queue(10, new(4, 5), 1, new(9, 5)),
        "REPAIR-5" => LineRules.RepairShop(5, new(1, 10), 1),
        "MORAN" => LineRules.Moran(10, query.HasArgument("r") ? query.RationalArgument("r") : new(11, 10)),
        "COUPON" => LineRules.Collector(query.IntegerArgument("n")),
        "GRAPH-HITTING" => Graph(query.TextArgument("graph")!),
        "KNIGHT" => ChessRules.Walk("knight"),
        "CHESS-OTHERS" => ChessRules.Walk(query.TextArgument("piece")!),
        "PATTERN" => query.HasArgument("pattern")
            ? PatternRules.Coin(query.TextArgument("pattern")!)
            : PatternRules.Coin(query.TextArgument("first")!, query.TextArgument("second")!),
        "RUNS" => PatternRules.Run(query.IntegerArgument("r"), query.RationalArgument("p")),
        "RIFFLE-52" => query.TextArgument("chain") == "D" ? ShuffleRules.RiffleDescents(52) : ShuffleRules.RiffleRisingSequences(52),
        "CYCLE-12" => query.TextArgument("version") == "lazy" ? GraphRules.Lazy(GraphRules.Cycle(12)) : GraphRules.Cycle(12),
        "TOP-TO-RANDOM" => query.Name.StartsWith("absorption", StringComparison.Ordinal)
            ? ShuffleRules.BottomCardRises(52)
            : ShuffleRules.TopToRandom(4),
        "STRESS-PERIOD" => GraphRules.CycleWithShortcut(12, from: 5, chance: new(1, 3)),
        "LARGE-RULES" => Large(query.TextArgument("chain")!),
        var id => throw new InvalidOperationException($"No rule is known for case {id}."),
    };

    private static PublishedChain Graph(string words) => (words.Split(' ')[0], NumberIn(words)) switch
    {
        ("path", var vertices) => GraphRules.Path(vertices),
        ("cycle", var vertices) => GraphRules.Cycle(vertices),
        ("complete", var vertices) => GraphRules.Complete(vertices),
        ("star", var leaves) => GraphRules.Star(leaves),
        _ => throw new InvalidOperationException($"No graph is known as '{words}'."),
    };

    private static PublishedChain Large(string words) => (words.Split(' ')[0], NumberIn(words)) switch
    {
        ("urn", var balls) => LineRules.Urn(balls),
        ("queue", var room) => LineRules.Queue(room, 9, 10, 19),
        _ => Graph(words),
    };

    /// <summary>The first whole number in a description such as "star with 6 leaves".</summary>
    private static int NumberIn(string words) => words.Split(' ')
        .Select(word => int.TryParse(word, NumberStyles.None, CultureInfo.InvariantCulture, out var number) ? number : (int?)null)
        .First(number => number is not null)!.Value;
}
