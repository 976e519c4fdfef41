using System.Collections.Concurrent;
using System.Diagnostics;
using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>
/// A finite Markov chain in discrete time: labelled states and the probability of each move in one step (row = from, column = to,
/// rows sum to one).
/// </summary>
/// <typeparam name="TState">The type of a state: an enum, a string, a number, a record; anything not null with equality.</typeparam>
/// <remarks>
/// Immutable, validated and safe for concurrent use: hold one as a singleton. Questions are asked through extension methods:
/// <c>Structure</c>, <c>Stationary</c>, <c>StartingIn</c>, <c>TimeTo</c>, <c>Absorption</c>. Chains are made by the methods of
/// <see cref="Chain"/>. The probabilities are kept exactly as given; a state can stay where it is exactly when a positive
/// probability of staying was given.
/// </remarks>
/// <example>
/// <code>
/// Chain&lt;string&gt; pump = Chain.Build&lt;string&gt;(rows => rows
///     .Row("new", ("new", 0.90), ("worn", 0.10))
///     .Row("worn", ("worn", 0.75), ("failed", 0.25))
///     .Row("failed", ("new", 1.0)));
/// double wears = pump["new", "worn"];   // 0.1
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class Chain<TState>
    where TState : notnull
{
    private readonly ConcurrentDictionary<Type, Lazy<object>> _derived = new();

    internal Chain(StateSpace<TState> states, TransitionMatrix matrix, IReadOnlyList<RescaledRow<TState>> rescaledRows, double? uniformizationRate)
    {
        States = states;
        Matrix = matrix;
        RescaledRows = rescaledRows;
        UniformizationRate = uniformizationRate;
    }

    /// <summary>Gets the states, in the order in which they were given or first seen.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the number of states.</summary>
    public int StateCount => Matrix.Size;

    /// <summary>Gets the number of possible moves, stays included.</summary>
    public int TransitionCount => Matrix.TransitionCount;

    /// <summary>Gets how the probabilities are held in memory.</summary>
    public MatrixStorage Storage => Matrix.Storage;

    /// <summary>Gets the rows that were divided by their sum because the options asked for it; usually none.</summary>
    public IReadOnlyList<RescaledRow<TState>> RescaledRows { get; }

    /// <summary>
    /// Gets the steps per unit of time of a chain made from rates, or null for a chain that was given per step. Mean times of such
    /// a chain come back in its unit of time.
    /// </summary>
    public double? UniformizationRate { get; }

    internal TransitionMatrix Matrix { get; }

    /// <summary>Gets the probability of a move in one step, exactly as given; 0 where there is none.</summary>
    /// <param name="from">The state the move starts in.</param>
    /// <param name="to">The state the move ends in.</param>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    public double this[TState from, TState to] => Matrix[States.Require(from), States.Require(to)];

    /// <summary>Gets where the next step leads from a state: the row of the matrix as a distribution.</summary>
    /// <param name="from">The state the step starts in.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public Distribution<TState> Row(TState from)
    {
        var values = new double[StateCount];
        foreach (var (column, probability) in Matrix.Row(States.Require(from)))
        {
            values[column] = probability;
        }

        return new Distribution<TState>(States, values);
    }

    /// <summary>Enumerates all possible moves, row by row, in state order.</summary>
    public IEnumerable<Transition<TState>> Transitions => Enumerable.Range(0, StateCount).SelectMany(RowTransitions);

    /// <summary>Lists the possible moves out of one state, in state order.</summary>
    /// <param name="from">The state the moves start in.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public IReadOnlyList<Transition<TState>> TransitionsFrom(TState from) => RowTransitions(States.Require(from));

    /// <summary>Copies the probabilities into a new array: row = from, column = to, in state order. Takes 8 · states² bytes.</summary>
    public double[,] ToArray()
    {
        var array = new double[StateCount, StateCount];
        for (var row = 0; row < StateCount; row++)
        {
            foreach (var (column, probability) in Matrix.Row(row))
            {
                array[row, column] = probability;
            }
        }

        return array;
    }

    /// <summary>Copies the probabilities into a new MathNet.Numerics matrix, dense or sparse as the chain is stored.</summary>
    public Matrix<double> ToMatrix()
    {
        if (Storage == MatrixStorage.Dense)
        {
            return Matrix<double>.Build.DenseOfArray(ToArray());
        }

        var entries = Enumerable.Range(0, StateCount).SelectMany(row => RowEntries(row).Select(entry => (row, entry.Column, entry.Probability)));
        return Matrix<double>.Build.SparseOfIndexed(StateCount, StateCount, entries);
    }

    /// <summary>A short account of the chain, the same in every culture; small chains show their probabilities.</summary>
    public override string ToString() => ChainText.Write(this);

    /// <summary>A fact computed from this chain, made once and kept with it; a failure is not kept.</summary>
    internal TFact Derive<TFact>(Func<Chain<TState>, TFact> compute)
        where TFact : class
    {
        var fact = _derived.GetOrAdd(typeof(TFact), static (_, argument) => new Lazy<object>(() => argument.compute(argument.chain)), (compute, chain: this));
        try
        {
            return (TFact)fact.Value;
        }
        catch
        {
            _derived.TryRemove(KeyValuePair.Create(typeof(TFact), fact));
            throw;
        }
    }

    /// <summary>Refuses a question that counts steps of a chain whose time is not counted in steps.</summary>
    /// <exception cref="InvalidOperationException">The chain was made from rates.</exception>
    internal void RequireCountedSteps()
    {
        if (UniformizationRate is { } rate)
        {
            throw new InvalidOperationException(Messages.TimedChainHasNoSteps(rate));
        }
    }

    private List<Transition<TState>> RowTransitions(int row) =>
        RowEntries(row).ConvertAll(entry => new Transition<TState>(States[row], States[entry.Column], entry.Probability));

    private List<(int Column, double Probability)> RowEntries(int row)
    {
        var entries = new List<(int, double)>();
        foreach (var entry in Matrix.Row(row))
        {
            entries.Add(entry);
        }

        return entries;
    }
}
