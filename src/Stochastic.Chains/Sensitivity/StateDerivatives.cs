using System.Diagnostics;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>How fast an answer changes for each state when probabilities change in a direction.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// Derivatives are differences by nature, so digits can cancel; their certificate gives no bound. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// StateDerivatives&lt;string&gt; slope = chain.TimeDerivative("lost", theft);
/// double weeksLessPerPoint = slope["clean"] * 0.01;
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class StateDerivatives<TState> : ICertified
    where TState : notnull
{
    private const int LargestTable = 24;

    private readonly double[] _values;

    internal StateDerivatives(StateSpace<TState> states, double[] values, string method)
    {
        States = states;
        _values = values;
        Certificate = new Certificate { Method = method, Reason = Messages.DerivativeReason };
    }

    /// <summary>Gets the states, in the order of <see cref="Values"/>.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the derivatives in state order.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the derivative for a state.</summary>
    /// <param name="state">The state.</param>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    public double this[TState state] => _values[States.Require(state)];

    /// <summary>A small table, the same in every culture.</summary>
    public override string ToString()
    {
        var table = new TextTable(["state", "derivative"]);
        foreach (var state in States.Take(LargestTable))
        {
            table.AddRow([Text.Label(state), Text.Short(this[state])]);
        }

        var rest = States.Count - LargestTable;
        return rest > 0 ? $"{table}{Environment.NewLine}… and {Text.Count(rest)} more states" : table.ToString();
    }
}
