namespace Stochastic.Chains.Tests.Support;

/// <summary>A communicating class; the period is 0 where no return is possible.</summary>
internal sealed record ReferenceClass(int[] States, bool IsClosed, int Period);

/// <summary>
/// Classes, recurrence and periods straight from their definitions: two states communicate when each is reachable from the other. Plain
/// searches, no single-pass algorithm, so that it can judge one.
/// </summary>
internal sealed class ReferenceStructure
{
    private readonly int[][] _successors;
    private readonly int[][] _predecessors;

    public ReferenceStructure(int[][] successors)
    {
        _successors = successors;
        _predecessors = Transpose(successors);
        ClassOf = new int[successors.Length];
        Array.Fill(ClassOf, -1);
        var classes = new List<ReferenceClass>();
        for (var state = 0; state < successors.Length; state++)
        {
            if (ClassOf[state] < 0)
            {
                classes.Add(ClassAround(state, classes.Count));
            }
        }

        Classes = classes;
        RecurrentClasses = [.. classes.Where(c => c.IsClosed)];
        TransientStates = [.. classes.Where(c => !c.IsClosed).SelectMany(c => c.States).Order()];
    }

    /// <summary>Ordered by their smallest state; states in increasing order.</summary>
    public IReadOnlyList<ReferenceClass> Classes { get; }

    public IReadOnlyList<ReferenceClass> RecurrentClasses { get; }

    public int[] TransientStates { get; }

    /// <summary>The index in <see cref="Classes"/> of each state's class.</summary>
    public int[] ClassOf { get; }

    public bool IsIrreducible => Classes.Count == 1;

    /// <summary>The cyclic classes of a class with a period, in cyclic order, the one of its smallest state first.</summary>
    public int[][] CyclicClasses(ReferenceClass communicatingClass)
    {
        var levels = Levels(communicatingClass.States[0], ClassOf[communicatingClass.States[0]]);
        return
        [
            .. communicatingClass.States
                .GroupBy(state => levels[state] % communicatingClass.Period)
                .OrderBy(group => group.Key)
                .Select(group => group.ToArray()),
        ];
    }

    /// <summary>The states from which some state of the target can be reached (in any number of steps, none included).</summary>
    public bool[] CanReach(IEnumerable<int> target) => Search(_predecessors, target, _ => true);

    /// <summary>As <see cref="CanReach(IEnumerable{int})"/>, along paths that avoid some states before the last one.</summary>
    public bool[] CanReach(IEnumerable<int> target, Func<int, bool> mayPass) => Search(_predecessors, target, mayPass);

    private static int[][] Transpose(int[][] successors)
    {
        var predecessors = Array.ConvertAll(successors, _ => new List<int>());
        for (var state = 0; state < successors.Length; state++)
        {
            foreach (var next in successors[state])
            {
                predecessors[next].Add(state);
            }
        }

        return Array.ConvertAll(predecessors, list => list.ToArray());
    }

    private static bool[] Search(int[][] neighbours, IEnumerable<int> start, Func<int, bool> mayEnter)
    {
        var seen = new bool[neighbours.Length];
        var waiting = new Queue<int>();
        foreach (var state in start)
        {
            seen[state] = true;
            waiting.Enqueue(state);
        }

        while (waiting.TryDequeue(out var state))
        {
            foreach (var next in neighbours[state])
            {
                if (!seen[next] && mayEnter(next))
                {
                    seen[next] = true;
                    waiting.Enqueue(next);
                }
            }
        }

        return seen;
    }

    private ReferenceClass ClassAround(int state, int index)
    {
        var forward = Search(_successors, [state], _ => true);
        var backward = Search(_predecessors, [state], _ => true);
        int[] states = [.. Enumerable.Range(0, forward.Length).Where(other => forward[other] && backward[other])];
        foreach (var member in states)
        {
            ClassOf[member] = index;
        }

        return new(states, Array.TrueForAll(forward.Zip(backward).ToArray(), pair => !pair.First || pair.Second), PeriodOf(states, index));
    }

    /// <summary>The greatest common divisor of level differences over all moves inside the class (Denardo 1977, from memory).</summary>
    private int PeriodOf(int[] states, int index)
    {
        var levels = Levels(states[0], index);
        return (
            from state in states
            from next in _successors[state]
            where ClassOf[next] == index
            select Math.Abs(levels[state] + 1 - levels[next])).Aggregate(0, GreatestCommonDivisor);
    }

    private int[] Levels(int root, int index)
    {
        var levels = new int[_successors.Length];
        Array.Fill(levels, -1);
        levels[root] = 0;
        var waiting = new Queue<int>([root]);
        while (waiting.TryDequeue(out var state))
        {
            foreach (var next in _successors[state])
            {
                if (levels[next] < 0 && ClassOf[next] == index)
                {
                    levels[next] = levels[state] + 1;
                    waiting.Enqueue(next);
                }
            }
        }

        return levels;
    }

    private static int GreatestCommonDivisor(int left, int right) => right == 0 ? left : GreatestCommonDivisor(right, left % right);
}
