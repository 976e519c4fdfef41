using Stochastic.Chains.ArchitectureTests.House;

namespace Stochastic.Chains.ArchitectureTests.Words;

public class WordTests
{
    private const int FewestWords = 60;

    /// <summary>Names of .NET itself, which every reader of C# knows.</summary>
    private static readonly HashSet<string> Ordinary =
    [
        "Count", "Item", "Values", "ToString", "Equals", "GetHashCode", "GetEnumerator", "Deconstruct", "Contains", "ContainsKey", "TryGetValue",
        "IndexOf", "ToArray", "Comparer", "Message", "PrintMembers", "Name", "Dispose",
    ];

    [Fact]
    public void Every_public_name_is_in_the_list_of_words()
    {
        var names = PublicNames();
        var listed = WordList.Read().Select(word => word.Name).ToHashSet();

        names.Count.Should().BeGreaterThan(FewestWords);
        var missing = names.Keys.Except(listed).Order(StringComparer.Ordinal).ToList();
        missing.Should().BeEmpty(
            "docs/decisions/words.md lists each public type, method and property with the textbook, paper or standard that uses it. Add, and fill in:{0}{1}{0}",
            Environment.NewLine,
            string.Join(Environment.NewLine, missing.Select(name => $"| `{name}` | ({names[name]}) | coined here |")));
    }

    [Fact]
    public void Every_listed_word_is_a_public_name()
    {
        WordList.Read().Select(word => word.Name).Except(PublicNames().Keys).Should().BeEmpty("these rows of docs/decisions/words.md are about names that are gone");
    }

    [Fact]
    public void Each_word_is_listed_once_with_a_meaning_and_a_source_in_order()
    {
        var words = WordList.Read();

        words.Count.Should().BeGreaterThan(FewestWords);
        words.Select(word => word.Name).Should().OnlyHaveUniqueItems().And.BeInAscendingOrder(StringComparer.Ordinal);
        words.Where(word => word.Meaning.Length == 0 || word.Meaning.StartsWith('(')).Select(word => word.Name).Should().BeEmpty("each has its meaning");
        words.Where(word => word.UsedBy != "coined here" && !word.UsedBy.Any(char.IsDigit) && !word.UsedBy.StartsWith(".NET", StringComparison.Ordinal) && word.UsedBy != "general mathematics")
            .Select(word => $"{word.Name}: {word.UsedBy}").Should().BeEmpty("a source has its year or number");
    }

    /// <summary>The public names beyond the ordinary, each with the places where it stands.</summary>
    private static Dictionary<string, string> PublicNames()
    {
        var places = PublicSurface.Types.Select(type => (Name: PublicSurface.NameOf(type), Place: "a type"))
            .Concat(from type in PublicSurface.Types
                    where !type.IsEnum
                    from member in PublicSurface.Methods(type).Concat<System.Reflection.MemberInfo>(PublicSurface.Properties(type))
                    where !member.Name.Contains('.', StringComparison.Ordinal)
                    select (member.Name, Place: $"of {PublicSurface.NameOf(type)}"));
        return places.Where(name => !Ordinary.Contains(name.Name)).GroupBy(name => name.Name)
            .ToDictionary(name => name.Key, name => string.Join(", ", name.Select(at => at.Place).Distinct()));
    }
}
