using Stochastic.Chains.Internal;

namespace Stochastic.Chains.Stationary;

/// <summary>Checks the options that all iterative methods share.</summary>
internal static class IterationLimits
{
    internal static double Tolerance(double value) => value is > 0 and < 1
        ? value
        : throw new ArgumentOutOfRangeException(nameof(value), value, Messages.ToleranceOutOfRange);

    internal static int AtLeastOne(int value)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(value, 1);
        return value;
    }
}
