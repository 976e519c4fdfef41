namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// The oracle for chains too large for exact fractions: state reduction without subtractions (Grassmann, Taksar and Heyman, Oper. Res. 33
/// (1985) 1107-1116; Sheskin, Oper. Res. 33 (1985) 228-235) in double-double arithmetic. Entrywise correct to a small multiple of
/// n³ · 2^-102; reads off-diagonals only.
/// </summary>
internal sealed class DoubleDoubleChain
{
    private readonly double[,] _matrix;
    private readonly ReferenceStructure _structure;

    public DoubleDoubleChain(double[,] matrix)
    {
        _matrix = matrix;
        _structure = ExactChain.FromMatrix(matrix).Structure;
    }

    public int StateCount => _matrix.GetLength(0);

    /// <summary>For a chain with one recurrent class; zero on transient states.</summary>
    public ScaledDoubleDouble[] Stationary()
    {
        if (_structure.RecurrentClasses.Count != 1)
        {
            throw new InvalidOperationException($"{_structure.RecurrentClasses.Count} recurrent classes: no single answer.");
        }

        var states = _structure.RecurrentClasses[0].States;
        var moves = MovesAmong(states);
        for (var k = states.Length - 1; k > 0; k--)
        {
            var pivot = Sum(moves[k].AsSpan(0, k));
            for (var i = 0; i < k; i++)
            {
                moves[i][k] /= pivot;
                AddMultiple(moves[i][k], moves[k], moves[i], k, skip: i);
            }
        }

        var weights = new ScaledDoubleDouble[states.Length];
        weights[0] = ScaledDoubleDouble.One;
        for (var k = 1; k < states.Length; k++)
        {
            for (var i = 0; i < k; i++)
            {
                weights[k] += weights[i] * moves[i][k];
            }
        }

        var total = Sum(weights);
        var result = new ScaledDoubleDouble[StateCount];
        for (var i = 0; i < states.Length; i++)
        {
            result[states[i]] = weights[i] / total;
        }

        return result;
    }

    /// <summary>Mean steps until the target is entered, which must be certain from every state; 0 inside it.</summary>
    public ScaledDoubleDouble[] HittingMean(params int[] target)
    {
        int[] states = [.. Enumerable.Range(0, StateCount).Except(target)];
        var moves = MovesAmong(states);
        var exits = Array.ConvertAll(states, state => Sum(Array.ConvertAll(target, to => Move(state, to))));
        var holding = Array.ConvertAll(states, _ => ScaledDoubleDouble.One);
        var pivots = new ScaledDoubleDouble[states.Length];
        for (var k = states.Length - 1; k >= 0; k--)
        {
            pivots[k] = Sum(moves[k].AsSpan(0, k)) + exits[k];
            if (pivots[k].IsZero)
            {
                throw new InvalidOperationException($"State {states[k]} may never reach the target, so its mean time is infinite.");
            }

            for (var i = 0; i < k; i++)
            {
                var share = moves[i][k] / pivots[k];
                exits[i] += share * exits[k];
                holding[i] += share * holding[k];
                AddMultiple(share, moves[k], moves[i], k, skip: i);
            }
        }

        return MeansFrom(states, moves, holding, pivots);
    }

    /// <summary>Mean steps before a recurrent state is entered; 0 in a recurrent state.</summary>
    public ScaledDoubleDouble[] AbsorptionMean() => HittingMean([.. _structure.RecurrentClasses.SelectMany(c => c.States)]);

    private static ScaledDoubleDouble Sum(ReadOnlySpan<ScaledDoubleDouble> values)
    {
        var sum = ScaledDoubleDouble.Zero;
        foreach (var value in values)
        {
            sum += value;
        }

        return sum;
    }

    private static void AddMultiple(ScaledDoubleDouble factor, ScaledDoubleDouble[] from, ScaledDoubleDouble[] to, int count, int skip)
    {
        for (var j = 0; !factor.IsZero && j < count; j++)
        {
            if (j != skip && !from[j].IsZero)
            {
                to[j] += factor * from[j];
            }
        }
    }

    private ScaledDoubleDouble[] MeansFrom(
        int[] states,
        ScaledDoubleDouble[][] moves,
        ScaledDoubleDouble[] holding,
        ScaledDoubleDouble[] pivots)
    {
        var result = new ScaledDoubleDouble[StateCount];
        for (var k = 0; k < states.Length; k++)
        {
            var steps = holding[k];
            for (var j = 0; j < k; j++)
            {
                steps += moves[k][j] * result[states[j]];
            }

            result[states[k]] = steps / pivots[k];
        }

        return result;
    }

    private ScaledDoubleDouble Move(int from, int to) => ScaledDoubleDouble.FromDouble(_matrix[from, to]);

    private ScaledDoubleDouble[][] MovesAmong(int[] states) =>
        Array.ConvertAll(states, from => Array.ConvertAll(states, to => from == to ? ScaledDoubleDouble.Zero : Move(from, to)));
}
