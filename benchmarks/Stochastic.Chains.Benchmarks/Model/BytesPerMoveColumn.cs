using System.Globalization;
using BenchmarkDotNet.Columns;
using BenchmarkDotNet.Reports;
using BenchmarkDotNet.Running;

namespace Stochastic.Chains.Benchmarks.Model;

/// <summary>Bytes allocated for each move, where a benchmark has a parameter named Transitions.</summary>
internal sealed class BytesPerMoveColumn : IColumn
{
    public string Id => nameof(BytesPerMoveColumn);

    public string ColumnName => "Bytes/move";

    public string Legend => "Bytes allocated for each move";

    public bool AlwaysShow => true;

    public ColumnCategory Category => ColumnCategory.Custom;

    public int PriorityInCategory => 0;

    public bool IsNumeric => true;

    public UnitType UnitType => UnitType.Dimensionless;

    public bool IsAvailable(Summary summary) => true;

    public bool IsDefault(Summary summary, BenchmarkCase benchmarkCase) => false;

    public string GetValue(Summary summary, BenchmarkCase benchmarkCase, SummaryStyle style) => GetValue(summary, benchmarkCase);

    public string GetValue(Summary summary, BenchmarkCase benchmarkCase) =>
        benchmarkCase.Parameters[nameof(FromTransitionsBenchmarks.Transitions)] is int moves
        && summary[benchmarkCase]?.GcStats.GetBytesAllocatedPerOperation(benchmarkCase) is { } bytes
            ? ((double)bytes / moves).ToString("F1", CultureInfo.InvariantCulture)
            : "?";
}
