using System.Globalization;

namespace Stochastic.Chains.Benchmarks.Report;

/// <summary>Figures as the tables print them, the same in every culture.</summary>
internal static class Figures
{
    private const double Thousand = 1000;

    internal static string Short(double value) => double.IsNaN(value) ? string.Empty : value.ToString("G3", CultureInfo.InvariantCulture);

    /// <summary>One digit and a power of ten.</summary>
    internal static string Order(double value) => value switch
    {
        0 => "0",
        double.PositiveInfinity => "∞",
        _ => value.ToString("0e-0", CultureInfo.InvariantCulture),
    };

    internal static string Milliseconds(double value) => value switch
    {
        double.NaN => string.Empty,
        double.PositiveInfinity => "no answer",
        >= Thousand => value.ToString("N0", CultureInfo.InvariantCulture),
        _ => Short(value),
    };

    internal static string Bytes(long value) => value switch
    {
        >= 10_000_000 => string.Create(CultureInfo.InvariantCulture, $"{value / 1e6:N0} MB"),
        >= 10_000 => string.Create(CultureInfo.InvariantCulture, $"{value / 1e3:N0} kB"),
        _ => string.Create(CultureInfo.InvariantCulture, $"{value:N0} B"),
    };
}
