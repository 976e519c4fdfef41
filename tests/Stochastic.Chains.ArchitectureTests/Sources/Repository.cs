namespace Stochastic.Chains.ArchitectureTests.Sources;

/// <summary>Finds the files of the repository that the tests were built from.</summary>
internal static class Repository
{
    internal static string Root { get; } = FindRoot();

    internal static string LibraryFolder { get; } = Path.Combine(Root, "src", "Stochastic.Chains");

    private static string FindRoot()
    {
        var folder = new DirectoryInfo(AppContext.BaseDirectory);
        while (folder is not null && !File.Exists(Path.Combine(folder.FullName, "Stochastic.Chains.sln")))
        {
            folder = folder.Parent;
        }

        return folder?.FullName ?? throw new InvalidOperationException($"No folder above {AppContext.BaseDirectory} holds Stochastic.Chains.sln.");
    }
}
