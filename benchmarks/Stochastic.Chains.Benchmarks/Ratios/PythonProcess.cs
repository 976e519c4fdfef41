using System.Diagnostics;
using System.Globalization;
using System.Runtime.InteropServices;

namespace Stochastic.Chains.Benchmarks.Ratios;

/// <summary>
/// The script of the rivals, in one process of its own that waits while this one works. It times itself, around the operation alone; inputs go over
/// as files. One thread, and no preset choice of an old kernel.
/// </summary>
internal sealed class PythonProcess : IDisposable
{
    private static readonly string[] Interpreters = ["python3", "/usr/bin/python3"];

    private readonly Process _process;

    private PythonProcess(Process process, string versions) => (_process, Versions) = (process, versions);

    /// <summary>The versions of Python, numpy and scipy.</summary>
    internal string Versions { get; }

    /// <summary>Starts the first interpreter that has numpy and scipy; null, with a message, where none has.</summary>
    internal static PythonProcess? TryStart()
    {
        foreach (var interpreter in Interpreters)
        {
            if (Start(interpreter) is { } process)
            {
                if (process.StandardOutput.ReadLine() is { } versions && versions.StartsWith("Python", StringComparison.Ordinal))
                {
                    return new PythonProcess(process, versions);
                }

                process.Dispose();
            }
        }

        Console.WriteLine($"Skipped: numpy and scipy. Neither {string.Join(" nor ", Interpreters)} has both.");
        return null;
    }

    /// <summary>Hands the inputs over.</summary>
    internal void Prepare(PythonTask task)
    {
        List<string> paths = [];
        try
        {
            foreach (var input in task.Inputs)
            {
                paths.Add(Path.GetTempFileName());
                File.WriteAllBytes(paths[^1], Bytes(input));
            }

            _ = Ask($"prepare {task.Operation} {string.Join(' ', task.Inputs.Zip(paths, (input, path) => $"{Kind(input)}:{path}"))}");
        }
        finally
        {
            paths.ForEach(File.Delete);
        }
    }

    /// <summary>The least seconds of so many runs, and one figure of the answer.</summary>
    internal (double Seconds, double Figure) Run(int runs)
    {
        var reply = Ask($"run {runs.ToString(CultureInfo.InvariantCulture)}").Split(' ');
        return (double.Parse(reply[0], CultureInfo.InvariantCulture), double.Parse(reply[1], CultureInfo.InvariantCulture));
    }

    public void Dispose()
    {
        _process.StandardInput.Dispose();
        _process.WaitForExit();
        _process.Dispose();
    }

    private static Process? Start(string interpreter)
    {
        var start = new ProcessStartInfo(interpreter, [Path.Combine(AppContext.BaseDirectory, "rival.py")])
        {
            RedirectStandardInput = true,
            RedirectStandardOutput = true,
        };
        start.Environment["OPENBLAS_NUM_THREADS"] = "1";
        start.Environment["OMP_NUM_THREADS"] = "1";
        start.Environment.Remove("OPENBLAS_CORETYPE");
        try
        {
            return Process.Start(start);
        }
        catch (System.ComponentModel.Win32Exception)
        {
            return null;
        }
    }

    private string Ask(string line)
    {
        _process.StandardInput.WriteLine(line);
        _process.StandardInput.Flush();
        return _process.StandardOutput.ReadLine() ?? throw new InvalidOperationException($"The script of the rivals ended at: {line}");
    }

    private static string Kind(Array input) => input.GetType() == typeof(int[]) ? "integers" : "doubles";

    private static byte[] Bytes(Array input) => input switch
    {
        double[] doubles => MemoryMarshal.AsBytes(doubles.AsSpan()).ToArray(),
        int[] integers => MemoryMarshal.AsBytes(integers.AsSpan()).ToArray(),
        double[,] table => MemoryMarshal.AsBytes(MemoryMarshal.CreateSpan(ref table[0, 0], table.Length)).ToArray(),
        _ => throw new ArgumentException($"An input is an array of doubles or integers, not {input.GetType()}.", nameof(input)),
    };
}
