using System.Diagnostics;
using System.Globalization;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>How much the first passage times between all pairs of states vary: row = from, column = to.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// On the diagonal stand the figures of the time until a state is entered again. Steps, or the unit of the rates when the chain was made from
/// rates. +∞ where the mean is. The certificate bounds the errors of the standard deviations, its relative bound those of the variances as well; it has no
/// residual of its own. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// FirstPassageVariances&lt;string&gt; scatter = pump.MeanFirstPassage().Variances();
/// double give = scatter.StandardDeviation("new", "failed");
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class FirstPassageVariances<TState> : ICertified
    where TState : notnull
{
    private const int LargestTable = 12;

    private readonly ScaledDoubleDouble[] _variances;
    private readonly double[] _deviations;

    internal FirstPassageVariances(StateSpace<TState> states, ScaledDoubleDouble[] variances, double[] deviations, Certificate certificate)
    {
        States = states;
        _variances = variances;
        _deviations = deviations;
        Certificate = certificate;
    }

    /// <summary>Gets the states, in the order of the rows and columns of <see cref="Values"/>.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the standard deviations, row-major: row = from, column = to, in state order.</summary>
    public ReadOnlySpan<double> Values => _deviations;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the variance of the time from one state to another, or back to a state.</summary>
    /// <param name="from">The state to start in.</param>
    /// <param name="to">The state to reach; the same state for its recurrence time.</param>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="NumericalRangeException">It is larger than a double can hold; its root, <see cref="StandardDeviation"/>, is not.</exception>
    public double Variance(TState from, TState to)
    {
        var position = PositionOf(from, to);
        if (!double.IsFinite(_deviations[position]))
        {
            return double.PositiveInfinity;
        }

        var variance = _variances[position].ToDouble();
        return _variances[position].IsZero || double.IsNormal(variance)
            ? variance
            : throw new NumericalRangeException(Messages.MomentOutOfRange(from, _variances[position].Exponent), Text.Label(from));
    }

    /// <summary>Gets the standard deviation of the time from one state to another, or back to a state.</summary>
    /// <param name="from">The state to start in.</param>
    /// <param name="to">The state to reach; the same state for its recurrence time.</param>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    public double StandardDeviation(TState from, TState to) => _deviations[PositionOf(from, to)];

    /// <summary>A small table of the standard deviations, the same in every culture.</summary>
    public override string ToString()
    {
        var shown = States.Take(LargestTable).ToList();
        var table = new TextTable(["from \\ to", .. shown.Select(state => Text.Label(state))]);
        foreach (var from in shown)
        {
            table.AddRow([Text.Label(from), .. shown.Select(to => StandardDeviation(from, to).ToString("G4", CultureInfo.InvariantCulture))]);
        }

        var rest = States.Count - LargestTable;
        return rest > 0 ? $"{table}{Environment.NewLine}… and {Text.Count(rest)} more states" : table.ToString();
    }

    private int PositionOf(TState from, TState to) => (States.Require(from) * States.Count) + States.Require(to);
}
