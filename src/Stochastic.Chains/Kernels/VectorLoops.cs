using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>Loops over one or two sequences in a fixed order.</summary>
internal static class VectorLoops
{
    /// <summary>The sum, gathered in four lanes: at most n/4 + 3 roundings lie between a term and the result.</summary>
    internal static double Sum(ReadOnlySpan<double> terms)
    {
        var vectors = MemoryMarshal.Cast<double, Vector256<double>>(terms);
        var lanes = Vector256<double>.Zero;
        foreach (var vector in vectors)
        {
            lanes += vector;
        }

        var sum = (lanes[0] + lanes[1]) + (lanes[2] + lanes[3]);
        foreach (var term in terms[(vectors.Length * Vector256<double>.Count)..])
        {
            sum += term;
        }

        return sum;
    }

    /// <summary>The sum of products, gathered in four lanes: at most n/4 + 4 roundings lie between a product and the result.</summary>
    internal static double Dot(ReadOnlySpan<double> left, ReadOnlySpan<double> right)
    {
        var leftVectors = MemoryMarshal.Cast<double, Vector256<double>>(left);
        var rightVectors = MemoryMarshal.Cast<double, Vector256<double>>(right)[..leftVectors.Length];
        var lanes = Vector256<double>.Zero;
        for (var index = 0; index < leftVectors.Length; index++)
        {
            lanes = Vector256.MultiplyAddEstimate(leftVectors[index], rightVectors[index], lanes);
        }

        var sum = (lanes[0] + lanes[1]) + (lanes[2] + lanes[3]);
        for (var index = leftVectors.Length * Vector256<double>.Count; index < left.Length; index++)
        {
            sum = double.MultiplyAddEstimate(left[index], right[index], sum);
        }

        return sum;
    }

    /// <summary>Adds factor · source to target, entry by entry.</summary>
    internal static void AddScaled(double factor, ReadOnlySpan<double> source, Span<double> target)
    {
        var sources = MemoryMarshal.Cast<double, Vector256<double>>(source);
        var targets = MemoryMarshal.Cast<double, Vector256<double>>(target)[..sources.Length];
        var factors = Vector256.Create(factor);
        for (var index = 0; index < sources.Length; index++)
        {
            targets[index] = Vector256.MultiplyAddEstimate(factors, sources[index], targets[index]);
        }

        for (var index = sources.Length * Vector256<double>.Count; index < source.Length; index++)
        {
            target[index] = double.MultiplyAddEstimate(factor, source[index], target[index]);
        }
    }

    /// <summary>Divides each number of source by one divisor.</summary>
    internal static void Divide(ReadOnlySpan<double> source, double divisor, Span<double> target)
    {
        var sources = MemoryMarshal.Cast<double, Vector256<double>>(source);
        var targets = MemoryMarshal.Cast<double, Vector256<double>>(target)[..sources.Length];
        var divisors = Vector256.Create(divisor);
        for (var index = 0; index < sources.Length; index++)
        {
            targets[index] = sources[index] / divisors;
        }

        for (var index = sources.Length * Vector256<double>.Count; index < source.Length; index++)
        {
            target[index] = source[index] / divisor;
        }
    }

    /// <summary>Multiplies each number of target by its own factor.</summary>
    internal static void Multiply(ReadOnlySpan<double> factors, Span<double> target)
    {
        for (var index = 0; index < target.Length; index++)
        {
            target[index] *= factors[index];
        }
    }

    /// <summary>Lowers each number of target to the one in bounds, where that is less.</summary>
    internal static void LowerTo(ReadOnlySpan<double> bounds, Span<double> target)
    {
        for (var index = 0; index < target.Length; index++)
        {
            target[index] = Math.Min(target[index], bounds[index]);
        }
    }

    /// <summary>Raises each number of target to the one in bounds, where that is more.</summary>
    internal static void RaiseTo(ReadOnlySpan<double> bounds, Span<double> target)
    {
        for (var index = 0; index < target.Length; index++)
        {
            target[index] = Math.Max(target[index], bounds[index]);
        }
    }

    /// <summary>The index of the first of the largest numbers; 0 when there is none.</summary>
    internal static int IndexOfLargest(ReadOnlySpan<double> values)
    {
        var largest = 0;
        for (var k = 1; k < values.Length; k++)
        {
            largest = values[k] > values[largest] ? k : largest;
        }

        return largest;
    }
}
