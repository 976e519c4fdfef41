using System.Globalization;
using System.Text.Json;

namespace Stochastic.Chains.Tests.Support;

/// <summary>One published worked example: where it comes from, its input and what is asked of it, as recorded.</summary>
internal sealed class PublishedCase
{
    private readonly JsonElement _root;

    public PublishedCase(JsonElement root)
    {
        _root = root;
        Queries = [.. root.GetProperty("queries").EnumerateArray().Select(query => new PublishedQuery(this, query))];
    }

    public string Id => _root.GetProperty("id").GetString()!;

    public string Title => _root.GetProperty("title").GetString()!;

    public string Source => _root.GetProperty("source").GetString()!;

    /// <summary>"found" was read in print; "memory" was recalled and then recomputed exactly.</summary>
    public string Provenance => _root.GetProperty("provenance").GetString()!;

    public string? Note => _root.GetProperty("note").GetString();

    public bool IsOwnMaking => _root.GetProperty("own_making").GetBoolean();

    public double SuggestedRelativeTolerance =>
        double.Parse(_root.GetProperty("suggested_rtol").GetString()!, CultureInfo.InvariantCulture);

    public IReadOnlyList<string> Capabilities =>
        [.. _root.GetProperty("capabilities").EnumerateArray().Select(capability => capability.GetString()!)];

    public JsonElement Input => _root.GetProperty("input");

    public string InputKind => Input.GetProperty("kind").GetString()!;

    public IReadOnlyList<PublishedQuery> Queries { get; }

    public override string ToString() => $"{Id}: {Title}. Source: {Source} ({Provenance})";
}
