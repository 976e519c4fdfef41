namespace Stochastic.Chains.ArchitectureTests.House;

public class DocumentationTests
{
    private const int FewestDocumentedMembers = 150;
    private const int FewestExceptions = 4;

    /// <summary>Public types that show no example, each with the reason.</summary>
    private static readonly Dictionary<string, string> WithoutExample = new()
    {
        ["ICertified"] = "a user reads it through a result, whose example shows it",
        ["SolveProgress"] = "arrives through the progress of SolveOptions, never made by a user",
        ["NumericalRangeException"] = "nothing is done with it but to read its message",
    };

    [Fact]
    public void Every_public_type_shows_an_example_or_is_listed_with_the_reason()
    {
        XmlDocumentation.Count.Should().BeGreaterThan(FewestDocumentedMembers);
        var without = PublicSurface.Types.Where(type => !type.IsEnum && !XmlDocumentation.HasExample(type)).Select(PublicSurface.NameOf).ToList();

        without.Except(WithoutExample.Keys).Should().BeEmpty("each needs an <example>, or its line with the reason in WithoutExample");
        WithoutExample.Keys.Except(without).Should().BeEmpty("each of these has an example now, or is gone");
    }

    [Fact]
    public void Every_exception_is_sealed_and_says_what_it_means()
    {
        var exceptions = PublicSurface.Types.Where(type => type.IsSubclassOf(typeof(Exception))).ToList();

        exceptions.Count.Should().BeGreaterThanOrEqualTo(FewestExceptions);
        exceptions.Where(type => !type.IsSealed).Should().BeEmpty();
        exceptions.Where(type => !type.Name.EndsWith("Exception", StringComparison.Ordinal)).Should().BeEmpty();
        exceptions.Where(type => XmlDocumentation.SummaryOf(type).Length < 40).Select(type => type.Name).Should().BeEmpty("a summary is a sentence");
    }

    [Fact]
    public void Exceptions_carry_the_facts_of_the_refusal_so_users_cannot_make_them_empty()
    {
        PublicSurface.Types.Where(type => type.IsSubclassOf(typeof(Exception))).SelectMany(PublicSurface.Constructors)
            .Where(constructor => constructor.GetParameters().Length == 0).Select(constructor => constructor.DeclaringType!.Name).Should().BeEmpty();
    }
}
