using System.Globalization;
using CratePool.Pictures;
using CratePool.Report;
using Stochastic.Chains;

namespace CratePool;

/// <summary>Reads the log, writes the report and draws the pictures.</summary>
internal sealed class Application(TextWriter output, TextWriter errors, ConsoleProgress progress, CancellationToken cancellation)
{
    internal const int Failed = 1;
    private const int Cancelled = 130;

    private const string HowToRead =
        "How the log is to be read is told with --crate-column, --time-column, --stage-column, --separator, --time-format and --zone; --help explains them.";

    /// <summary>Runs once.</summary>
    /// <returns>The exit code.</returns>
    internal int Run(IReadOnlyList<string> arguments)
    {
        try
        {
            return new CommandLine().Invoke(arguments, output, errors, Answer);
        }
        catch (OperationCanceledException)
        {
            return End(Cancelled, "Cancelled; nothing more was written.");
        }
        catch (EventLogException refused)
        {
            return End(Failed, refused.Message + Environment.NewLine + HowToRead);
        }
        catch (Exception refused) when (refused is InvalidChainException or ChainStructureException or UnusableLogException or IOException or UnauthorizedAccessException)
        {
            return End(Failed, refused.Message);
        }
    }

    private int Answer(PoolOptions options)
    {
        var pool = Pool.Of(options, PoolLog.Count(options, progress, cancellation));
        using var report = new StringWriter(CultureInfo.InvariantCulture);
        PoolReport.Write(report, pool, new SolveOptions { Progress = progress, CancellationToken = cancellation });
        progress.Clear();
        output.Write(report);
        progress.Show("drawing the pictures");
        var pictures = PoolPictures.Draw(pool, cancellation);
        progress.Clear();
        output.Paragraph($"Pictures: {string.Join(", ", pictures)}");
        return 0;
    }

    private int End(int exitCode, string message)
    {
        progress.Clear();
        errors.WriteLine(message);
        return exitCode;
    }
}
