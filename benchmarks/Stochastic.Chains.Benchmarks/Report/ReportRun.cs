namespace Stochastic.Chains.Benchmarks.Report;

internal static class ReportRun
{
    internal static int Write() => 0;
}
