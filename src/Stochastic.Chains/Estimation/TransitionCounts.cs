using System.Diagnostics;
using Stochastic.Chains.Estimation;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>How often each move between states was observed: what a chain is estimated from.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// Immutable and safe for concurrent use; row = from, column = to. Made by the methods of <see cref="TransitionCounts"/> and
/// <see cref="EventLog"/>. Only the moves that were seen take memory. A state that was seen or listed but takes part in no move
/// stays a state, with counts of 0.
/// </remarks>
/// <example>
/// <code>
/// TransitionCounts&lt;string&gt; counts = TransitionCounts.FromPaths([["clean", "filled", "dirty", "clean"], ["clean", "filled"]]);
/// long filled = counts["clean", "filled"];   // 2
/// Chain&lt;string&gt; fitted = counts.ToChain();
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class TransitionCounts<TState>
    where TState : notnull
{
    internal TransitionCounts(StateSpace<TState> states, CountRows rows, long pathCount, LogReport<TState>? log)
    {
        States = states;
        Rows = rows;
        PathCount = pathCount;
        Log = log;
    }

    /// <summary>Gets the states, in the order in which they were listed or first seen.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the number of moves counted, stays included.</summary>
    public long TotalCount => Rows.Total;

    /// <summary>Gets the number of paths or items that were read, those too short for a move included; 0 for counts given as numbers.</summary>
    public long PathCount { get; }

    /// <summary>Gets the account of the log the moves were counted from; null for paths, given numbers and sums.</summary>
    public LogReport<TState>? Log { get; }

    /// <summary>Gets the states that no counted move starts in, in state order: their rows cannot be estimated.</summary>
    public IReadOnlyList<TState> NeverLeftStates => [.. Enumerable.Range(0, States.Count).Where(row => Rows.RowTotal(row) == 0).Select(row => States[row])];

    /// <summary>Enumerates the moves that were counted at least once, row by row, in state order.</summary>
    public IEnumerable<TransitionCount<TState>> Moves => Enumerable.Range(0, States.Count).SelectMany(RowMoves);

    /// <summary>
    /// Gets what was counted beyond single moves: three states in a row and lengths of stays; null unless the options of counting asked for it.
    /// </summary>
    public PathHistory<TState>? History { get; internal init; }

    internal CountRows Rows { get; }

    /// <summary>Gets how often a move was counted; 0 for a move between these states that was not.</summary>
    /// <param name="from">The state the move started in.</param>
    /// <param name="to">The state the move ended in.</param>
    /// <exception cref="UnknownStateException">A label is none of the states.</exception>
    public long this[TState from, TState to] => Rows[States.Require(from), States.Require(to)];

    /// <summary>Adds the counts of two sets of observations over the same states; the sum has no <see cref="Log"/>.</summary>
    /// <param name="left">One set of counts.</param>
    /// <param name="right">Another, over the same states in the same order.</param>
    /// <exception cref="ArgumentException">The states differ.</exception>
    /// <exception cref="OverflowException">A count passes 2⁶³ − 1.</exception>
    public static TransitionCounts<TState> operator +(TransitionCounts<TState> left, TransitionCounts<TState> right)
    {
        ArgumentNullException.ThrowIfNull(left);
        return left.Add(right);
    }

    /// <summary>Adds the counts of another set of observations over the same states; the sum has no <see cref="Log"/>.</summary>
    /// <param name="other">Counts over the same states in the same order: count both with one list of states.</param>
    /// <returns>New counts; an item that is in both logs is two paths in the sum.</returns>
    /// <exception cref="ArgumentException">The states differ.</exception>
    /// <exception cref="OverflowException">A count passes 2⁶³ − 1.</exception>
    /// <example><code>TransitionCounts&lt;string&gt; year = firstHalf.Add(secondHalf);   // or firstHalf + secondHalf</code></example>
    public TransitionCounts<TState> Add(TransitionCounts<TState> other)
    {
        ArgumentNullException.ThrowIfNull(other);
        if (!States.Matches(other.States))
        {
            throw new ArgumentException(Messages.CountsOfDifferentStates(States, other.States), nameof(other));
        }

        var counter = new MoveCounter();
        counter.AddAll(Rows);
        counter.AddAll(other.Rows);
        return new TransitionCounts<TState>(States, counter.ToRows(States.Count), checked(PathCount + other.PathCount), log: null) { History = PathHistories.Sum(History, other.History) };
    }

    /// <summary>Gets how many moves out of a state were counted: the total of its row.</summary>
    /// <param name="from">The state the moves started in.</param>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    public long TotalFrom(TState from) => Rows.RowTotal(States.Require(from));

    /// <summary>Lists the counted moves out of one state, in state order.</summary>
    /// <param name="from">The state the moves started in.</param>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    public IReadOnlyList<TransitionCount<TState>> CountsFrom(TState from) => RowMoves(States.Require(from));

    /// <summary>Copies the counts into a new array: row = from, column = to, in state order. Takes 8 · states² bytes.</summary>
    public long[,] ToArray()
    {
        var array = new long[States.Count, States.Count];
        for (var row = 0; row < States.Count; row++)
        {
            var columns = Rows.Columns(row);
            for (var k = 0; k < columns.Length; k++)
            {
                array[row, columns[k]] = Rows.Counts(row)[k];
            }
        }

        return array;
    }

    /// <summary>Estimates the chain by maximum likelihood, refusing states that were never left.</summary>
    /// <returns>The chain: each probability is the count of the move divided by the total of its row, correctly rounded.</returns>
    /// <remarks>
    /// Source: Anderson and Goodman (1957), Ann. Math. Statist. 28, 89–110. The estimate of a row rests on <see cref="TotalFrom"/>
    /// observations: with few of them it is only a rough figure, and a move that was not seen has probability 0.
    /// </remarks>
    /// <exception cref="InvalidChainException">States were never left; each is named.</exception>
    /// <example><code>Chain&lt;string&gt; fitted = counts.ToChain();</code></example>
    public Chain<TState> ToChain() => ToChain(UnobservedStates.Refuse);

    /// <summary>Estimates the chain by maximum likelihood, with a choice for the states that were never left.</summary>
    /// <param name="choice">What is done with the states in <see cref="NeverLeftStates"/>.</param>
    /// <returns>The chain, over the same states, less those in <see cref="FindDroppedStates"/> when they are dropped.</returns>
    /// <exception cref="InvalidChainException">States were never left and are to be refused, or no state is left.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The choice is not one of <see cref="UnobservedStates"/>.</exception>
    /// <example><code>Chain&lt;string&gt; fitted = counts.ToChain(UnobservedStates.Absorbing);</code></example>
    public Chain<TState> ToChain(UnobservedStates choice) => MaximumLikelihood.Fit(States, Rows, choice);

    /// <summary>
    /// Lists the states that <see cref="UnobservedStates.Drop"/> leaves out, in state order: those never left, those whose every move
    /// led to one of these, and so on. O(states + moves).
    /// </summary>
    /// <example><code>IReadOnlyList&lt;string&gt; leftOut = counts.FindDroppedStates();</code></example>
    public IReadOnlyList<TState> FindDroppedStates()
    {
        var kept = KeptCounts.FindKept(Rows);
        return [.. States.Where((_, row) => !kept[row])];
    }

    /// <summary>A short account of the counts, the same in every culture; few states show as a table.</summary>
    public override string ToString() => CountsText.Write(this);

    private List<TransitionCount<TState>> RowMoves(int row)
    {
        var columns = Rows.Columns(row);
        var moves = new List<TransitionCount<TState>>(columns.Length);
        for (var k = 0; k < columns.Length; k++)
        {
            moves.Add(new TransitionCount<TState>(States[row], States[columns[k]], Rows.Counts(row)[k]));
        }

        return moves;
    }
}
