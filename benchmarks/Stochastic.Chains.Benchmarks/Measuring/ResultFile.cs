using System.Text.Json;
using System.Text.Json.Serialization;

namespace Stochastic.Chains.Benchmarks.Measuring;

/// <summary>What a run left: the machine and the rows. Tables and pictures are made from it, by the report.</summary>
/// <typeparam name="TRow">What a row says.</typeparam>
/// <param name="Machine">What was measured on.</param>
/// <param name="Rows">The rows.</param>
internal sealed record ResultFile<TRow>(Machine Machine, IReadOnlyList<TRow> Rows)
{
    private static readonly JsonSerializerOptions Readable = new()
    {
        WriteIndented = true,
        NumberHandling = JsonNumberHandling.AllowNamedFloatingPointLiterals,
        IgnoreReadOnlyProperties = true,
    };

    internal static ResultFile<TRow> Read(string name)
    {
        var path = ResultFolder.File(name);
        return File.Exists(path)
            ? JsonSerializer.Deserialize<ResultFile<TRow>>(File.ReadAllText(path), Readable)!
            : throw new FileNotFoundException($"There is no {path}: run the command that measures it first.", path);
    }

    internal void Write(string name)
    {
        var path = ResultFolder.File(name);
        File.WriteAllText(path, JsonSerializer.Serialize(this, Readable) + "\n");
        Console.WriteLine($"Wrote {path}.");
    }
}
