namespace Stochastic.Chains.Kernels;

/// <summary>A running sum of terms p (z − z′) of either sign in twice the digits of a double, with what its error bound needs.</summary>
internal struct DoubledSum
{
    private const double UnitRoundoff = 1.1102230246251565e-16;
    private const double SmallestSubnormal = 4.94065645841247e-324;
    private const double SecondOrder = 1.01;

    private double _sum;
    private double _rest;
    private double _size;
    private double _lowSize;
    private int _additions;

    /// <summary>Adds p (z − z′), each z given as high + low.</summary>
    internal void AddDifference(double rate, double high, double low, double otherHigh, double otherLow)
    {
        var difference = high - otherHigh;
        var part = difference - high;
        var lost = (high - (difference - part)) - (otherHigh + part);
        var lowDifference = low - otherLow;
        var product = rate * difference;
        var error = Math.FusedMultiplyAdd(rate, difference, -product);
        error = Math.FusedMultiplyAdd(rate, lost + lowDifference, error);
        Merge(product, error, Math.Abs(product), rate * Math.Abs(lowDifference), 0);
    }

    /// <summary>Adds the parts of another sum that was made in so many additions.</summary>
    internal void Merge(double sum, double rest, double size, double lowSize, int additions)
    {
        var total = _sum + sum;
        var part = total - _sum;
        _rest += (_sum - (total - part)) + (sum - part) + rest;
        _sum = total;
        _size += size;
        _lowSize += lowSize;
        _additions = Math.Max(_additions, additions) + 1;
    }

    /// <summary>
    /// The right-hand side minus the sum, rounded once more, and an upper bound of how far it is off what it would be without rounding.
    /// </summary>
    internal readonly (double Residual, double Error) ResidualOf(double rightHandSide)
    {
        var difference = rightHandSide - _sum;
        var part = difference - rightHandSide;
        var lost = (rightHandSide - (difference - part)) - (_sum + part);
        var rest = lost - _rest;
        var residual = difference + rest;
        var roundings = (((2.0 * _additions) + 8) * _lowSize) + ((_additions + 3.0) * (_additions + 3) * UnitRoundoff * _size);
        var final = Math.Abs(residual) + Math.Abs(rest) + Math.Abs(_rest);
        var lostToUnderflow = (_additions + 1.0) * 16 * SmallestSubnormal;
        return (residual, (SecondOrder * UnitRoundoff * (roundings + (2 * final))) + lostToUnderflow);
    }
}
