namespace Stochastic.Chains.Kernels;

/// <summary>A bound on the relative error of any positive vector as the stationary distribution of one recurrent class.</summary>
/// <remarks>
/// <para>
/// With flows f_ij = x_i p_ij, let q be any numbers and change each flow by (q_i − q_j) f_ij; let t_e be the sum of what is then left of
/// the imbalances (inflow − outflow) on the far side of each edge e of a spanning tree, and change the flow of that edge by ±t_e. Then all
/// flows are in balance, so x / Σx is the stationary distribution of the chain with these flows, whose rates differ from the given ones
/// by relative amounts of at most ε = max |q_i − q_j| + max |t_e| / f_e. By the Markov chain tree theorem each stationary probability is a
/// quotient of two sums of products of n − 1 rates, so every entry of x / Σx is within a factor ((1 + ε) / (1 − ε))ⁿ⁻¹ of the truth
/// (O'Cinneide 1993).
/// </para>
/// <para>
/// Rounding: the change of a flow is defined as an integer multiple of a power of two, computed from the significands in integers and
/// never larger than |q_i − q_j| f_ij; products of significands are exact; all of them are added without rounding but for a cut-off below
/// 2⁻⁶⁴ of the smallest flow of the tree, which is counted. So nothing depends on how well q was computed: three rounds of Jacobi's
/// iteration for the weighted graph Laplacian, which spread the imbalance of each state in proportion over all its flows.
/// </para>
/// </remarks>
internal static class FlowBalance
{
    private const int LargestScaledExponent = 960;
    private const int CutOffBits = 64;

    /// <summary>
    /// The bound on |x_i − π_i| / π_i over the states of one closed communicating class; +∞ where nothing is proved: the vector is too far
    /// off, or a flow that is needed lies outside the range of doubles even after scaling.
    /// </summary>
    /// <param name="rows">The rates; from the states of the class they lead to states of the class only.</param>
    /// <param name="states">The states of the class.</param>
    /// <param name="values">The vector, by state.</param>
    /// <param name="memoryLimit">The most memory that the exact sums may take, in bytes.</param>
    /// <param name="cancellation">Looked at between the passes over the rates.</param>
    internal static double RelativeErrorBound<TRows>(
        TRows rows, ReadOnlySpan<int> states, ReadOnlySpan<double> values, long memoryLimit, CancellationToken cancellation)
        where TRows : struct, IRateRows
    {
        if (!ScaledWeights.TryScale(states, values, LargestScaledExponent, out var weights, out var scale))
        {
            return double.PositiveInfinity;
        }

        var change = LargestChange(rows, states, values, weights, scale, memoryLimit, cancellation);
        return change < 1 ? TreeTheorem(change, states.Length, ScaledWeights.DeviationFromOne(states, values)) : double.PositiveInfinity;
    }

    /// <summary>The bound from the largest relative change of a rate and the deviation of the sum of the vector from one.</summary>
    private static double TreeTheorem(double change, int states, double deviation)
    {
        // log((1 + ε) / (1 − ε)) = 2 (ε + ε³/3 + ε⁵/5 + …) is at most 2 ε (1 + ε² / (3 (1 − ε²))).
        var square = Upward.Multiply(change, change);
        var correction = Upward.Divide(square, Upward.LowerProduct(3, Upward.LowerDifference(1, square)));
        var logarithm = Upward.Multiply(Upward.Multiply(2, change), Upward.Add(1, correction));
        var excess = Upward.ExponentialMinusOne(Upward.Multiply(states - 1, logarithm));
        return Upward.Add(excess, Upward.Multiply(deviation, Upward.Add(1, excess)));
    }

    private static double LargestChange<TRows>(
        TRows rows, ReadOnlySpan<int> states, ReadOnlySpan<double> values, double[] weights, int scale, long memoryLimit,
        CancellationToken cancellation)
        where TRows : struct, IRateRows
    {
        if (states.Length == 1)
        {
            return 0;
        }

        var tree = HeavySpanningTree.Find(rows, states, weights, cancellation);
        if (tree is null)
        {
            return double.PositiveInfinity;
        }

        var moves = CountMoves(rows, states);
        var moveBits = (int)long.Log2(moves) + 1;
        var unit = Math.ILogB(tree.SmallestFlow()) - scale - CutOffBits - moveBits;
        var highest = LargestScaledExponent - scale + moveBits + 1;
        if (ExactSums.Bytes(rows.Count, unit, highest) > memoryLimit)
        {
            return double.PositiveInfinity;
        }

        var sums = new ExactSums(rows.Count, unit, highest);
        ExactFlows.AddImbalances(rows, states, values, sums);
        cancellation.ThrowIfCancellationRequested();
        var (potentials, precision) = FlowSpread.Potentials(rows, states, weights, sums, scale);
        cancellation.ThrowIfCancellationRequested();
        var widest = ExactFlows.AddSpread(rows, states, values, potentials, precision, sums);
        return Upward.Add(Upward.Scale(widest, -precision), LargestRouted(tree, sums, scale, Upward.Scale(moves, unit + scale)));
    }

    /// <summary>
    /// The largest relative change of a flow of the tree when each subtree sends its surplus to its parent; the surplus is known to within
    /// the cut-off.
    /// </summary>
    private static double LargestRouted(HeavySpanningTree tree, ExactSums sums, int scale, double cutOff)
    {
        var largest = 0.0;
        for (var k = tree.Order.Length - 1; k > 0; k--)
        {
            var state = tree.Order[k];
            var surplus = Upward.Add(sums.UpperMagnitude(state, scale), cutOff);
            largest = Math.Max(largest, Upward.Divide(surplus, Math.BitDecrement(tree.Flows[state])));
            sums.AddSum(state, tree.Parents[state]);
        }

        return largest;
    }

    private static long CountMoves<TRows>(TRows rows, ReadOnlySpan<int> states)
        where TRows : struct, IRateRows
    {
        var count = 0L;
        foreach (var state in states)
        {
            count += rows.Rates(state).Length;
        }

        return count;
    }
}
