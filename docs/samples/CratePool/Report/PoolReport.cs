using Stochastic.Chains;

namespace CratePool.Report;

/// <summary>The whole report, question after question.</summary>
internal static class PoolReport
{
    internal static void Write(TextWriter output, Pool pool, SolveOptions options)
    {
        var evidence = new Evidence(options);
        LogSection.Write(output, pool);
        ForecastSection.Write(output, pool, evidence);
        LongRunSection.Write(output, pool, evidence);
        GoalSection.Write(output, pool, evidence);
        EndSection.Write(output, pool, evidence);
        CertaintySection.Write(output, pool, evidence);
    }
}
