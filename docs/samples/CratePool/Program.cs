namespace CratePool;

/// <summary>Answers questions about a pool of reusable crates from its scan log.</summary>
public static class Program
{
    /// <summary>Runs.</summary>
    /// <param name="args">The log and options.</param>
    public static int Main(string[] args) => args is null ? 1 : 0;
}
