using System.Text.Json;

namespace Stochastic.Chains.Tests.Support;

/// <summary>All published cases, read from the JSON files embedded beside the tests.</summary>
internal static class PublishedCases
{
    private const string Folder = "PublishedCases/";

    public static IReadOnlyList<PublishedCase> All { get; } =
    [
        .. typeof(PublishedCases).Assembly.GetManifestResourceNames()
            .Where(name => name.StartsWith(Folder, StringComparison.Ordinal))
            .Order(StringComparer.Ordinal)
            .Select(Read),
    ];

    public static PublishedCase Named(string id) => All.Single(published => published.Id == id);

    /// <summary>All questions of one kind, over all cases.</summary>
    public static IEnumerable<PublishedQuery> Queries(string name) =>
        All.SelectMany(published => published.Queries).Where(query => query.Name == name);

    private static PublishedCase Read(string resource)
    {
        using var stream = typeof(PublishedCases).Assembly.GetManifestResourceStream(resource)!;
        using var document = JsonDocument.Parse(stream);
        return new(document.RootElement.Clone());
    }
}
