namespace Stochastic.Chains.Structure;

/// <summary>A group number for each state, in the order in which the groups are first met.</summary>
internal static class Grouping
{
    internal static (int[] GroupOf, List<TGroup> Groups) Of<TGroup>(IEnumerable<TGroup> labels)
        where TGroup : notnull
    {
        var numbers = new Dictionary<TGroup, int>();
        var groups = new List<TGroup>();
        var groupOf = new List<int>();
        foreach (var label in labels)
        {
            if (!numbers.TryGetValue(label, out var number))
            {
                number = groups.Count;
                numbers.Add(label, number);
                groups.Add(label);
            }

            groupOf.Add(number);
        }

        return ([.. groupOf], groups);
    }
}
