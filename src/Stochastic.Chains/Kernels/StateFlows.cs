namespace Stochastic.Chains.Kernels;

/// <summary>Inflow minus outflow of the states of a class for a positive vector, in twice the digits of a double.</summary>
/// <remarks>
/// Sums of n products of non-negative numbers lose at most <see cref="DoubledLoops.SumError"/> of themselves, an outflow
/// z_j Σ_l p_jl one such loss and that of a product; the difference of the two loses 4 u² of both and is then rounded to a double.
/// </remarks>
internal sealed class StateFlows<TRows>
    where TRows : struct, IRateRows
{
    private const double UnitRoundoff = 1.1102230246251565e-16;
    private const double SmallestSubnormal = 4.94065645841247e-324;
    private const double RoundingsOfDifference = 12;
    private const double SecondOrder = 1.01;

    private readonly TRows _rows;
    private readonly int[] _states;
    private readonly double[] _outHigh;
    private readonly double[] _outLow;
    private readonly double[] _inHigh;
    private readonly double[] _inLow;

    internal StateFlows(TRows rows, ReadOnlySpan<int> states)
    {
        _rows = rows;
        _states = states.ToArray();
        _outHigh = new double[states.Length];
        _outLow = new double[states.Length];
        _inHigh = new double[rows.Count];
        _inLow = new double[rows.Count];
        for (var k = 0; k < states.Length; k++)
        {
            (_outHigh[k], _outLow[k]) = rows.DoubledRowSum(states[k]);
        }
    }

    /// <summary>The sum of the off-diagonal rates of a state of the class, rounded to a double.</summary>
    internal double Outflow(int position) => _outHigh[position];

    /// <summary>
    /// The imbalances of the first states for weights high + low, those that are nothing but rounding set to zero, and upper bounds of
    /// their absolute values. The weights are scaled so that no flow that matters falls below 2⁻⁹⁰⁰.
    /// </summary>
    internal void FindImbalances(double[] highs, double[] lows, double[] imbalances, double[] bounds)
    {
        Array.Clear(_inHigh);
        Array.Clear(_inLow);
        foreach (var state in _states)
        {
            _rows.AddScaled(state, highs[state], lows[state], _inHigh, _inLow);
        }

        var relativeError = DoubledLoops.SumError(_states.Length) + (RoundingsOfDifference * UnitRoundoff * UnitRoundoff);
        var lostToUnderflow = 16.0 * (_states.Length + 1) * SmallestSubnormal;
        for (var k = 0; k < imbalances.Length; k++)
        {
            var state = _states[k];
            var (outHigh, outLow) = DoubleDouble.Multiply(highs[state], lows[state], _outHigh[k], _outLow[k]);
            var difference = _inHigh[state] - outHigh;
            var part = difference - _inHigh[state];
            var lost = (_inHigh[state] - (difference - part)) - (outHigh + part);
            var imbalance = difference + (lost + (_inLow[state] - outLow));
            var error = (SecondOrder * relativeError * (_inHigh[state] + outHigh)) + lostToUnderflow;
            bounds[k] = Upward.Add(Math.Abs(imbalance) * (1 + (4 * UnitRoundoff)), error);
            imbalances[k] = Math.Abs(imbalance) > error ? imbalance : 0;
        }
    }
}
