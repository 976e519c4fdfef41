using System.Globalization;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics.X86;
using MathNet.Numerics.LinearAlgebra;

namespace Stochastic.Chains.Benchmarks.Measuring;

/// <summary>What was measured on: it heads every table.</summary>
/// <param name="Processor">The processor by the name it gives itself.</param>
/// <param name="Cores">The number of processors seen.</param>
/// <param name="Instructions">The widest vector instructions.</param>
/// <param name="Runtime">The version of .NET.</param>
/// <param name="System">The operating system.</param>
/// <param name="MathNet">The version of MathNet.Numerics.</param>
/// <param name="Python">The versions of Python, numpy and scipy, or that they were absent.</param>
/// <param name="Date">The day of the run.</param>
/// <param name="LoadBefore">The load average when the run began: processes waiting for a processor.</param>
/// <param name="LoadAfter">The same when it ended.</param>
internal sealed record Machine(
    string Processor, int Cores, string Instructions, string Runtime, string System, string MathNet, string Python, string Date, string LoadBefore, string LoadAfter)
{
    private const string Unknown = "unknown";

    /// <summary>This machine now.</summary>
    internal static Machine Now(string python) => new(
        FromFile("/proc/cpuinfo", line => line.StartsWith("model name", StringComparison.Ordinal) ? line[(line.IndexOf(':', StringComparison.Ordinal) + 1)..].Trim() : null),
        Environment.ProcessorCount,
        Avx512F.IsSupported ? "AVX-512" : Avx2.IsSupported ? "AVX2" : RuntimeInformation.ProcessArchitecture.ToString(),
        RuntimeInformation.FrameworkDescription,
        RuntimeInformation.OSDescription,
        typeof(Matrix<>).Assembly.GetName().Version?.ToString() ?? Unknown,
        python,
        DateTime.UtcNow.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture),
        Load(),
        string.Empty);

    /// <summary>The same machine at the end of the run.</summary>
    internal Machine Finished() => this with { LoadAfter = Load() };

    /// <summary>Averages over one and five minutes.</summary>
    private static string Load() => FromFile("/proc/loadavg", line => string.Join(" and ", line.Split(' ').Take(2)));

    private static string FromFile(string path, Func<string, string?> pick) =>
        File.Exists(path) ? File.ReadLines(path).Select(pick).FirstOrDefault(found => found is not null) ?? Unknown : Unknown;
}
