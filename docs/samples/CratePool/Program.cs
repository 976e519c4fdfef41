namespace CratePool;

/// <summary>Answers questions about a pool of reusable crates from its scan log.</summary>
public static class Program
{
    /// <summary>Runs until the report is written or Ctrl+C is pressed.</summary>
    /// <param name="args">The log and options; --help lists them.</param>
    /// <returns>0 when the report was written, 1 when the log or an option is no good, 130 when cancelled.</returns>
    public static int Main(string[] args)
    {
        ArgumentNullException.ThrowIfNull(args);
        using var cancellation = new CancellationTokenSource();
        Console.CancelKeyPress += (_, pressed) =>
        {
            pressed.Cancel = true;
            cancellation.Cancel();
        };
        using var progress = new ConsoleProgress(Console.Error, isShown: !Console.IsErrorRedirected);
        return new Application(Console.Out, Console.Error, progress, cancellation.Token).Run(args);
    }
}
