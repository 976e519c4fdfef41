using System.Diagnostics;
using System.Globalization;
using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Passage;

namespace Stochastic.Chains;

/// <summary>Where things end: which recurrent class is entered from each state, with what probability and after how long.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// Steps are counted until a recurrent class is entered; when the chain was made from rates they come back in the unit of the
/// rates. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// Absorption&lt;string&gt; ends = pool.Absorption();
/// double lost = ends.Probability("clean", "lost");
/// double weeks = ends.MeanSteps("clean");
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class Absorption<TState> : ICertified
    where TState : notnull
{
    private const int LargestTable = 24;

    private readonly AbsorptionQuestion<TState> _question;
    private readonly double[] _probabilities;
    private readonly int[] _endOf;
    private readonly Lazy<FundamentalMatrix<TState>> _fundamental;

    internal Absorption(
        Chain<TState> chain,
        IReadOnlyList<CommunicatingClass<TState>> ends,
        int[] endOf,
        double[] probabilities,
        HittingTimes<TState> steps,
        Certificate certificate,
        SolveOptions options)
    {
        States = chain.States;
        Ends = ends;
        Steps = steps;
        Certificate = certificate;
        _question = new AbsorptionQuestion<TState>(chain, endOf, options);
        _endOf = endOf;
        _probabilities = probabilities;
        _fundamental = new(() => FundamentalMatrix(_question.Options), LazyThreadSafetyMode.PublicationOnly);
    }

    /// <summary>Gets the states, in the order of the rows of <see cref="Values"/>.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the recurrent classes in which things can end, in the order of the columns of <see cref="Values"/>.</summary>
    public IReadOnlyList<CommunicatingClass<TState>> Ends { get; }

    /// <summary>Gets the probabilities of ending in each class, row-major: a row for each state, a column for each of <see cref="Ends"/>.</summary>
    public ReadOnlySpan<double> Values => _probabilities;

    /// <summary>
    /// Gets the time until any recurrent class is entered, with its standard deviation, distribution and quantiles, and with the visits on the way.
    /// </summary>
    public HittingTimes<TState> Steps { get; }

    /// <summary>Gets the mean times until a recurrent class is entered, in state order; 0 for recurrent states.</summary>
    public ReadOnlySpan<double> MeanStepsValues => Steps.Values;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the probability of ending in the recurrent class of a state, which is that of ever reaching that state.</summary>
    /// <param name="from">The state to start in.</param>
    /// <param name="into">A state of a recurrent class: an absorbing state, or any state of a larger class.</param>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="ChainStructureException"><paramref name="into"/> is transient, so nothing ends there.</exception>
    public double Probability(TState from, TState into) => _probabilities[(States.Require(from) * Ends.Count) + EndOf(into)];

    /// <summary>Gets the mean time until a recurrent class is entered.</summary>
    /// <param name="from">The state to start in.</param>
    /// <returns>Steps, or units of time of a chain made from rates; 0 for a recurrent state.</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public double MeanSteps(TState from) => Steps.Mean(from);

    /// <summary>Gets the standard deviation of the time until a recurrent class is entered.</summary>
    /// <param name="from">The state to start in.</param>
    /// <returns>Steps, or units of time of a chain made from rates; 0 for a recurrent state.</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="MemoryLimitException">There are too many transient states for a direct solve.</exception>
    public double StandardDeviationOfSteps(TState from) => Steps.StandardDeviation(from);

    /// <summary>Gets how often a transient state is visited before a recurrent class is entered: an entry of the fundamental matrix.</summary>
    /// <param name="from">The state to start in; the start counts as a visit.</param>
    /// <param name="state">The transient state that is visited.</param>
    /// <returns>Visits, stays included, or the mean time spent there for a chain made from rates; 0 from a recurrent state.</returns>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="ChainStructureException"><paramref name="state"/> is recurrent: once entered it is visited for ever.</exception>
    /// <exception cref="MemoryLimitException">The fundamental matrix takes too much memory; ask <see cref="HittingTimes{TState}.VisitsFrom(TState)"/> of <see cref="Steps"/> for one row.</exception>
    /// <example><code>double repairs = pool.Absorption().ExpectedVisits("clean", "in repair");</code></example>
    public double ExpectedVisits(TState from, TState state)
    {
        if (_endOf[States.Require(state)] >= 0)
        {
            throw new ChainStructureException(Messages.RecurrentVisits(state), [state]);
        }

        return _endOf[States.Require(from)] >= 0 ? 0 : _fundamental.Value[from, state];
    }

    /// <summary>Gets the fundamental matrix: the mean number of visits between all pairs of transient states.</summary>
    /// <exception cref="MemoryLimitException">It takes too much memory: 8 bytes for each pair, twice.</exception>
    /// <exception cref="NumericalRangeException">A figure is outside what a double can hold.</exception>
    public FundamentalMatrix<TState> FundamentalMatrix() => _fundamental.Value;

    /// <summary>Computes the fundamental matrix with options. O(t³) time for t transient states.</summary>
    /// <param name="options">Evidence, cancellation, threads and memory.</param>
    /// <exception cref="MemoryLimitException">It takes too much memory: 8 bytes for each pair, twice.</exception>
    /// <exception cref="NumericalRangeException">A figure is outside what a double can hold.</exception>
    /// <exception cref="OperationCanceledException">The token of the options was cancelled.</exception>
    public FundamentalMatrix<TState> FundamentalMatrix(SolveOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return _question.FundamentalMatrix(options);
    }

    /// <summary>Finds the mean time until a recurrent class is entered over only those futures that end in one given class.</summary>
    /// <param name="into">A state of that class.</param>
    /// <returns>Mean times with their certificate; +∞ from where that end is impossible.</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="ChainStructureException"><paramref name="into"/> is transient, so nothing ends there.</exception>
    /// <exception cref="NumericalRangeException">A figure is outside what a double can hold.</exception>
    /// <exception cref="MemoryLimitException">There are too many transient states for a direct solve.</exception>
    /// <example><code>double weeksOfThoseLost = pool.Absorption().StepsIfInto("lost").Mean("clean");</code></example>
    public ConditionalTimes<TState> StepsIfInto(TState into) => _question.StepsIfInto(EndOf(into), ProbabilitiesOf(EndOf(into)), Certificate);

    /// <summary>
    /// Makes the chain of only those futures that end in one given class: each move is as likely as before times how much likelier the end becomes
    /// with it (Doob's transform).
    /// </summary>
    /// <remarks>
    /// Its probabilities carry rounding and the error bound of this result; what is asked of it takes them as exact. For the mean time with a bound that counts that too ask
    /// <see cref="StepsIfInto"/>.
    /// </remarks>
    /// <param name="into">A state of that class.</param>
    /// <returns>A chain over the class and the transient states from which it can be entered, in the order of the old one.</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    /// <exception cref="ChainStructureException"><paramref name="into"/> is transient, so nothing ends there.</exception>
    /// <exception cref="NumericalRangeException">A probability of the new chain is smaller than a double can hold.</exception>
    /// <example><code>Chain&lt;string&gt; thoseLost = pool.Absorption().Conditional("lost");</code></example>
    public Chain<TState> Conditional(TState into) => _question.Conditional(EndOf(into), ProbabilitiesOf(EndOf(into)));

    /// <summary>Copies the probabilities of the ends into a new dense MathNet.Numerics matrix: a row for each state, a column for each of <see cref="Ends"/>.</summary>
    public Matrix<double> ToMatrix() => Matrix<double>.Build.DenseOfRowMajor(States.Count, Ends.Count, _probabilities);

    /// <summary>A small table of the transient states, the same in every culture.</summary>
    public override string ToString()
    {
        var transient = States.Where((_, position) => _endOf[position] < 0).ToList();
        var table = new TextTable(["from", "mean steps", .. Ends.Select(end => "ends in " + Text.Label(end.States[0]) + (end.States.Count > 1 ? " …" : string.Empty))]);
        foreach (var from in transient.Take(LargestTable))
        {
            var probabilities = Ends.Select(end => Probability(from, end.States[0]).ToString("G6", CultureInfo.InvariantCulture));
            table.AddRow([Text.Label(from), MeanSteps(from).ToString("G6", CultureInfo.InvariantCulture), .. probabilities]);
        }

        var rest = transient.Count - LargestTable;
        return rest > 0 ? $"{table}{Environment.NewLine}… and {Text.Count(rest)} more states" : table.ToString();
    }

    private int EndOf(TState into)
    {
        var end = _endOf[States.Require(into)];
        return end >= 0 ? end : throw new ChainStructureException(Messages.TransientEnd(into), [into]);
    }

    private double[] ProbabilitiesOf(int end) => [.. Enumerable.Range(0, States.Count).Select(state => _probabilities[(state * Ends.Count) + end])];
}
