using System.Diagnostics;
using System.Diagnostics.CodeAnalysis;
using System.Globalization;
using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>The n-step transition matrix: the probability of each state after n steps, from each state (row = from, column = to).</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// No entry is negative or above one; except for one step, which shows the probabilities as given, each row sums to one within n
/// roundings, n being the number of states. The residual of its certificate is the largest |row sum − 1|. Immutable and safe for
/// concurrent use.
/// </remarks>
/// <example>
/// <code>
/// NStepMatrix&lt;string&gt; year = chain.NStep(52);
/// double lost = year["clean", "lost"];
/// Distribution&lt;string&gt; fromDirty = year.Row("dirty");
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class NStepMatrix<TState> : ICertified
    where TState : notnull
{
    private const int LargestTable = 12;

    private readonly double[] _values;

    internal NStepMatrix(StateSpace<TState> states, double[] values, long steps, Certificate certificate)
    {
        States = states;
        _values = values;
        Steps = steps;
        Certificate = certificate;
    }

    /// <summary>Gets the states, in the order of the rows and columns of <see cref="Values"/>.</summary>
    public StateSpace<TState> States { get; }

    /// <summary>Gets the number of steps.</summary>
    public long Steps { get; }

    /// <summary>Gets the probabilities, row-major: row = from, column = to, in state order.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets the probability of being in one state after the steps, having started in another.</summary>
    /// <param name="from">The state to start in.</param>
    /// <param name="to">The state after the steps.</param>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    [SuppressMessage("Design", "CA1043", Justification = "States are the keys.")]
    public double this[TState from, TState to] => _values[(States.Require(from) * States.Count) + States.Require(to)];

    /// <summary>Gets where things stand after the steps, having started in one state.</summary>
    /// <param name="from">The state to start in.</param>
    /// <returns>The row of the matrix with the certificate of the whole matrix.</returns>
    /// <exception cref="UnknownStateException">The label is none of the chain's states.</exception>
    public StepDistribution<TState> Row(TState from)
    {
        var row = _values.AsSpan(States.Require(from) * States.Count, States.Count);
        return new StepDistribution<TState>(States, row.ToArray(), Steps, Certificate);
    }

    /// <summary>Copies the probabilities into a new array: row = from, column = to, in state order.</summary>
    public double[,] ToArray()
    {
        var array = new double[States.Count, States.Count];
        Buffer.BlockCopy(_values, 0, array, 0, sizeof(double) * _values.Length);
        return array;
    }

    /// <summary>Copies the probabilities into a new dense matrix of MathNet.Numerics.</summary>
    public Matrix<double> ToMatrix() => Matrix<double>.Build.DenseOfRowMajor(States.Count, States.Count, _values);

    /// <summary>A small table, the same in every culture; of many states the number of steps and the states only.</summary>
    public override string ToString()
    {
        if (States.Count > LargestTable)
        {
            return $"{Text.Count(Steps, "step", "steps")} over {States}";
        }

        var table = new TextTable(["from \\ to", .. States.Select(state => Text.Label(state))]);
        foreach (var from in States)
        {
            table.AddRow([Text.Label(from), .. States.Select(to => Cell(this[from, to]))]);
        }

        return $"{Text.Count(Steps, "step", "steps")}{Environment.NewLine}{table}";
    }

    private static string Cell(double probability) => probability == 0 ? "·" : probability.ToString("G4", CultureInfo.InvariantCulture);
}
