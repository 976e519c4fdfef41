namespace Stochastic.Chains.Kernels;

/// <summary>
/// Arithmetic of upper bounds: each result is not below the exact one for the operands given, because an operation rounded to nearest is
/// off by less than the distance to the next double. For operands that are not negative.
/// </summary>
internal static class Upward
{
    private const double LargestArgument = 700;

    internal static double Add(double first, double second) => first == 0 ? second : second == 0 ? first : Math.BitIncrement(first + second);

    internal static double Multiply(double first, double second) => first == 0 || second == 0 ? 0 : Math.BitIncrement(first * second);

    internal static double Divide(double dividend, double divisor) => dividend == 0 ? 0 : Math.BitIncrement(dividend / divisor);

    /// <summary>A count times a power of two.</summary>
    internal static double Scale(long count, int exponent) => count == 0 ? 0 : Math.BitIncrement(Math.ScaleB(Math.BitIncrement((double)count), exponent));

    /// <summary>A lower bound of a product of positive numbers.</summary>
    internal static double LowerProduct(double first, double second) => Math.BitDecrement(first * second);

    /// <summary>A lower bound of the difference of two numbers.</summary>
    internal static double LowerDifference(double first, double second) => Math.BitDecrement(first - second);

    /// <summary>An upper bound of e^x − 1: for x up to 1/2 it is at most x / (1 − x/2); beyond, by squaring.</summary>
    internal static double ExponentialMinusOne(double argument)
    {
        if (!(argument <= LargestArgument))
        {
            return double.PositiveInfinity;
        }

        var squarings = argument <= 0.5 ? 0 : Math.ILogB(argument) + 2;
        var part = Math.ScaleB(argument, -squarings);
        var excess = Divide(part, LowerDifference(1, part / 2));
        for (var square = 0; square < squarings; square++)
        {
            excess = Multiply(excess, Add(2, excess));
        }

        return excess;
    }
}
