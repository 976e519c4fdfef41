using Stochastic.Chains.Estimation;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

public static partial class TransitionCounts
{
    /// <summary>Takes counts that were made elsewhere, as a table.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">The states, each once, in the order of the rows and columns. A <see cref="StateSpace{TState}"/> brings its comparer.</param>
    /// <param name="counts">The counts, 0 or more: row = from, column = to. Copied.</param>
    /// <exception cref="InvalidChainException">The states or the table have faults; all are listed.</exception>
    /// <exception cref="OverflowException">The counts sum to more than 2⁶³ − 1.</exception>
    /// <example><code>var counts = TransitionCounts.FromCounts(["dry", "wet"], new long[,] { { 70, 20 }, { 21, 15 } });</code></example>
    public static TransitionCounts<TState> FromCounts<TState>(IReadOnlyList<TState> states, long[,] counts)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(states);
        ArgumentNullException.ThrowIfNull(counts);
        var space = StateLookup<TState>.Listed(states).ToStateSpace();
        var faults = new FaultCollector();
        CheckShape(space.Count, counts, faults);
        faults.ThrowIfAny();
        var moves = new MoveCounter();
        for (var row = 0; row < space.Count; row++)
        {
            for (var column = 0; column < space.Count; column++)
            {
                AddCount(new TransitionCount<TState>(space[row], space[column], counts[row, column]), row, column, moves, faults);
            }
        }

        faults.ThrowIfAny();
        return new TransitionCounts<TState>(space, moves.ToRows(space.Count), pathCount: 0, log: null);
    }

    /// <summary>Takes counts that were made elsewhere, move by move, such as the groups of a database query.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="counts">The counts, in any order; a move given twice counts the sum. Read once.</param>
    /// <exception cref="InvalidChainException">There are faults, such as a negative count; all are listed.</exception>
    /// <exception cref="OverflowException">The counts sum to more than 2⁶³ − 1.</exception>
    /// <example>
    /// <code>
    /// var counts = TransitionCounts.FromCounts(rows.Select(row => new TransitionCount&lt;string&gt;(row.Before, row.After, row.Number)));
    /// </code>
    /// </example>
    public static TransitionCounts<TState> FromCounts<TState>(IEnumerable<TransitionCount<TState>> counts)
        where TState : notnull => FromCounts(counts, EqualityComparer<TState>.Default);

    /// <summary>Takes counts that were made elsewhere, move by move, with a given equality of states.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="counts">The counts, in any order; a move given twice counts the sum. Read once.</param>
    /// <param name="comparer">Decides whether two labels mean the same state; the counts and their chain keep it.</param>
    /// <exception cref="InvalidChainException">There are faults, such as a negative count; all are listed.</exception>
    /// <exception cref="OverflowException">The counts sum to more than 2⁶³ − 1.</exception>
    public static TransitionCounts<TState> FromCounts<TState>(IEnumerable<TransitionCount<TState>> counts, IEqualityComparer<TState> comparer)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(counts);
        ArgumentNullException.ThrowIfNull(comparer);
        return AddCounts(counts, StateLookup<TState>.FirstSeen(comparer));
    }

    /// <summary>Takes counts that were made elsewhere, move by move, between given states.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">
    /// All states, each once; they keep this order, and stay when no count names them. A <see cref="StateSpace{TState}"/> brings its comparer.
    /// </param>
    /// <param name="counts">The counts, in any order; a move given twice counts the sum. Read once.</param>
    /// <exception cref="InvalidChainException">There are faults, such as a state outside the list; all are listed.</exception>
    /// <exception cref="OverflowException">The counts sum to more than 2⁶³ − 1.</exception>
    public static TransitionCounts<TState> FromCounts<TState>(IEnumerable<TState> states, IEnumerable<TransitionCount<TState>> counts)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(states);
        ArgumentNullException.ThrowIfNull(counts);
        return AddCounts(counts, StateLookup<TState>.Listed(states));
    }

    private static TransitionCounts<TState> AddCounts<TState>(IEnumerable<TransitionCount<TState>> counts, StateLookup<TState> states)
        where TState : notnull
    {
        var faults = new FaultCollector();
        var moves = new MoveCounter();
        var read = 0L;
        foreach (var count in counts)
        {
            var row = Locate(count.From, count, read, states, faults);
            var column = Locate(count.To, count, read, states, faults);
            if (row >= 0 && column >= 0)
            {
                AddCount(count, row, column, moves, faults);
            }

            read++;
        }

        if (states.Count == 0 && !faults.HasFaults)
        {
            faults.Add(ChainFaultKind.NoStates, [], 0, Messages.NoStates);
        }

        faults.ThrowIfAny();
        var space = states.ToStateSpace();
        return new TransitionCounts<TState>(space, moves.ToRows(space.Count), pathCount: 0, log: null);
    }

    private static int Locate<TState>(TState state, TransitionCount<TState> count, long read, StateLookup<TState> states, FaultCollector faults)
        where TState : notnull
    {
        if (state is null)
        {
            faults.Add(ChainFaultKind.NullState, [count.From, count.To], count.Count, Messages.NullStateInMove(read));
            return -1;
        }

        var position = states.Locate(state);
        if (position < 0)
        {
            faults.Add(ChainFaultKind.UnknownState, [state], read, Messages.UnknownStateInMove(state, count.From, count.To));
        }

        return position;
    }

    private static void AddCount<TState>(TransitionCount<TState> count, int row, int column, MoveCounter moves, FaultCollector faults)
        where TState : notnull
    {
        if (count.Count < 0)
        {
            faults.Add(ChainFaultKind.Negative, [count.From, count.To], count.Count, Messages.NegativeCount(count.From, count.To, count.Count));
            return;
        }

        moves.Add(row, column, count.Count);
    }

    private static void CheckShape(int states, long[,] counts, FaultCollector faults)
    {
        var (rows, columns) = (counts.GetLength(0), counts.GetLength(1));
        if (rows != columns)
        {
            faults.Add(ChainFaultKind.WrongShape, [], columns, Messages.CountsNotSquare(rows, columns));
        }
        else if (rows != states)
        {
            faults.Add(ChainFaultKind.WrongShape, [], rows, Messages.WrongStateCount(states, rows));
        }
    }
}
