using System.Diagnostics.CodeAnalysis;
using System.Globalization;
using System.Numerics;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>A right or left eigenvector of the transition matrix: a complex number for each state.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>Immutable and safe for concurrent use.</remarks>
/// <example><code>Complex slowest = chain.Spectrum().RightVectors[1]["clean"];</code></example>
public sealed class Eigenvector<TState>
    where TState : notnull
{
    private const int LargestTable = 24;

    private readonly Complex[] _values;

    internal Eigenvector(StateSpace<TState> states, Complex eigenvalue, Complex[] values)
    {
        States = states;
        Eigenvalue = eigenvalue;
        _values = values;
    }

    /// <summary>Gets the states, in the order of <see cref="Values"/>.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the eigenvalue.</summary>
    public Complex Eigenvalue { get; }

    /// <summary>Gets the entries in state order.</summary>
    public ReadOnlySpan<Complex> Values => _values;

    /// <summary>Gets the entry of a state.</summary>
    /// <param name="state">One of the states.</param>
    /// <exception cref="UnknownStateException">The label is none of the states.</exception>
    [SuppressMessage("Design", "CA1043", Justification = "States are the keys.")]
    public Complex this[TState state] => _values[States.Require(state)];

    /// <summary>A small table of the entries, the same in every culture.</summary>
    public override string ToString()
    {
        var table = new TextTable(["state", "entry"]);
        foreach (var state in States.Take(LargestTable))
        {
            table.AddRow([Text.Label(state), this[state].ToString("G5", CultureInfo.InvariantCulture)]);
        }

        var rest = States.Count - LargestTable;
        return rest > 0 ? $"{table}{Environment.NewLine}… and {Text.Count(rest)} more states" : table.ToString();
    }
}
