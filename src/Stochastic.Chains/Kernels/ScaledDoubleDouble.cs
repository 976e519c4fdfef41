using System.Numerics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// A non-negative number of about 32 digits, the unevaluated sum of two doubles, with an exponent of its own: no product or quotient
/// under- or overflows. The value is (High + Low) · 2^(512 · Block) with High from 2⁻²⁵⁶ up to 2²⁵⁶ and |Low| ≤ u · High, or zero.
/// </summary>
/// <remarks>
/// With u = 2⁻⁵³ each operation has a relative error of at most <see cref="OperationError"/> = 12 u² (Dekker 1971; for sharper constants
/// Joldes, Muller and Popescu 2017): a sum of two such numbers loses at most 3 u² (rounding of Low + Low and of its sum with the error of
/// High + High), a product 6 u² (Low · Low is left out, two fused roundings), a quotient 11 u² (two roundings of the remainder, one of its
/// quotient, and the divisor's Low left out there), each times 1 + 8 u for terms of higher order. All errors of products of the highs are
/// exact because nothing is below 2⁻⁵¹² before it is brought back into its block. In a sum of numbers two blocks or more apart the smaller
/// one is less than 2⁻⁵¹² of the larger and is left out.
/// </remarks>
internal readonly record struct ScaledDoubleDouble :
    IAdditionOperators<ScaledDoubleDouble, ScaledDoubleDouble, ScaledDoubleDouble>,
    IMultiplyOperators<ScaledDoubleDouble, ScaledDoubleDouble, ScaledDoubleDouble>,
    IDivisionOperators<ScaledDoubleDouble, ScaledDoubleDouble, ScaledDoubleDouble>
{
    /// <summary>The bound on the relative error of one operation, 12 · 2⁻¹⁰⁶.</summary>
    internal const double OperationError = 12 * UnitRoundoff * UnitRoundoff;

    private const double UnitRoundoff = 1.1102230246251565e-16;
    private const int BlockBits = 512;
    private const double BlockTop = 1.157920892373162e77;
    private const double BlockBottom = 1 / BlockTop;
    private const double BlockUp = BlockTop * BlockTop;
    private const double BlockDown = 1 / BlockUp;

    private ScaledDoubleDouble(double high, double low, long block)
    {
        if (high >= BlockTop)
        {
            (high, low, block) = (high * BlockDown, low * BlockDown, block + 1);
        }
        else if (high < BlockBottom)
        {
            (high, low, block) = (high * BlockUp, low * BlockUp, high == 0 ? 0 : block - 1);
        }

        (High, Low, Block) = (high, low, block);
    }

    internal static ScaledDoubleDouble One { get; } = new(1, 0, 0);

    internal double High { get; }

    internal double Low { get; }

    internal long Block { get; }

    internal bool IsZero => High == 0;

    /// <summary>The power of two of the number: it lies from 2^Exponent up to, not including, 2^(Exponent + 1); not for zero.</summary>
    internal long Exponent => (BlockBits * Block) + Math.ILogB(High);

    /// <summary>The number high + low, where |low| is at most half a unit in the last place of high.</summary>
    internal static ScaledDoubleDouble OfParts(double high, double low) => Normalized(high, low);

    public static implicit operator ScaledDoubleDouble(double value) => Normalized(value, 0);

    public static ScaledDoubleDouble operator +(ScaledDoubleDouble first, ScaledDoubleDouble second)
    {
        if (first.Block != second.Block)
        {
            return AddAcrossBlocks(first, second);
        }

        var (high, low) = DoubleDouble.Add(first.High, first.Low, second.High, second.Low);
        return new(high, low, first.Block);
    }

    public static ScaledDoubleDouble operator *(ScaledDoubleDouble first, ScaledDoubleDouble second)
    {
        var (high, low) = DoubleDouble.Multiply(first.High, first.Low, second.High, second.Low);
        return new(high, low, first.Block + second.Block);
    }

    public static ScaledDoubleDouble operator /(ScaledDoubleDouble first, ScaledDoubleDouble second)
    {
        var (high, low) = DoubleDouble.Divide(first.High, first.Low, second.High, second.Low);
        return new(high, low, first.Block - second.Block);
    }

    /// <summary>The number as high + low, where high is from 2⁻⁷⁶⁸ up to 2²⁵⁶ or zero; what low loses there is less than 2⁻³⁰⁰ of it.</summary>
    internal bool TryGetParts(out double high, out double low)
    {
        var scale = Block == 0 ? 1 : BlockDown;
        (high, low) = (High * scale, Low * scale);
        return Block is 0 or -1;
    }

    /// <summary>
    /// The number times a power of two as the nearest double, where that is normal; outside the range subnormal, zero or infinite.
    /// </summary>
    internal double ToDouble(long scale = 0) => IsZero ? 0 : Math.ScaleB(High, (int)Math.Clamp((BlockBits * Block) + scale, -4000, 4000));

    /// <summary>
    /// The first minus the second number, or zero where that would be negative; off by at most <see cref="OperationError"/> of their sum.
    /// </summary>
    internal static ScaledDoubleDouble Difference(ScaledDoubleDouble first, ScaledDoubleDouble second)
    {
        if (second.IsZero || first.Block > second.Block + 1)
        {
            return first;
        }

        if (first.IsZero || first.Block < second.Block)
        {
            return default;
        }

        var scale = first.Block == second.Block ? 1 : BlockDown;
        var (high, low) = DoubleDouble.Add(first.High, first.Low, -second.High * scale, -second.Low * scale);
        return high > 0 ? Shifted(Normalized(high, low), first.Block) : default;
    }

    /// <summary>The square root as a double, off by at most 3/2 u of itself.</summary>
    internal double SquareRoot() => IsZero ? 0 : Math.ScaleB(Math.Sqrt(High), (int)Math.Clamp(BlockBits / 2 * Block, -4000, 4000));

    private static ScaledDoubleDouble Shifted(ScaledDoubleDouble number, long blocks) => new(number.High, number.Low, number.Block + blocks);

    private static ScaledDoubleDouble AddAcrossBlocks(ScaledDoubleDouble first, ScaledDoubleDouble second)
    {
        if (first.IsZero || second.IsZero)
        {
            return first.IsZero ? second : first;
        }

        var (large, small) = first.Block > second.Block ? (first, second) : (second, first);
        if (large.Block - small.Block > 1)
        {
            return large;
        }

        var (high, low) = DoubleDouble.Add(large.High, large.Low, small.High * BlockDown, small.Low * BlockDown);
        return new(high, low, large.Block);
    }

    /// <summary>Brings any double into a block; one step reaches 2^±768 and two reach every double.</summary>
    private static ScaledDoubleDouble Normalized(double high, double low)
    {
        var once = new ScaledDoubleDouble(high, low, 0);
        return new(once.High, once.Low, once.Block);
    }
}
