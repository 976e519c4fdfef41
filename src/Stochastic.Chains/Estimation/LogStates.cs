using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Estimation;

/// <summary>What the options of a log say about its states.</summary>
internal static class LogStates
{
    /// <exception cref="InvalidChainException">The list of states has faults, or lacks a state that the options name.</exception>
    internal static StateLookup<TState> Lookup<TState>(LogOptions<TState> options)
        where TState : notnull
    {
        if (options.States is null)
        {
            return StateLookup<TState>.FirstSeen(options.Comparer ?? EqualityComparer<TState>.Default);
        }

        var states = options.Comparer is null
            ? StateLookup<TState>.Listed(options.States)
            : StateLookup<TState>.Listed(options.States, options.Comparer);
        var faults = new FaultCollector();
        foreach (var named in Named(options).Where(state => states.Find(state) < 0))
        {
            faults.Add(ChainFaultKind.UnknownState, [named], 0, Messages.UnknownStateInOptions(named));
        }

        faults.ThrowIfAny();
        return states;
    }

    /// <summary>The silence rule by position. Its state becomes one of the states, whether or not an item turns out to be silent.</summary>
    internal static Silence Silence<TState>(LogOptions<TState> options, StateLookup<TState> states)
        where TState : notnull
    {
        var movesTo = options.Silence is { } rule ? states.Locate(rule.MovesTo) : -1;
        HashSet<int> final = [.. Named(options).Select(states.Find).Where(position => position >= 0)];
        return new Silence(options.Silence?.After.Ticks ?? -1, movesTo, options.Silence?.CountsReturns ?? false, final);
    }

    /// <summary>What the options assume, in sentences.</summary>
    internal static IReadOnlyList<string> Assumptions<TState>(LogOptions<TState> options, LogTally tally)
        where TState : notnull
    {
        var assumptions = new List<string>();
        if (options.Period is { } period)
        {
            assumptions.Add(Messages.PeriodAssumption(period.ToString(), tally.FilledPeriods));
        }

        if (options.Silence is { } silence)
        {
            assumptions.Add(Messages.SilenceAssumption(silence.After, silence.MovesTo, tally.SilentItems));
            assumptions.Add(Messages.ReturnAssumption(silence.MovesTo, silence.CountsReturns, tally.Returns));
        }

        return assumptions.AsReadOnly();
    }

    /// <summary>The states that the options name as ends.</summary>
    private static IEnumerable<TState> Named<TState>(LogOptions<TState> options)
        where TState : notnull => options.Silence is { } rule ? options.FinalStates.Append(rule.MovesTo) : options.FinalStates;
}
