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
    /// <param name="computed">The eigenvalues and vectors as computed.</param>
    /// <param name="structure">The structure of the chain.</param>
    /// <param name="known">
    /// The direction of the vector for the eigenvalue one of a single recurrent class. Where others come within rounding of one, the one with
    /// the vector closest to it is taken, and is given it.
    /// </param>
    internal static SpectralUnit[] Settle<TState>(IEnumerable<SpectralUnit> computed, ChainStructure<TState> structure, Complex[] known)
        where TState : notnull
    {
        var units = computed.ToArray();
        var isSet = new bool[units.Length];
        if (structure.RecurrentClasses.Count == 1)
        {
            var index = Enumerable.Range(0, units.Length).Where(unit => IsNear(units[unit], 1)).DefaultIfEmpty(-1)
                .MaxBy(unit => unit < 0 ? 0 : Alignment(units[unit].Vector, known));
            if (index >= 0)
            {
                units[index] = new SpectralUnit(1, known);
                isSet[index] = true;
            }
        }

        SetRoots(units, isSet, structure);
        return [.. units.Select((unit, index) => isSet[index] ? unit : unit with { Eigenvalue = BelowOne(unit.Eigenvalue) })];
    }

    private static void SetRoots<TState>(SpectralUnit[] units, bool[] isSet, ChainStructure<TState> structure)
        where TState : notnull
    {
        foreach (var root in structure.RecurrentClasses.SelectMany(group => RootsOfOne(group.Period)).Skip(isSet.Contains(true) ? 1 : 0))
        {
            var closest = -1;
            for (var index = 0; index < units.Length; index++)
            {
                if (!isSet[index] && IsNear(units[index], root) && (closest < 0 || Complex.Abs(units[index].Eigenvalue - root) < Complex.Abs(units[closest].Eigenvalue - root)))
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
    }

    /// <summary>One first, then by modulus; equal moduli by real part, largest first, then by imaginary part. Complex pairs stay together.</summary>
    internal static SpectralUnit[] Order(SpectralUnit[] units) =>
    [
        .. units.OrderByDescending(unit => unit.Eigenvalue == 1)
            .ThenByDescending(unit => Math.Round(Complex.Abs(unit.Eigenvalue) * ModulusUnits))
            .ThenByDescending(unit => unit.Eigenvalue.Real)
            .ThenByDescending(unit => unit.Eigenvalue.Imaginary),
    ];

    private static bool IsNear(SpectralUnit unit, Complex root) =>
        unit.Width == (root.Imaginary > 0 ? 2 : 1) && Complex.Abs(unit.Eigenvalue - root) <= Recognized;

    private static double Alignment(Complex[] vector, Complex[] known) =>
        Complex.Abs(vector.Zip(known, (first, second) => first * second).Aggregate((sum, term) => sum + term))
        / Math.Sqrt(vector.Sum(entry => Complex.Abs(entry) * Complex.Abs(entry)));

    private static Complex BelowOne(Complex eigenvalue) => Complex.Abs(eigenvalue) is var modulus && modulus > LargestBelowOne
        ? eigenvalue / modulus * LargestBelowOne
        : eigenvalue;

    /// <summary>The roots of one that are real or above the real axis; 1 and −1 exactly.</summary>
    private static IEnumerable<Complex> RootsOfOne(int period)
    {
        for (var k = 0; 2 * k <= period; k++)
        {
            yield return k == 0 ? 1 : 2 * k == period ? -1 : new Complex(double.CosPi(2.0 * k / period), double.SinPi(2.0 * k / period));
        }
    }
}
