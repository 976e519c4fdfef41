using System.Diagnostics;
using System.Globalization;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>How long it takes, from each state, until one of the target states is first reached, and whether it ever is.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// Times are counted in steps, or in the unit of the rates when the chain was made from rates. The residual of the certificate is
/// the largest relative difference of the two sides of the equations of the first step: outflow · time = 1 + flow-weighted times of
/// the next states, and the same for the probabilities. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// HittingTimes&lt;string&gt; untilFailed = pump.TimeTo("failed");
/// double weeks = untilFailed.Mean("new");
/// double ever = untilFailed.ReachingProbability("new");
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class HittingTimes<TState> : ICertified
    where TState : notnull
{
    private const int LargestTable = 24;

    private readonly double[] _means;
    private readonly double[] _reaching;

    internal HittingTimes(StateSpace<TState> states, IReadOnlyList<TState> targets, double[] means, double[] reaching, Certificate certificate)
    {
        States = states;
        Targets = targets;
        _means = means;
        _reaching = reaching;
        Certificate = certificate;
    }

    /// <summary>Gets the states, in the order of <see cref="Values"/>.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the target states.</summary>
    public IReadOnlyList<TState> Targets { get; }

    /// <summary>Gets the mean times in state order; 0 inside the target, +∞ where the target may never be reached.</summary>
    public ReadOnlySpan<double> Values => _means;

    /// <summary>Gets the probabilities of ever reaching the target, in state order; 1 inside the target.</summary>
    public ReadOnlySpan<double> ReachingProbabilities => _reaching;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the mean time until the target is first reached.</summary>
    /// <param name="from">The state to start in.</param>
    /// <returns>0 inside the target; +∞ where there is a chance of never reaching it, see <see cref="ReachingProbability"/>.</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public double Mean(TState from) => _means[States.Require(from)];

    /// <summary>Gets the probability of ever reaching the target.</summary>
    /// <param name="from">The state to start in.</param>
    /// <returns>From 0 to 1; exactly 0 or 1 where the structure says so.</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public double ReachingProbability(TState from) => _reaching[States.Require(from)];

    /// <summary>A small table of the means and probabilities, the same in every culture.</summary>
    public override string ToString()
    {
        var table = new TextTable(["from", "mean time", "ever reached"]);
        foreach (var state in States.Take(LargestTable))
        {
            table.AddRow([Text.Label(state), Mean(state).ToString("G6", CultureInfo.InvariantCulture), ReachingProbability(state).ToString("G6", CultureInfo.InvariantCulture)]);
        }

        var rest = States.Count - LargestTable;
        var end = rest > 0 ? $"{Environment.NewLine}… and {Text.Count(rest)} more states" : string.Empty;
        return $"Time to {Text.List(Targets)}{Environment.NewLine}{table}{end}";
    }
}
