using Stochastic.Chains.ArchitectureTests.Sources;

namespace Stochastic.Chains.ArchitectureTests.House;

public class CultureTests
{
    private const int FewestHoles = 60;

    [Fact]
    public void No_text_depends_on_the_culture_of_the_machine()
    {
        CultureRule.HolesSeen(LibrarySource.Library).Should().BeGreaterThan(FewestHoles);
        CultureRule.Violations(LibrarySource.Library).Should().BeEmpty("numbers go through Text, or through string.Create with the invariant culture");
    }

    [Theory]
    [InlineData("$\"{1.5}\"")]
    [InlineData("$\"{count}\"")]
    [InlineData("$\"{maybe:G3}\"")]
    [InlineData("$\"{System.DateTime.UnixEpoch}\"")]
    [InlineData("\"a\" + 1.5")]
    [InlineData("1.5.ToString(\"G3\")")]
    [InlineData("count.ToString()")]
    [InlineData("string.Create(System.Globalization.CultureInfo.InvariantCulture, $\"{$\"{1.5}\"}\")")]
    public void The_rule_finds(string expression)
    {
        Violations(expression).Should().ContainSingle();
    }

    [Theory]
    [InlineData("$\"{text} {System.DayOfWeek.Friday}\"")]
    [InlineData("string.Create(System.Globalization.CultureInfo.InvariantCulture, $\"{1.5:G3}\")")]
    [InlineData("FormattableString.Invariant($\"{1.5}\")")]
    [InlineData("1.5.ToString(\"G3\", System.Globalization.CultureInfo.InvariantCulture)")]
    [InlineData("count.ToString(System.Globalization.CultureInfo.InvariantCulture)")]
    [InlineData("\"a\" + text")]
    public void The_rule_lets_pass(string expression)
    {
        Violations(expression).Should().BeEmpty();
    }

    private static IEnumerable<string> Violations(string expression)
    {
        var compilation = LibrarySource.Compile([("Model/Fixture.cs", $"class Fixture {{ string F(int count, double? maybe, string text) => {expression}; }}")]);
        compilation.GetDiagnostics().Where(diagnostic => diagnostic.Severity == Microsoft.CodeAnalysis.DiagnosticSeverity.Error).Should().BeEmpty();
        return CultureRule.Violations(compilation);
    }
}
