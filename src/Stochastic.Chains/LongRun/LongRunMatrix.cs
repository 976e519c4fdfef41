using System.Diagnostics;
using System.Globalization;
using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Internal;
using Stochastic.Chains.LongRun;

namespace Stochastic.Chains;

/// <summary>The share of time in each state in the long run, from every start: row = from, column = to.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// The limit of the averages of the first n step matrices, which always exists (Cesàro); when <see cref="HasLimit"/>, the limit of the n-step
/// matrices too. Held as its factors, the probabilities of ending in each class and the shares inside it, so that large chains fit. The
/// certificate is explained on <see cref="LongRunDistribution{TState}"/> and holds for every entry. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// LongRunMatrix&lt;string&gt; longRun = pool.LongRun();
/// double lost = longRun["clean", "lost"];
/// LongRunDistribution&lt;string&gt; fromDirty = longRun.Row("dirty");
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class LongRunMatrix<TState> : ICertified
    where TState : notnull
{
    private const int LargestTable = 12;

    private readonly LongRunParts<TState> _parts;
    private readonly Lazy<double[]> _values;

    internal LongRunMatrix(LongRunParts<TState> parts)
    {
        _parts = parts;
        _values = new(Multiply, LazyThreadSafetyMode.PublicationOnly);
        var shares = parts.Shares.Max(shares => shares.Values.ToArray().Max());
        var smallestShare = parts.Shares.Min(shares => shares.Values.ToArray().Where(value => value > 0).Min());
        Certificate = parts.Certify(shares, smallestShare * parts.SmallestEnding, parts.EndingSumError, LongRunDistribution<TState>.ProductError);
    }

    /// <summary>Gets the states, in the order of the rows and columns of <see cref="Values"/>.</summary>
    public StateSpace<TState> States => _parts.Chain.States;

    /// <summary>Gets the shares, row-major: a row for each start, a column for each state. Computed when first asked for; takes 8 · states² bytes.</summary>
    /// <exception cref="MemoryLimitException">The table takes more memory than the options allowed; read single entries or rows.</exception>
    public ReadOnlySpan<double> Values => _values.Value;

    /// <summary>Copies the shares into a new dense MathNet.Numerics matrix: row = from, column = where time is spent.</summary>
    /// <exception cref="MemoryLimitException">The full matrix takes more memory than allowed.</exception>
    public Matrix<double> ToMatrix() => Matrix<double>.Build.DenseOfRowMajor(States.Count, States.Count, _values.Value);

    /// <summary>Gets whether the n-step matrices settle: whether no recurrent class moves in cycles.</summary>
    public bool HasLimit => _parts.Classes.All(group => group.Period == 1);

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the share of time in a state in the long run.</summary>
    /// <param name="from">The state to start in.</param>
    /// <param name="to">The state to spend time in.</param>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    public double this[TState from, TState to] => Share(States.Require(from), States.Require(to));

    /// <summary>Gets the shares of time in all states from one start, with the limits of the cycle where there is one.</summary>
    /// <param name="from">The state to start in.</param>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public LongRunDistribution<TState> Row(TState from)
    {
        var start = new double[States.Count];
        start[States.Require(from)] = 1;
        return LongRunDistribution<TState>.Of(_parts, start);
    }

    /// <summary>A table of a small chain, the same in every culture; else one line.</summary>
    public override string ToString()
    {
        if (States.Count > LargestTable)
        {
            return $"Long-run shares of {Text.Count(States.Count, "state", "states")}, {Text.Count(_parts.Classes.Count, "recurrent class", "recurrent classes")}";
        }

        var table = new TextTable(["from \\ share of", .. States.Select(state => Text.Label(state))]);
        foreach (var from in States)
        {
            table.AddRow([Text.Label(from), .. States.Select(to => this[from, to].ToString("G4", CultureInfo.InvariantCulture))]);
        }

        return table.ToString();
    }

    private double Share(int from, int to) =>
        _parts.ClassOf[to] is var end and >= 0 ? _parts.Ending(from, end) * _parts.Shares[end].Values[to] : 0;

    private double[] Multiply()
    {
        _parts.Options.RequireMemory(States.Count, sizeof(double) * (long)States.Count * States.Count);
        var values = new double[States.Count * States.Count];
        for (var k = 0; k < values.Length; k++)
        {
            values[k] = Share(k / States.Count, k % States.Count);
        }

        return values;
    }
}
