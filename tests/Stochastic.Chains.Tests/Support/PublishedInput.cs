using System.Text.Json;

namespace Stochastic.Chains.Tests.Support;

/// <summary>Turns the recorded inputs of published cases into chains.</summary>
internal static class PublishedInput
{
    public static PublishedChain ChainFor(PublishedQuery query)
    {
        var chain = Expand(query);
        return query.HasArgument("restart") ? chain.WithRestart(query.RationalArgument("restart")) : chain;
    }

    /// <summary>The observed transition counts of a case that has them; groups are added up.</summary>
    public static long[][] Counts(PublishedCase published) => published.InputKind switch
    {
        "counts" => Integers(published.Input.GetProperty("counts")),
        "counts_groups" => published.Input.GetProperty("groups").EnumerateArray().Select(Integers).Aggregate(Sum),
        _ => throw new InvalidOperationException($"{published.Id} has no counts."),
    };

    /// <summary>One of the named matrices of a case whose queries speak of several.</summary>
    public static PublishedChain Matrix(PublishedCase published, string name) =>
        PublishedChain.FromRows(Rationals(published.Input.GetProperty("matrices").GetProperty(name)));

    private static PublishedChain Expand(PublishedQuery query)
    {
        var input = query.Case.Input;
        return query.Case.InputKind switch
        {
            "dtmc_dense" => PublishedChain.FromRows(Rationals(input.GetProperty("rows"))),
            "dtmc_triplets" => FromTriplets(input),
            "several_triplets" => FromTriplets(input.GetProperty(query.TextArgument("chain")!)),
            "several" => throw new InvalidOperationException($"{query.Case.Id} has several matrices: ask for each by name."),
            "ctmc" => FromGenerator(input.GetProperty("generator")),
            "counts" or "counts_groups" => PublishedChain.FromWeights(
                [.. Counts(query.Case).Select(row => row.Select(count => (Rational)count).ToArray())]),
            "graph_edges" => FromEdges(input),
            "rule" => PublishedRules.ChainFor(query),
            var kind => throw new InvalidOperationException($"{query.Case.Id}: input kind '{kind}' is unknown."),
        };
    }

    private static PublishedChain FromTriplets(JsonElement input) => PublishedChain.FromOffDiagonals(
        input.GetProperty("n").GetInt32(),
        input.GetProperty("triplets").EnumerateArray()
            .Select(entry => (entry[0].GetInt32(), entry[1].GetInt32(), Rational.Parse(entry[2].GetString()!))));

    /// <summary>
    /// Only the off-diagonal rates are read. One unit of time is one step (P = I + Q), which the rates of these cases allow.
    /// </summary>
    private static PublishedChain FromGenerator(JsonElement generator) => PublishedChain.FromRates(
        generator.GetArrayLength(),
        from i in Enumerable.Range(0, generator.GetArrayLength())
        from j in Enumerable.Range(0, generator.GetArrayLength())
        where i != j
        select (i, j, Rational.Parse(generator[i][j].GetString()!)),
        uniformizationRate: 1);

    private static PublishedChain FromEdges(JsonElement input)
    {
        var neighbours = Enumerable.Range(0, input.GetProperty("n").GetInt32()).Select(_ => new List<int>()).ToArray();
        foreach (var edge in input.GetProperty("edges").EnumerateArray())
        {
            neighbours[edge[0].GetInt32()].Add(edge[1].GetInt32());
            neighbours[edge[1].GetInt32()].Add(edge[0].GetInt32());
        }

        return PublishedChain.FromNeighbours(neighbours);
    }

    private static Rational[][] Rationals(JsonElement rows) =>
        [.. rows.EnumerateArray().Select(row => row.EnumerateArray().Select(item => Rational.Parse(item.GetString()!)).ToArray())];

    private static long[][] Integers(JsonElement rows) =>
        [.. rows.EnumerateArray().Select(row => row.EnumerateArray().Select(item => item.GetInt64()).ToArray())];

    private static long[][] Sum(long[][] left, long[][] right) =>
        [.. left.Zip(right, (leftRow, rightRow) => leftRow.Zip(rightRow, (a, b) => a + b).ToArray())];
}
