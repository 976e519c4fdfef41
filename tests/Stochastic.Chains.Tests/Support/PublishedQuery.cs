using System.Text.Json;

namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// One question about a published case and its answer. "exact" holds fractions where they are short; otherwise "values" holds decimals
/// correctly rounded to 17 significant digits.
/// </summary>
internal sealed class PublishedQuery(PublishedCase source, JsonElement root)
{
    public PublishedCase Case => source;

    public string Name => root.GetProperty("query").GetString()!;

    public JsonElement Arguments => root.GetProperty("args");

    public JsonElement Values => root.GetProperty("values");

    public string? Note => Text(root, "note");

    /// <summary>Where the printed figures were read, if that differs from the source of the case.</summary>
    public string? PublishedIn => Text(root, "published_in");

    /// <summary>Set where a printed figure is off; the value is what to test against.</summary>
    public bool HasPublishedMismatch => root.TryGetProperty("published_mismatch", out _);

    /// <summary>The figures as the source prints them, or null.</summary>
    public JsonElement? Published => Element(root, "published");

    /// <summary>The chain asked about, with the arguments of this query (a parameter, a graph, a piece...) applied.</summary>
    public PublishedChain Chain() => PublishedInput.ChainFor(this);

    public bool HasArgument(string name) => Arguments.TryGetProperty(name, out _);

    public string? TextArgument(string name) => Text(Arguments, name);

    public int IntegerArgument(string name) => Arguments.GetProperty(name).GetInt32();

    /// <summary>A list of states; a single number counts as a list of one.</summary>
    public int[] States(string name) => Arguments.GetProperty(name) is { ValueKind: JsonValueKind.Array } list
        ? [.. list.EnumerateArray().Select(item => item.GetInt32())]
        : [IntegerArgument(name)];

    public int[][] StateLists(string name) =>
        [.. Arguments.GetProperty(name).EnumerateArray().Select(list => list.EnumerateArray().Select(item => item.GetInt32()).ToArray())];

    public Rational RationalArgument(string name) => Rational.Parse(TextArgument(name)!);

    public PublishedNumber Scalar() => Numbers().Single();

    public PublishedNumber[] Vector() => Numbers();

    public PublishedNumber[][] Matrix() =>
    [
        .. Values.EnumerateArray().Select((row, i) => PublishedNumber.List(
            row,
            Element(root, "exact") is { } exact ? exact[i] : null)),
    ];

    /// <summary>One of several named answers, such as "duration".</summary>
    public PublishedNumber Member(string name) => PublishedNumber.List(
        Values.GetProperty(name),
        Element(root, "exact") is { } exact ? Element(exact, name) : null).Single();

    public override string ToString() => $"{source.Id} {Name} {Arguments.GetRawText()}";

    private PublishedNumber[] Numbers() => PublishedNumber.List(Values, Element(root, "exact"));

    private static JsonElement? Element(JsonElement parent, string name) =>
        parent.TryGetProperty(name, out var found) && found.ValueKind != JsonValueKind.Null ? found : null;

    private static string? Text(JsonElement parent, string name) =>
        Element(parent, name) is { ValueKind: JsonValueKind.String } found ? found.GetString() : null;
}
