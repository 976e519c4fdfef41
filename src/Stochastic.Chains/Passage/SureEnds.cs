namespace Stochastic.Chains.Passage;

/// <summary>The recurrent class in which each state is sure to end. O(states + transitions).</summary>
internal static class SureEnds<TState>
    where TState : notnull
{
    private const int Unknown = -1;
    private const int Several = -2;

    /// <summary>For each recurrent class, its states and then the transient states that end nowhere else.</summary>
    internal static int[][] Of(Chain<TState> chain)
    {
        var structure = chain.Structure();
        var endOf = new int[chain.StateCount];
        Array.Fill(endOf, Unknown);
        var ends = new List<int>[structure.RecurrentClasses.Count];
        for (var end = 0; end < ends.Length; end++)
        {
            ends[end] = [.. structure.RecurrentClasses[end].Members];
            ends[end].ForEach(member => endOf[member] = end);
        }

        // In canonical order every class comes after those that its moves lead to.
        foreach (var label in structure.CanonicalOrder)
        {
            if (endOf[chain.States.Require(label)] != Unknown)
            {
                continue;
            }

            var members = structure.ClassOf(label).Members;
            var end = Of(chain.Matrix, members, endOf);
            Array.ForEach(members, member => endOf[member] = end);
            if (end != Several)
            {
                ends[end].AddRange(members);
            }
        }

        return Array.ConvertAll(ends, states => states.ToArray());
    }

    private static int Of(TransitionMatrix matrix, int[] members, int[] endOf)
    {
        var end = Unknown;
        foreach (var member in members)
        {
            foreach (var (to, _) in matrix.Row(member))
            {
                if (endOf[to] != Unknown)
                {
                    end = end == Unknown || end == endOf[to] ? endOf[to] : Several;
                }
            }
        }

        return end;
    }
}
