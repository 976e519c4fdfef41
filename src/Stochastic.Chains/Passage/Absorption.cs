using System.Diagnostics;
using System.Globalization;
using Stochastic.Chains.Internal;

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

    private readonly double[] _probabilities;
    private readonly double[] _meanSteps;
    private readonly int[] _endOf;

    internal Absorption(
        StateSpace<TState> states, IReadOnlyList<CommunicatingClass<TState>> ends, int[] endOf, double[] probabilities, double[] meanSteps, Certificate certificate)
    {
        States = states;
        Ends = ends;
        _endOf = endOf;
        _probabilities = probabilities;
        _meanSteps = meanSteps;
        Certificate = certificate;
    }

    /// <summary>Gets the states, in the order of the rows of <see cref="Values"/>.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the recurrent classes in which things can end, in the order of the columns of <see cref="Values"/>.</summary>
    public IReadOnlyList<CommunicatingClass<TState>> Ends { get; }

    /// <summary>Gets the probabilities of ending in each class, row-major: a row for each state, a column for each of <see cref="Ends"/>.</summary>
    public ReadOnlySpan<double> Values => _probabilities;

    /// <summary>Gets the mean times until a recurrent class is entered, in state order; 0 for recurrent states.</summary>
    public ReadOnlySpan<double> MeanStepsValues => _meanSteps;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the probability of ending in the recurrent class of a state, which is that of ever reaching that state.</summary>
    /// <param name="from">The state to start in.</param>
    /// <param name="into">A state of a recurrent class: an absorbing state, or any state of a larger class.</param>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="ChainStructureException"><paramref name="into"/> is transient, so nothing ends there.</exception>
    public double Probability(TState from, TState into)
    {
        var row = States.Require(from);
        var end = _endOf[States.Require(into)];
        return end >= 0
            ? _probabilities[(row * Ends.Count) + end]
            : throw new ChainStructureException(Messages.TransientEnd(into), [into]);
    }

    /// <summary>Gets the mean time until a recurrent class is entered.</summary>
    /// <param name="from">The state to start in.</param>
    /// <returns>Steps, or units of time of a chain made from rates; 0 for a recurrent state.</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public double MeanSteps(TState from) => _meanSteps[States.Require(from)];

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
}
