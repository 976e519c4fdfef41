using System.Numerics;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>Puts computed eigenvalues in order, and those of modulus one where the structure of the chain says they are.</summary>
internal static class SpectralUnits
{
    private const double Recognized = 1e-6;
    private const double LargestBelowOne = 1 - (1.0 / (1L << 53));

    // Moduli that agree to so many bits are taken as equal, so that rounding does not decide the order.
    private const double ModulusUnits = 1L << 36;

    /// <summary>
    /// A recurrent class of period d has each d-th root of one once as an eigenvalue, and all others are smaller (Frobenius 1912): the
    /// computed ones closest to them are set to them, and moduli that rounding lifted to one or above are taken back.
    /// </summary>
    internal static SpectralUnit[] Settle<TState>(IEnumerable<SpectralUnit> computed, ChainStructure<TState> structure)
        where TState : notnull
    {
        var units = computed.ToArray();
        var isSet = new bool[units.Length];
        foreach (var root in structure.RecurrentClasses.SelectMany(group => RootsOfOne(group.Period)))
        {
            var closest = -1;
            for (var index = 0; index < units.Length; index++)
            {
                var fits = !isSet[index] && units[index].Width == (root.Imaginary > 0 ? 2 : 1) && Complex.Abs(units[index].Eigenvalue - root) <= Recognized;
                if (fits && (closest < 0 || Complex.Abs(units[index].Eigenvalue - root) < Complex.Abs(units[closest].Eigenvalue - root)))
                {
                    closest = index;
                }
            }

            if (closest >= 0)
            {
                units[closest] = units[closest] with { Eigenvalue = root };
                isSet[closest] = true;
            }
        }

        for (var index = 0; index < units.Length; index++)
        {
            var modulus = Complex.Abs(units[index].Eigenvalue);
            if (!isSet[index] && modulus > LargestBelowOne)
            {
                units[index] = units[index] with { Eigenvalue = units[index].Eigenvalue / modulus * LargestBelowOne };
            }
        }

        return units;
    }

    /// <summary>One first, then by modulus; equal moduli by real part, largest first, then by imaginary part. Complex pairs stay together.</summary>
    internal static int[] Order(IReadOnlyList<Complex> eigenvalues) =>
    [
        .. Enumerable.Range(0, eigenvalues.Count)
            .OrderByDescending(index => eigenvalues[index] == 1)
            .ThenByDescending(index => Math.Round(Complex.Abs(eigenvalues[index]) * ModulusUnits))
            .ThenByDescending(index => eigenvalues[index].Real)
            .ThenByDescending(index => eigenvalues[index].Imaginary),
    ];

    /// <summary>The roots of one that are real or above the real axis; 1 and −1 exactly.</summary>
    private static IEnumerable<Complex> RootsOfOne(int period)
    {
        for (var k = 0; 2 * k <= period; k++)
        {
            yield return k == 0 ? 1 : 2 * k == period ? -1 : new Complex(double.CosPi(2.0 * k / period), double.SinPi(2.0 * k / period));
        }
    }
}
