using System.Diagnostics;
using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>The group inverse of I − P, from which derivatives of the long run follow.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// Row = from, column = to; rows sum to zero. Entry (i, j) is π_j (Σ_k π_k m_kj − m_ij), with mean first passage times m and m_jj = 0; only the last difference can
/// lose digits, and the diagonal loses none. Source: Meyer (1975), SIAM Review 17, 443–464. Immutable and safe for concurrent use.
/// </remarks>
/// <example><code>double entry = chain.GroupInverse()["new", "failed"];</code></example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class GroupInverse<TState> : ICertified
    where TState : notnull
{
    private readonly double[] _values;

    internal GroupInverse(StateSpace<TState> states, double[] values)
    {
        States = states;
        _values = values;
        Certificate = new Certificate { Method = "Mean first passage times", Reason = Messages.DerivativeReason };
    }

    /// <summary>Gets the states, in the order of rows and columns.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the entries, row-major: row = from, column = to.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets an entry.</summary>
    /// <param name="from">The state of the row.</param>
    /// <param name="to">The state of the column.</param>
    /// <exception cref="UnknownStateException">A label is none of the states.</exception>
    public double this[TState from, TState to] => _values[(States.Require(from) * States.Count) + States.Require(to)];

    /// <summary>Copies the entries into a new dense matrix of MathNet.Numerics.</summary>
    public Matrix<double> ToMatrix() => Matrix<double>.Build.DenseOfRowMajor(States.Count, States.Count, _values);

    /// <summary>A short account, the same in every culture.</summary>
    public override string ToString() => $"Group inverse over {States}";
}
