namespace Stochastic.Chains.Estimation;

/// <summary>What is counted about a log besides the moves; becomes a <see cref="LogReport{TState}"/>.</summary>
internal sealed class LogTally(int stateCount)
{
    internal long DuplicateEvents { get; set; }

    internal long PassedOverEvents { get; set; }

    internal long UnfinishedPeriodEvents { get; set; }

    internal long FilledPeriods { get; set; }

    internal long SingleEventItems { get; set; }

    internal long SilentItems { get; set; }

    internal long FinishedItems { get; set; }

    internal long Returns { get; set; }

    internal long[] OpenItems { get; } = new long[stateCount];
}
