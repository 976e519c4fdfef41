using System.Reflection;
using System.Xml.Linq;

namespace Stochastic.Chains.ArchitectureTests.House;

/// <summary>The documentation file that is shipped beside the library.</summary>
internal static class XmlDocumentation
{
    private static readonly Dictionary<string, XElement> Members = XDocument.Load(Path.ChangeExtension(PublicSurface.Library.Location, ".xml"))
        .Descendants("member").ToDictionary(member => member.Attribute("name")!.Value);

    internal static int Count => Members.Count;

    internal static string SummaryOf(Type type) => Of(type)?.Element("summary")?.Value.Trim() ?? string.Empty;

    /// <summary>Whether the type shows an example, or, for a static class, one of its methods does.</summary>
    internal static bool HasExample(Type type) =>
        Of(type)?.Element("example") is not null
        || (type.IsAbstract && type.IsSealed && Members.Any(member => IsMethodOf(type, member.Key) && member.Value.Element("example") is not null));

    private static bool IsMethodOf(MemberInfo type, string key) => key.StartsWith($"M:{type.DeclaringType?.FullName ?? ((Type)type).FullName}.", StringComparison.Ordinal);

    private static XElement? Of(Type type) => Members.GetValueOrDefault($"T:{type.FullName!.Replace('+', '.')}");
}
