using System.Text;

namespace CratePoolLog;

/// <summary>
/// Writes the invented scan log of the crate pool sample: the same bytes on every machine. Pool, crates and scans are invented;
/// any likeness to a real pool is chance.
/// </summary>
public static class Program
{
    private const ulong Seed = 20_250_106;

    /// <summary>Writes the log to the path given, or as crate-pool-scans.csv into the current folder.</summary>
    /// <param name="args">The path to write to.</param>
    public static void Main(string[] args)
    {
        ArgumentNullException.ThrowIfNull(args);
        Write(args.Length > 0 ? args[0] : "crate-pool-scans.csv");
    }

    /// <summary>Writes the log: a line of column names, then one line for each scan.</summary>
    /// <param name="path">The file to write; an old one is replaced.</param>
    public static void Write(string path)
    {
        using var writer = new StreamWriter(path, append: false, new UTF8Encoding(encoderShouldEmitUTF8Identifier: false)) { NewLine = "\n" };
        writer.WriteLine("crate,scanned_at,stage");
        foreach (var scan in ScanLog.Invent(Seed))
        {
            writer.WriteLine(scan.ToRow());
        }
    }
}
