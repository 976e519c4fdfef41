namespace Stochastic.Chains.Kernels;

/// <summary>Numbers q for the states such that changing each flow f_ij by (q_i − q_j) f_ij takes away most of the imbalances.</summary>
internal static class FlowSpread
{
    private const int Rounds = 3;
    private const int PotentialBits = 59;
    private const int LargestPrecision = 900;
    private const double Largest = 0.25;

    /// <summary>
    /// The numbers as integers in units of 2^−precision. Each round divides what is left of every imbalance by the state's throughput and
    /// so changes all its flows in proportion.
    /// </summary>
    internal static (long[] Potentials, int Precision) Potentials<TRows>(
        TRows rows, ReadOnlySpan<int> states, double[] weights, ExactSums imbalances, int scale)
        where TRows : struct, IRateRows
    {
        var ones = new double[weights.Length];
        Array.Fill(ones, 1);
        var throughputs = new double[weights.Length];
        AddNeighbours(rows, states, weights, ones, throughputs);

        var rest = new double[weights.Length];
        foreach (var state in states)
        {
            rest[state] = imbalances.Value(state, scale);
        }

        var potentials = new double[weights.Length];
        var step = ones;
        for (var round = 1; ; round++)
        {
            foreach (var state in states)
            {
                step[state] = double.IsNormal(throughputs[state]) ? rest[state] / throughputs[state] : 0;
                potentials[state] += step[state];
            }

            if (round == Rounds)
            {
                return ToIntegers(states, potentials);
            }

            Array.Clear(rest);
            AddNeighbours(rows, states, weights, step, rest);
        }
    }

    /// <summary>Adds, for each state, the flows to and from its neighbours, each times the neighbour's number.</summary>
    private static void AddNeighbours<TRows>(TRows rows, ReadOnlySpan<int> states, double[] weights, double[] numbers, double[] sums)
        where TRows : struct, IRateRows
    {
        foreach (var state in states)
        {
            rows.AddScaled(state, weights[state] * numbers[state], sums);
            sums[state] += weights[state] * rows.Dot(state, numbers);
        }
    }

    private static (long[] Potentials, int Precision) ToIntegers(ReadOnlySpan<int> states, double[] potentials)
    {
        var largest = double.Epsilon;
        foreach (var state in states)
        {
            ref var potential = ref potentials[state];
            potential = double.IsFinite(potential) ? Math.Clamp(potential, -Largest, Largest) : 0;
            largest = Math.Max(largest, Math.Abs(potential));
        }

        var precision = Math.Min(LargestPrecision, PotentialBits - Math.ILogB(largest));
        var integers = new long[potentials.Length];
        foreach (var state in states)
        {
            integers[state] = (long)Math.ScaleB(potentials[state], precision);
        }

        return (integers, precision);
    }
}
