using System.Diagnostics;
using System.Globalization;
using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;
using Stochastic.Chains.Passage;

namespace Stochastic.Chains;

/// <summary>
/// The fundamental matrix of the transient states: row = from, column = the state that is visited; an entry is the mean number of visits before a
/// recurrent class is entered (Kemeny and Snell 1960).
/// </summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// The start counts as a visit, and so does every step in which a state is stayed in. For a chain made from rates the figures are the mean times
/// spent in each state, in the unit of the rates. The residual of the certificate is the largest relative difference of the two sides of
/// outflow · N = given + flow-weighted N of the next states, over all columns. Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// FundamentalMatrix&lt;string&gt; visits = pool.Absorption().FundamentalMatrix();
/// double washes = visits["clean", "in wash"];
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class FundamentalMatrix<TState> : ICertified
    where TState : notnull
{
    private const int LargestTable = 12;

    private readonly StateSpace<TState> _all;
    private readonly int[] _positionOf;
    private readonly double[] _values;

    private FundamentalMatrix(StateSpace<TState> all, int[] transient, double[] values, Certificate certificate)
    {
        _all = all;
        _values = values;
        Certificate = certificate;
        TransientStates = Array.ConvertAll(transient, state => all[state]);
        _positionOf = new int[all.Count];
        _positionOf.AsSpan().Fill(-1);
        for (var position = 0; position < transient.Length; position++)
        {
            _positionOf[transient[position]] = position;
        }
    }

    /// <summary>Gets the transient states, in the order of the rows and columns of <see cref="Values"/>.</summary>
    public IReadOnlyList<TState> TransientStates { get; }

    /// <summary>Gets the entries, row-major: row = from, column = the state that is visited.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the mean number of visits to a state.</summary>
    /// <param name="from">The transient state to start in.</param>
    /// <param name="state">The transient state that is visited.</param>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="ChainStructureException">A state is recurrent and has no row or column here.</exception>
    public double this[TState from, TState state] => _values[(PositionOf(from) * TransientStates.Count) + PositionOf(state)];

    /// <summary>Copies the entries into a new MathNet.Numerics matrix.</summary>
    /// <exception cref="InvalidOperationException">The chain has no transient states.</exception>
    public Matrix<double> ToMatrix() => TransientStates.Count > 0
        ? Matrix<double>.Build.DenseOfRowMajor(TransientStates.Count, TransientStates.Count, _values)
        : throw new InvalidOperationException(Messages.NoTransientStates);

    /// <summary>A small table of the visits, the same in every culture.</summary>
    public override string ToString()
    {
        var shown = TransientStates.Take(LargestTable).ToList();
        var table = new TextTable(["from", .. shown.Select(state => Text.Label(state))]);
        foreach (var from in shown)
        {
            table.AddRow([Text.Label(from), .. shown.Select(state => this[from, state].ToString("G5", CultureInfo.InvariantCulture))]);
        }

        var rest = TransientStates.Count - LargestTable;
        return rest > 0 ? $"{table}{Environment.NewLine}… and {Text.Count(rest)} more states" : table.ToString();
    }

    internal static FundamentalMatrix<TState> Of(Chain<TState> chain, int[] transient, VisitTable visits, SolveOptions options)
    {
        var isProof = options.CertificateLevel == CertificateLevel.Proof && visits.RelativeErrorBound < 1;
        var residual = options.CertificateLevel >= CertificateLevel.Residual
            ? chain.Matrix.OnRates<double, InverseResidual>(new InverseResidual(transient, visits.Values, 1 / (chain.UniformizationRate ?? 1)))
            : double.PositiveInfinity;
        return new FundamentalMatrix<TState>(chain.States, transient, visits.Values, new Certificate
        {
            Method = "state reduction with exit rates",
            Reason = "One column for each transient state, solved together and free of subtraction.",
            Residual = residual,
            RelativeErrorBound = isProof ? visits.RelativeErrorBound : double.PositiveInfinity,
            AbsoluteErrorBound = isProof ? AbsoluteBound.From(visits.RelativeErrorBound, visits.Values.DefaultIfEmpty().Max()) : double.PositiveInfinity,
            Basis = isProof ? visits.Basis : ErrorBasis.None,
            IsProof = isProof,
        });
    }

    private int PositionOf(TState state)
    {
        var position = _positionOf[_all.Require(state)];
        return position >= 0 ? position : throw new ChainStructureException(Messages.RecurrentVisits(state), [state]);
    }
}
