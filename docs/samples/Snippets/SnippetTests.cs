using System.Globalization;
using System.Reflection;
using FluentAssertions;
using Xunit;

namespace Snippets;

/// <summary>Runs every snippet of the documentation and compares what it prints with the output that the pages show.</summary>
public sealed class SnippetTests
{
    private static readonly string Outputs = Path.Combine(Repository.Samples, "Output");
    private static readonly string Printed = Directory.CreateDirectory(Path.Combine(AppContext.BaseDirectory, "Printed")).FullName;

    private static IEnumerable<MethodInfo> Snippets => typeof(SnippetTests).Assembly.GetTypes()
        .Where(type => type is { IsAbstract: true, IsSealed: true })
        .SelectMany(type => type.GetMethods(BindingFlags.Public | BindingFlags.Static | BindingFlags.DeclaredOnly))
        .Where(method => method.ReturnType == typeof(void) && method.GetParameters().Length == 0);

    public static TheoryData<string> Names => [.. Snippets.Select(NameOf).Order(StringComparer.Ordinal)];

    [Theory]
    [MemberData(nameof(Names))]
    public void PrintsWhatThePageShows(string name)
    {
        var printed = Run(Snippets.Single(method => NameOf(method) == name));
        File.WriteAllText(Path.Combine(Printed, name + ".txt"), printed);

        Repository.Read(Path.Combine(Outputs, name + ".txt")).Should().Be(printed);
    }

    [Fact]
    public void EveryOutputBelongsToASnippet() =>
        Directory.EnumerateFiles(Outputs).Select(Path.GetFileNameWithoutExtension).Should().BeEquivalentTo(Snippets.Select(NameOf));

    private static string NameOf(MethodInfo method) => $"{method.DeclaringType!.Name}.{method.Name}";

    private static string Run(MethodInfo snippet)
    {
        var (console, culture) = (Console.Out, CultureInfo.CurrentCulture);
        using var printed = new StringWriter(CultureInfo.InvariantCulture);
        try
        {
            Console.SetOut(printed);
            CultureInfo.CurrentCulture = CultureInfo.InvariantCulture;
            snippet.Invoke(null, null);
        }
        finally
        {
            Console.SetOut(console);
            CultureInfo.CurrentCulture = culture;
        }

        return printed.ToString().ReplaceLineEndings("\n");
    }
}
