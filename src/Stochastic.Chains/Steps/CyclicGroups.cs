namespace Stochastic.Chains.Steps;

/// <summary>
/// The cyclic classes of all recurrent classes, numbered: a step leads from each to the next one of its class, so that a row of any power
/// from a recurrent state is confined to one of them.
/// </summary>
internal sealed class CyclicGroups
{
    private readonly int[] _firstOfClass;
    private readonly int[] _phase;
    private readonly int[] _period;

    private CyclicGroups(int states, List<int[]> members)
    {
        _firstOfClass = new int[states];
        _phase = new int[states];
        _period = new int[states];
        Array.Fill(_firstOfClass, -1);
        Members = members;
    }

    /// <summary>The states of each group.</summary>
    internal IReadOnlyList<int[]> Members { get; }

    internal static CyclicGroups Of<TState>(Chain<TState> chain)
        where TState : notnull
    {
        var members = new List<int[]>();
        var groups = new CyclicGroups(chain.StateCount, members);
        foreach (var recurrent in chain.Structure().RecurrentClasses)
        {
            var first = members.Count;
            for (var phase = 0; phase < recurrent.CyclicClasses.Count; phase++)
            {
                var states = recurrent.CyclicClasses[phase].Select(chain.States.IndexOf).ToArray();
                foreach (var state in states)
                {
                    (groups._firstOfClass[state], groups._phase[state], groups._period[state]) = (first, phase, recurrent.CyclicClasses.Count);
                }

                members.Add(states);
            }
        }

        return groups;
    }

    /// <summary>The group that a recurrent state is in after so many steps; −1 for a transient state, which may be anywhere.</summary>
    internal int After(int state, long steps) =>
        _firstOfClass[state] < 0 ? -1 : _firstOfClass[state] + (int)((_phase[state] + (steps % _period[state])) % _period[state]);
}
