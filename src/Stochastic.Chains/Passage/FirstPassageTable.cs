using System.Diagnostics;
using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Passage;

namespace Stochastic.Chains;

/// <summary>The mean first passage times between all pairs of states: row = from, column = to.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// Off the diagonal stands the mean time until a state is first reached; on it, the mean time until a state is entered again (mean
/// recurrence time). Times are counted in steps, or in the unit of the rates when the chain was made from rates; there, coming back takes
/// leaving first. A time is +∞ where the state may never be reached or come back to. The residual of the certificate is the largest relative
/// difference of the two sides of outflow · time = 1 + flow-weighted times of the next states. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// FirstPassageTable&lt;string&gt; times = pump.MeanFirstPassage();
/// double weeksToFailure = times["new", "failed"];
/// double weeksBetweenFailures = times["failed", "failed"];
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class FirstPassageTable<TState> : ICertified
    where TState : notnull
{
    private readonly Chain<TState> _chain;
    private readonly double[] _values;
    private readonly SolveOptions _options;
    private readonly Lazy<KemenySum> _kemeny;

    internal FirstPassageTable(Chain<TState> chain, double[] values, double[] returns, Certificate certificate, SolveOptions options)
    {
        _chain = chain;
        _values = values;
        _options = options;
        Certificate = certificate;
        _kemeny = new Lazy<KemenySum>(() => KemenySum.Of(values, returns, certificate.RelativeErrorBound, _chain.Structure().RecurrentClasses[0].Members));
    }

    /// <summary>Gets the states, in the order of the rows and columns of <see cref="Values"/>.</summary>
    public StateSpace<TState> States => _chain.States;

    /// <summary>Gets the mean times, row-major: row = from, column = to, in state order.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the mean time from one state to another, or back to a state.</summary>
    /// <param name="from">The state to start in.</param>
    /// <param name="to">The state to reach; the same state for the mean recurrence time.</param>
    /// <returns>Steps, or units of time of a chain made from rates; +∞ where there is a chance of never getting there.</returns>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    public double this[TState from, TState to] => _values[(States.Require(from) * States.Count) + States.Require(to)];

    /// <summary>
    /// Gets Kemeny's constant: the mean time to a state that is drawn from the stationary distribution, the same from every recurrent start.
    /// </summary>
    /// <remarks>
    /// The convention is Σ_j π_j·m_ij with m_jj = 0; with recurrence times on the diagonal it would be one step more (Kemeny and Snell
    /// 1960). Transient states have no weight and are no starts. A sum of positive numbers, in compensated summation. O(states²) when
    /// first asked for.
    /// </remarks>
    /// <exception cref="ChainStructureException">There are several recurrent classes.</exception>
    public double KemenyConstant => Kemeny.Constant;

    /// <summary>
    /// Gets a bound on the relative error of <see cref="KemenyConstant"/>, proved as the certificate is; +∞ when that proves nothing.
    /// </summary>
    /// <exception cref="ChainStructureException">There are several recurrent classes.</exception>
    public double KemenyErrorBound => Kemeny.RelativeErrorBound;

    /// <summary>
    /// Gets by how much, relative to itself, Kemeny's constant differs between the starts it is computed from: rounding, and hardly more than
    /// twice the bound. A check that owes nothing to the bound.
    /// </summary>
    /// <exception cref="ChainStructureException">There are several recurrent classes.</exception>
    public double KemenySpread => Kemeny.Spread;

    private KemenySum Kemeny => _chain.Structure().RecurrentClasses is { Count: > 1 } classes
        ? throw new ChainStructureException(
            Messages.NoKemenyConstant([.. classes.Select(group => $"{{{Text.List(group.States)}}}")]), classes.Select(group => (object)group.States[0]))
        : _kemeny.Value;

    /// <summary>Enumerates all mean times, row by row, in state order.</summary>
    public IEnumerable<FirstPassageTime<TState>> Times() => States.SelectMany(TimesFrom);

    /// <summary>Lists the mean times from one state to each, in state order.</summary>
    /// <param name="from">The state to start in.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public IReadOnlyList<FirstPassageTime<TState>> TimesFrom(TState from)
    {
        var row = States.Require(from) * States.Count;
        return [.. States.Select((to, column) => new FirstPassageTime<TState>(from, to, _values[row + column]))];
    }

    /// <summary>Lists the mean times from each state to one, in state order; at the state itself stands its mean recurrence time.</summary>
    /// <param name="to">The state to reach.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public IReadOnlyList<FirstPassageTime<TState>> TimesTo(TState to)
    {
        var column = States.Require(to);
        return [.. States.Select((from, row) => new FirstPassageTime<TState>(from, to, _values[(row * States.Count) + column]))];
    }

    /// <summary>
    /// Computes the times to one state once more, refined in twice the precision, with a proof for that column that is as sharp as can be, and
    /// with the probability of ever getting there and the standard deviations.
    /// </summary>
    /// <param name="to">The state to reach.</param>
    /// <returns>What <c>TimeTo</c> gives with the options of this table, at <see cref="CertificateLevel.Proof"/>; 0 at the state itself. O(states³).</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="MemoryLimitException">There are too many states for a direct solve.</exception>
    public HittingTimes<TState> Refine(TState to) => _chain.TimeTo(
        to, _options with { CertificateLevel = CertificateLevel.Proof, CancellationToken = CancellationToken.None, Progress = null });

    /// <summary>Finds how much the times between all pairs vary, the times of coming back included.</summary>
    /// <exception cref="MemoryLimitException">There are too many states for a direct solve.</exception>
    /// <remarks>One solve for each state to reach: O(states⁴) in all. For few states to reach ask <see cref="Refine"/> for each of them.</remarks>
    /// <example><code>double give = pump.MeanFirstPassage().Variances().StandardDeviation("new", "failed");</code></example>
    public FirstPassageVariances<TState> Variances() => Variances(_options with { CancellationToken = CancellationToken.None, Progress = null });

    /// <summary>Finds how much the times between all pairs vary, with options.</summary>
    /// <param name="options">Evidence, cancellation, progress, threads and memory.</param>
    /// <exception cref="MemoryLimitException">There are too many states for a direct solve.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    /// <remarks>
    /// One solve for each state to reach: O(states⁴) in all, and at <see cref="CertificateLevel.Proof"/> in twice the precision up to 500 states.
    /// </remarks>
    public FirstPassageVariances<TState> Variances(SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return new FirstPassageVariance<TState>(_chain, _values, Certificate, options).Solve();
    }

    /// <summary>Copies the times into a new array: row = from, column = to, in state order.</summary>
    public double[,] ToArray()
    {
        var array = new double[States.Count, States.Count];
        Buffer.BlockCopy(_values, 0, array, 0, Buffer.ByteLength(_values));
        return array;
    }

    /// <summary>Copies the times into a new dense MathNet.Numerics matrix: row = from, column = to.</summary>
    public Matrix<double> ToMatrix() => Matrix<double>.Build.DenseOfRowMajor(States.Count, States.Count, _values);

    /// <summary>A small table of the times that fits a terminal, the same in every culture.</summary>
    public override string ToString() => FirstPassageText.Write(this);
}
