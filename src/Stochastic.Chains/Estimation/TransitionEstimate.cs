using System.Diagnostics;
using Stochastic.Chains.Estimation;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>Probabilities estimated from counts, each with how far it can be trusted.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// <para>
/// Without a prior, by maximum likelihood: an estimate is count / total, its standard error √(p(1 − p)/total) (Anderson and Goodman 1957, Ann. Math.
/// Statist. 28, 89–110), its interval Wilson's score interval (1927), which unlike p ± 2 standard errors holds its level where moves are rare.
/// </para>
/// <para>
/// With a prior, each row has a Dirichlet posterior: an estimate is its mean, the standard error its standard deviation, the interval the equal-tailed
/// credible interval. A certificate bounds errors of computing; this says how far the figures themselves are from the truth.
/// </para>
/// <para>Immutable and safe for concurrent use; row = from, column = to. Intervals are for one probability at a time.</para>
/// </remarks>
/// <example>
/// <code>
/// TransitionEstimate&lt;string&gt; estimate = counts.Estimate();
/// double lost = estimate["at shop", "lost"];
/// Interval range = estimate.Interval("at shop", "lost");
/// Chain&lt;string&gt; chain = estimate.Chain;
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class TransitionEstimate<TState>
    where TState : notnull
{
    private readonly EstimateRows _rows;

    internal TransitionEstimate(StateSpace<TState> states, EstimateRows rows, EstimateOptions<TState> options)
    {
        _rows = rows;
        Options = options;
        Chain = new Chain<TState>(states, rows.ToMatrix(), [], uniformizationRate: null);
        ThinRows = [.. Enumerable.Range(0, states.Count).Where(row => rows.Total(row) < options.FewObservations).Select(row => new ThinRow<TState>(states[row], rows.Total(row)))];
        Fit = FindFit(rows);
    }

    /// <summary>Gets the states.</summary>
    public StateSpace<TState> States => Chain.States;

    /// <summary>Gets the options the estimate was made with.</summary>
    public EstimateOptions<TState> Options { get; }

    /// <summary>Gets the estimated chain: the most likely one, or with a prior the posterior mean.</summary>
    public Chain<TState> Chain { get; }

    /// <summary>Gets the states with fewer observations than <see cref="EstimateOptions{TState}.FewObservations"/>, in state order, with their counts.</summary>
    public IReadOnlyList<ThinRow<TState>> ThinRows { get; }

    /// <summary>
    /// Gets the largest log-likelihood, that of the maximum likelihood estimate, and the number of parameters: possible moves less one for each state
    /// that was left.
    /// </summary>
    public ModelFit Fit { get; }

    internal EstimateRows Rows => _rows;

    /// <summary>Gets the estimated probability of a move.</summary>
    /// <param name="from">The state the move starts in.</param>
    /// <param name="to">The state the move ends in.</param>
    /// <exception cref="UnknownStateException">A label is none of the states.</exception>
    public double this[TState from, TState to] => Chain[from, to];

    /// <summary>
    /// Finds the standard error of the estimated probability of a move: by maximum likelihood √(p(1 − p)/total), with a prior the standard deviation of
    /// its posterior. 0 for a move that was not seen is a weakness of the formula, not certainty: see <see cref="Interval"/>.
    /// </summary>
    /// <param name="from">The state the move starts in.</param>
    /// <param name="to">The state the move ends in.</param>
    /// <exception cref="UnknownStateException">A label is none of the states.</exception>
    public double StandardError(TState from, TState to)
    {
        var (row, column) = (States.Require(from), States.Require(to));
        var k = _rows.Find(row, column);
        if (k < 0 || _rows.PossibleMoves(row) == 1)
        {
            return 0;
        }

        var total = _rows.Total(row);
        var weight = _rows.WeightTotal(row);
        var mine = _rows.Counts(row)[k] + _rows.Weights(row)[k];
        var others = weight == 0 ? total - _rows.Counts(row)[k] : OtherWeights(row, k);
        var size = total + weight;
        return Math.Sqrt(mine / size * (others / size) / (weight == 0 ? size : size + 1));
    }

    /// <summary>
    /// Finds the interval of the probability of a move at the level of the options: Wilson's score interval, or with a prior the credible interval.
    /// 0 to 0 for impossible moves, 1 to 1 for a state's only possible move.
    /// </summary>
    /// <param name="from">The state the move starts in.</param>
    /// <param name="to">The state the move ends in.</param>
    /// <exception cref="UnknownStateException">A label is none of the states.</exception>
    public Interval Interval(TState from, TState to)
    {
        var (row, column) = (States.Require(from), States.Require(to));
        var k = _rows.Find(row, column);
        if (_rows.PossibleMoves(row) == 1)
        {
            var certain = k >= 0 ? 1 : 0;
            return new Interval(certain, certain, Options.Level);
        }

        if (Options.Prior is not null)
        {
            return k < 0 ? new Interval(0, 0, Options.Level) : RowIntervals.Credible(_rows.Counts(row)[k] + _rows.Weights(row)[k], OtherWeights(row, k), Options.Level);
        }

        return k < 0 && IsImpossible(from, to)
            ? new Interval(0, 0, Options.Level)
            : RowIntervals.Score(k < 0 ? 0 : _rows.Counts(row)[k], _rows.Total(row), Options.Level);
    }

    /// <summary>A short account of the estimate, the same in every culture; few states show as a table with standard errors.</summary>
    public override string ToString() => EstimateText.Write(this);

    internal long TotalFrom(int row) => _rows.Total(row);

    private bool IsImpossible(TState from, TState to) =>
        Options.UnseenMoves == UnseenMoves.Impossible
        || Options.ImpossibleMoves.Any(move => States.Comparer.Equals(move.From, from) && States.Comparer.Equals(move.To, to));

    /// <summary>The Dirichlet weights of a row but one, added without subtracting.</summary>
    private double OtherWeights(int row, int except)
    {
        var sum = default(CompensatedSum);
        for (var k = 0; k < _rows.Columns(row).Length; k++)
        {
            if (k != except)
            {
                sum.Add(_rows.Counts(row)[k]);
                sum.Add(_rows.Weights(row)[k]);
            }
        }

        return sum.Value;
    }

    private static ModelFit FindFit(EstimateRows rows)
    {
        var logLikelihood = default(CompensatedSum);
        var (parameters, observations) = (0L, 0L);
        for (var row = 0; row < rows.RowCount; row++)
        {
            var total = rows.Total(row);
            foreach (var count in rows.Counts(row))
            {
                logLikelihood.Add(LogLikelihood.Of(count, total));
            }

            observations += total;
            parameters += total > 0 ? rows.PossibleMoves(row) - 1 : 0;
        }

        return new ModelFit(logLikelihood.Value, parameters, observations);
    }
}
