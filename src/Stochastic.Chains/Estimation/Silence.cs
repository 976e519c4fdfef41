namespace Stochastic.Chains.Estimation;

/// <summary>The silence rule and the final states, by position.</summary>
/// <param name="After">The longest time unseen that is no silence, in ticks; negative when there is no rule.</param>
/// <param name="MovesTo">The state that silence moves to, or −1.</param>
/// <param name="CountsReturns">Whether a silence that ended in a return is counted.</param>
/// <param name="FinalStates">The states in which a history is complete, <paramref name="MovesTo"/> included.</param>
internal sealed record Silence(long After, int MovesTo, bool CountsReturns, HashSet<int> FinalStates)
{
    internal bool IsFinal(int state) => FinalStates.Contains(state);

    /// <summary>Whether an item counts as silent from one event until an instant.</summary>
    internal bool IsSilent(Scan scan, long until) => After >= 0 && until - scan.Ticks > After && !IsFinal(scan.State);
}
