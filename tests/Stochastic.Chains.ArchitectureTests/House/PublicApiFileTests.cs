using Stochastic.Chains.ArchitectureTests.Sources;

namespace Stochastic.Chains.ArchitectureTests.House;

public class PublicApiFileTests
{
    [Theory]
    [InlineData("PublicAPI.Shipped.txt")]
    [InlineData("PublicAPI.Unshipped.txt")]
    public void The_list_of_the_public_face_is_sorted_and_has_no_line_twice(string file)
    {
        var lines = File.ReadAllLines(Path.Combine(Repository.LibraryFolder, file));

        lines.Should().NotBeEmpty();
        lines[0].Should().Be("#nullable enable");
        lines[1..].Should().OnlyHaveUniqueItems();
        lines[1..].Should().Equal(lines[1..].OrderBy(line => line, StringComparer.OrdinalIgnoreCase).ThenBy(line => line, StringComparer.Ordinal), "the analyzer's own fix keeps them so");
    }
}
