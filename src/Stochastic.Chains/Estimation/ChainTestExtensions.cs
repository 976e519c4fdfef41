using Stochastic.Chains.Estimation;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>Tests of whether what was counted behaves like a Markov chain at all.</summary>
public static class ChainTestExtensions
{
    /// <summary>Tests whether the next state depends on the present one: order 0 against order 1.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="counts">The counted moves.</param>
    /// <returns>The test. A small p-value means that it does, so that a chain says more than fixed shares. O(states²).</returns>
    /// <remarks>Moves that cannot happen (structural zeros) count as a dependence, which they are.</remarks>
    /// <example><code>Console.WriteLine(counts.TestIndependence().Finding);</code></example>
    public static ChainTest TestIndependence<TState>(this TransitionCounts<TState> counts)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(counts);
        var labels = Labels(counts.States);
        return new ChainTest([new ContingencyTable(string.Empty, labels, labels, counts.ToArray())], Messages.IndependenceFinding);
    }

    /// <summary>Tests whether the state before the present one matters too: order 1 against order 2.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="counts">The counted moves, with <see cref="TransitionCounts{TState}.History"/>.</param>
    /// <returns>The test. A small p-value means that a chain of these states forgets something that matters.</returns>
    /// <exception cref="InvalidOperationException">The counts have no history: count with KeepsHistory of PathOptions or LogOptions.</exception>
    /// <example><code>Console.WriteLine(counts.TestSecondOrder().Finding);</code></example>
    public static ChainTest TestSecondOrder<TState>(this TransitionCounts<TState> counts)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(counts);
        var tables = RequireHistory(counts).Recorder.Triples
            .GroupBy(triple => triple.Key.From)
            .OrderBy(group => group.Key)
            .Select(group => SecondOrderTable(counts.States, group.Key, [.. group]));
        return new ChainTest([.. tables], Messages.SecondOrderFinding);
    }

    /// <summary>Tests whether several groups or periods share one chain: homogeneity.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="groups">The counts of each group with its name, over the same states in the same order; two groups or more.</param>
    /// <returns>The test. A small p-value means that the groups need chains of their own.</returns>
    /// <exception cref="ArgumentException">There are fewer than two groups, or their states differ.</exception>
    /// <example>
    /// <code>
    /// ChainTest test = new[] { ("December", december), ("January", january) }.TestHomogeneity();
    /// </code>
    /// </example>
    public static ChainTest TestHomogeneity<TState>(this IEnumerable<(string Name, TransitionCounts<TState> Counts)> groups)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(groups);
        var all = groups.ToList();
        if (all.Count < 2)
        {
            throw new ArgumentException(Messages.TooFewGroups(all.Count), nameof(groups));
        }

        var states = all[0].Counts.States;
        foreach (var (_, counts) in all)
        {
            if (!states.Matches(counts.States))
            {
                throw new ArgumentException(Messages.CountsOfDifferentStates(states, counts.States), nameof(groups));
            }
        }

        string[] names = [.. all.Select(group => group.Name)];
        var labels = Labels(states);
        var tables = Enumerable.Range(0, states.Count).Select(from => new ContingencyTable(
            labels[from], names, labels, Table(all.Count, states.Count, (group, to) => all[group].Counts.Rows[from, to])));
        return new ChainTest([.. tables], Messages.HomogeneityFinding);
    }

    /// <summary>
    /// Tests whether items leave a state as easily after a long stay as after a short one, as a chain needs: whether stay lengths are geometric.
    /// </summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="counts">The counted moves, with <see cref="TransitionCounts{TState}.History"/>.</param>
    /// <param name="state">The state whose stays are looked at.</param>
    /// <returns>The test. A small p-value means that the time already spent in the state matters.</returns>
    /// <remarks>
    /// Compares the chance of leaving after one step in the state, after two, and so on; long stays are taken together until at least five items are
    /// expected to stay and to leave. Stays that were cut off by the end of a path count for the steps that were seen. A stay that had begun before its
    /// path did counts from there, which is right when nothing is to be found.
    /// </remarks>
    /// <exception cref="InvalidOperationException">The counts have no history: count with KeepsHistory of PathOptions or LogOptions.</exception>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    /// <example><code>Console.WriteLine(counts.TestStayLengths("at shop").Finding);</code></example>
    public static ChainTest TestStayLengths<TState>(this TransitionCounts<TState> counts, TState state)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(counts);
        var position = counts.States.Require(state);
        var stays = RequireHistory(counts).Recorder.Stays.GetValueOrDefault(position) ?? new StayCounts();
        return new ChainTest([StayTable.Of(Text.Label(state), stays)], differs => Messages.StayFinding(state, differs));
    }

    private static ContingencyTable SecondOrderTable<TState>(
        StateSpace<TState> states, int from, List<KeyValuePair<(int Earlier, int From, int To), long>> triples)
        where TState : notnull
    {
        int[] earlier = [.. triples.Select(triple => triple.Key.Earlier).Distinct().Order()];
        int[] next = [.. triples.Select(triple => triple.Key.To).Distinct().Order()];
        var counts = new long[earlier.Length, next.Length];
        foreach (var (key, count) in triples)
        {
            counts[Array.BinarySearch(earlier, key.Earlier), Array.BinarySearch(next, key.To)] = count;
        }

        return new ContingencyTable(
            Text.Label(states[from]),
            Array.ConvertAll(earlier, state => Text.Label(states[state])),
            Array.ConvertAll(next, state => Text.Label(states[state])),
            counts);
    }

    private static PathHistory<TState> RequireHistory<TState>(TransitionCounts<TState> counts)
        where TState : notnull => counts.History ?? throw new InvalidOperationException(Messages.NoHistory);

    private static string[] Labels<TState>(StateSpace<TState> states)
        where TState : notnull => [.. states.Select(state => Text.Label(state))];

    private static long[,] Table(int rows, int columns, Func<int, int, long> count)
    {
        var table = new long[rows, columns];
        for (var row = 0; row < rows; row++)
        {
            for (var column = 0; column < columns; column++)
            {
                table[row, column] = count(row, column);
            }
        }

        return table;
    }
}
