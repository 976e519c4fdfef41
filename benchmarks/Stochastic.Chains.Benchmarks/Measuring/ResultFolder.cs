namespace Stochastic.Chains.Benchmarks.Measuring;

/// <summary>Where results are kept: benchmarks/results of the repository that the program was built in.</summary>
internal static class ResultFolder
{
    internal static string File(string name)
    {
        for (var folder = new DirectoryInfo(AppContext.BaseDirectory); folder is not null; folder = folder.Parent)
        {
            if (System.IO.File.Exists(Path.Combine(folder.FullName, "Stochastic.Chains.sln")))
            {
                return Path.Combine(folder.CreateSubdirectory("benchmarks/results").FullName, name);
            }
        }

        throw new DirectoryNotFoundException("The program lies outside the repository, so there is no folder of results.");
    }
}
