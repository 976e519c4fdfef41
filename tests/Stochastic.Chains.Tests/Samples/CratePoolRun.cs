using System.Globalization;
using System.Text.RegularExpressions;
using CratePool;

namespace Stochastic.Chains.Tests.Samples;

/// <summary>One run of the crate pool sample, with what it printed; its folder goes when it is disposed.</summary>
public sealed partial class CratePoolRun : IDisposable
{
    private readonly DirectoryInfo _folder = Directory.CreateTempSubdirectory("crate-pool-");

    /// <summary>Runs on the invented log.</summary>
    public CratePoolRun()
        : this([], CancellationToken.None)
    {
    }

    private CratePoolRun(IEnumerable<string> arguments, CancellationToken cancellation)
    {
        using var output = new StringWriter(CultureInfo.InvariantCulture);
        using var errors = new StringWriter(CultureInfo.InvariantCulture);
        using var progress = new ConsoleProgress(errors, isShown: false);
        ExitCode = new Application(output, errors, progress, cancellation).Run([.. arguments, "--out", PictureFolder]);
        (Output, Errors) = (output.ToString(), errors.ToString());
    }

    public int ExitCode { get; }

    public string Output { get; }

    public string Errors { get; }

    public string PictureFolder => Path.Combine(_folder.FullName, "pictures");

    public static CratePoolRun With(params string[] arguments) => new(arguments, CancellationToken.None);

    public static CratePoolRun Cancelled() => new([], new CancellationToken(canceled: true));

    /// <summary>Runs on a log of these lines.</summary>
    public static CratePoolRun OnLog(IEnumerable<string> lines, params string[] arguments)
    {
        var path = Path.GetTempFileName();
        try
        {
            File.WriteAllLines(path, lines);
            return With([path, .. arguments]);
        }
        finally
        {
            File.Delete(path);
        }
    }

    /// <summary>The rows of a table below a heading that begins so: cells by the text of their first column.</summary>
    public IReadOnlyDictionary<string, string[]> Table(string heading, string firstColumn)
    {
        var rows = Output.Split(Environment.NewLine)
            .SkipWhile(line => !line.StartsWith(heading, StringComparison.Ordinal))
            .SkipWhile(line => !line.StartsWith("    " + firstColumn, StringComparison.Ordinal))
            .Skip(2)
            .TakeWhile(line => line.Length > 0)
            .Select(line => Gap().Split(line.Trim()))
            .ToDictionary(cells => cells[0], cells => cells[1..]);
        rows.Should().NotBeEmpty();
        return rows;
    }

    public void Dispose() => _folder.Delete(recursive: true);

    [GeneratedRegex(" {3,}")]
    private static partial Regex Gap();
}
