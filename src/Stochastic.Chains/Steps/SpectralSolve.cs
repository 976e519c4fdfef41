using System.Numerics;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>Computes the spectral factors of a chain: through the symmetric form where the chain is reversible, else through the Schur form.</summary>
internal static class SpectralSolve
{
    /// <summary>
    /// Flows that balance this closely count as balanced; what is missed shows in the residuals. Where shares differ by more than the ratio,
    /// orthogonal vectors are of no use: small entries that rounding takes from them are large ones of right or left vectors.
    /// </summary>
    private const double BalanceTolerance = 1e-14;
    private const double CloseToOne = 1e-6;
    private const double SmallestRatio = 1e-12;

    internal static SpectralOutcome Run<TState>(Chain<TState> chain, double[] step, CancellationToken cancellation)
        where TState : notnull
    {
        var roots = RootsOfShares(chain);
        return roots is null ? General(chain, step, cancellation) : Reversible(chain, step, roots, cancellation);
    }

    /// <summary>The square roots of the long-run shares inside each class, up to a factor; null where the symmetric form does not exist or not fit.</summary>
    private static double[]? RootsOfShares<TState>(Chain<TState> chain)
        where TState : notnull
    {
        var structure = chain.Structure();
        if (structure.TransientStates.Count > 0 || !chain.Reversibility(BalanceTolerance).IsReversible)
        {
            return null;
        }

        var weights = new ScaledDouble[chain.StateCount];
        var roots = new double[chain.StateCount];
        foreach (var group in structure.RecurrentClasses)
        {
            Reversibility<TState>.SpreadWeights(chain.Matrix, group.Members[0], weights);
            var largest = group.Members[0];
            foreach (var member in group.Members)
            {
                largest = (weights[member] / weights[largest]).ToDouble() > 1 ? member : largest;
            }

            foreach (var member in group.Members)
            {
                var ratio = (weights[member] / weights[largest]).ToDouble();
                if (ratio < SmallestRatio)
                {
                    return null;
                }

                roots[member] = Math.Sqrt(ratio);
            }
        }

        return roots;
    }

    private static SpectralOutcome General<TState>(Chain<TState> chain, double[] step, CancellationToken cancellation)
        where TState : notnull
    {
        var form = RealSchurForm.Of(step, chain.StateCount, balance: false, cancellation);
        if (!form.HasConverged)
        {
            return new SpectralOutcome(null, form.Sweeps, IsSymmetric: false);
        }

        var eigenvalues = form.Eigenvalues();
        var vectors = SchurEigenvectors.Right(form, cancellation);
        var units = eigenvalues.Zip(vectors, (value, vector) => new SpectralUnit(value, vector)).Where(unit => unit.Eigenvalue.Imaginary >= 0);
        var ordered = SpectralUnits.Order(SpectralUnits.Settle(units.Select(unit => unit.Scaled()), chain.Structure(), Ones(chain.StateCount)));
        cancellation.ThrowIfCancellationRequested();
        return new SpectralOutcome(SpectralFactors.Of(ordered), form.Sweeps, IsSymmetric: false);
    }

    private static SpectralOutcome Reversible<TState>(Chain<TState> chain, double[] step, double[] roots, CancellationToken cancellation)
        where TState : notnull
    {
        var order = chain.StateCount;
        var symmetric = new double[step.Length];
        for (var row = 0; row < order; row++)
        {
            for (var column = 0; column < order; column++)
            {
                symmetric[(row * order) + column] = Math.Sqrt(step[(row * order) + column]) * Math.Sqrt(step[(column * order) + row]);
            }
        }

        var form = SymmetricForm.Of(symmetric, order, cancellation);
        if (!form.HasConverged)
        {
            return new SpectralOutcome(null, form.Sweeps, IsSymmetric: true);
        }

        var units = new SpectralUnit[order];
        for (var index = 0; index < order; index++)
        {
            var row = form.TransposedBasis.AsSpan(index * order, order).ToArray();
            units[index] = new SpectralUnit(form.Eigenvalues[index], Array.ConvertAll(row, entry => new Complex(entry, 0)));
        }

        var length = Math.Sqrt(VectorLoops.Dot(roots, roots));
        var ordered = SpectralUnits.Order(SpectralUnits.Settle(units, chain.Structure(), Array.ConvertAll(roots, root => new Complex(root / length, 0))));
        if (!chain.Structure().IsIrreducible)
        {
            return new SpectralOutcome(SpectralFactors.Of(ordered, UndoSymmetry(ordered, roots)), form.Sweeps, IsSymmetric: true);
        }

        // The pair of the eigenvalue one is known: ones and the long-run shares.
        MakeOrthogonalToFirst(ordered);
        var leftRows = UndoSymmetry(ordered, roots);
        ordered[0] = ordered[0] with { Vector = Ones(order) };
        leftRows[0] = Array.ConvertAll(roots, root => root * root / (length * length));
        return new SpectralOutcome(SpectralFactors.Of(ordered, leftRows), form.Sweeps, IsSymmetric: true);
    }

    private static Complex[] Ones(int count) => [.. Enumerable.Repeat(Complex.One, count)];

    /// <summary>
    /// Where eigenvalues come close to one, their vectors may be mixed with the known one: it is taken out, and what is left of them is made
    /// orthogonal again (modified Gram and Schmidt).
    /// </summary>
    private static void MakeOrthogonalToFirst(SpectralUnit[] units)
    {
        var cluster = new List<double[]> { Array.ConvertAll(units[0].Vector, entry => entry.Real) };
        for (var index = 1; index < units.Length; index++)
        {
            var vector = Array.ConvertAll(units[index].Vector, entry => entry.Real);
            foreach (var earlier in cluster)
            {
                VectorLoops.AddScaled(-VectorLoops.Dot(vector, earlier), earlier, vector);
            }

            var length = Math.Sqrt(VectorLoops.Dot(vector, vector));
            vector = Array.ConvertAll(vector, entry => entry / length);
            units[index] = units[index] with { Vector = Array.ConvertAll(vector, entry => new Complex(entry, 0)) };
            if (units[index].Eigenvalue.Real > 1 - CloseToOne)
            {
                cluster.Add(vector);
            }
        }
    }

    /// <summary>Right vectors D^−½ q and left vectors q D^½ from orthonormal vectors q, each pair scaled by the largest entry of the right one.</summary>
    private static double[][] UndoSymmetry(SpectralUnit[] units, double[] roots)
    {
        var leftRows = new double[units.Length][];
        for (var index = 0; index < units.Length; index++)
        {
            var right = units[index].Vector.Select((entry, state) => entry.Real / roots[state]).ToArray();
            var largest = right.Aggregate((first, second) => Math.Abs(second) > Math.Abs(first) * (1 + 1e-12) ? second : first);
            leftRows[index] = [.. units[index].Vector.Select((entry, state) => entry.Real * roots[state] * largest)];
            units[index] = units[index] with { Vector = Array.ConvertAll(right, entry => new Complex(entry / largest, 0)) };
        }

        return leftRows;
    }
}

/// <summary>The factors, or null when the iteration did not converge, with the sweeps spent.</summary>
internal sealed record SpectralOutcome(SpectralFactors? Factors, int Sweeps, bool IsSymmetric);
