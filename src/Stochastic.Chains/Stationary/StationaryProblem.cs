using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>One recurrent class whose stationary distribution is to be computed, its states numbered from 0 in state order.</summary>
/// <remarks>Immutable and safe for concurrent use.</remarks>
/// <example>See <see cref="IStationaryMethod"/>.</example>
public sealed class StationaryProblem
{
    private readonly int[] _members;
    private readonly int[] _positionOf;
    private readonly Lazy<CompressedRows> _inflows;
    private readonly Lazy<double[]> _outflows;
    private readonly Lazy<double[]> _stays;

    internal StationaryProblem(TransitionMatrix matrix, int[] members, int period, SolveOptions options)
    {
        Matrix = matrix;
        _members = members;
        Period = period;
        Options = options;
        _positionOf = new int[matrix.Size];
        _positionOf.AsSpan().Fill(-1);
        for (var k = 0; k < members.Length; k++)
        {
            _positionOf[members[k]] = k;
        }

        _inflows = new Lazy<CompressedRows>(GatherInflows);
        _outflows = new Lazy<double[]>(SumOutflows);
        _stays = new Lazy<double[]>(FindStays);
    }

    /// <summary>Gets the number of states of the class; at least 2.</summary>
    public int StateCount => _members.Length;

    /// <summary>Gets the period of the class: 1 when it is aperiodic. A step never mixes the cyclic classes of a periodic one.</summary>
    public int Period { get; }

    /// <summary>Gets the options of the solve: cancellation and progress are for the method to honour.</summary>
    public SolveOptions Options { get; }

    internal TransitionMatrix Matrix { get; }

    /// <summary>The positions of the states of the class in the whole chain.</summary>
    internal ReadOnlySpan<int> Members => _members;

    /// <summary>The off-diagonal rates for a direct solve: row = from, column = to.</summary>
    internal RateTable Rates => RateTable.Among(Matrix, _members);

    /// <summary>The off-diagonal moves into each state: row = to, column = from. Built when first asked for.</summary>
    internal CompressedRows Inflows => _inflows.Value;

    /// <summary>The sum of the off-diagonal probabilities of each state.</summary>
    internal double[] Outflows => _outflows.Value;

    /// <summary>The probability of staying in each state: one minus its outflow where a stay was given, else nothing.</summary>
    internal double[] Stays => _stays.Value;

    /// <summary>The entries of the class from a vector over all states of the chain.</summary>
    internal double[] Select(double[] values) => Array.ConvertAll(_members, member => values[member]);

    /// <summary>A vector over the class as one over all states of the chain, zero elsewhere.</summary>
    internal double[] Spread(ReadOnlySpan<double> values)
    {
        var all = new double[Matrix.Size];
        for (var k = 0; k < values.Length; k++)
        {
            all[_members[k]] = values[k];
        }

        return all;
    }

    /// <summary>Lists the moves out of a state to other states of the class: the data of the problem. Stays are left out.</summary>
    /// <param name="state">A state, from 0 to <see cref="StateCount"/> − 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such state.</exception>
    public IReadOnlyList<(int To, double Probability)> MovesFrom(int state)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(state);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(state, StateCount);
        var moves = new List<(int, double)>();
        foreach (var (to, probability) in Matrix.Row(_members[state]))
        {
            if (to != _members[state])
            {
                moves.Add((_positionOf[to], probability));
            }
        }

        return moves;
    }

    /// <summary>Takes a distribution one step further: result = distribution · P.</summary>
    /// <param name="distribution">One number for each state, 0 or more.</param>
    /// <param name="result">Receives the distribution one step later; must not overlap.</param>
    /// <exception cref="ArgumentException">A span is not as long as there are states.</exception>
    public void Step(ReadOnlySpan<double> distribution, Span<double> result)
    {
        ArgumentOutOfRangeException.ThrowIfNotEqual(distribution.Length, StateCount);
        ArgumentOutOfRangeException.ThrowIfNotEqual(result.Length, StateCount);
        for (var to = 0; to < result.Length; to++)
        {
            var columns = Inflows.RowColumns(to);
            var values = Inflows.RowValues(to);
            var inflow = 0.0;
            for (var k = 0; k < columns.Length; k++)
            {
                inflow = Math.FusedMultiplyAdd(distribution[columns[k]], values[k], inflow);
            }

            result[to] = Math.FusedMultiplyAdd(distribution[to], Stays[to], inflow);
        }
    }

    private CompressedRows GatherInflows()
    {
        var inflows = new TripletList();
        for (var k = 0; k < _members.Length; k++)
        {
            foreach (var (to, probability) in Matrix.Row(_members[k]))
            {
                if (to != _members[k])
                {
                    inflows.Add(_positionOf[to], k, probability);
                }
            }
        }

        return inflows.ToCompressedRows(_members.Length);
    }

    private double[] SumOutflows()
    {
        var outflows = new double[_members.Length];
        for (var k = 0; k < _members.Length; k++)
        {
            var sum = default(CompensatedSum);
            foreach (var (to, probability) in Matrix.Row(_members[k]))
            {
                if (to != _members[k])
                {
                    sum.Add(probability);
                }
            }

            outflows[k] = sum.Value;
        }

        return outflows;
    }

    private double[] FindStays() =>
        [.. Outflows.Select((outflow, k) => Matrix[_members[k], _members[k]] > 0 ? Math.Max(0, 1 - outflow) : 0)];
}
