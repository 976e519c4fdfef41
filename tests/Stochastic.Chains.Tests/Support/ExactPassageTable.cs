namespace Stochastic.Chains.Tests.Support;

/// <summary>Mean first passage times between all pairs.</summary>
internal sealed partial class ExactChain
{
    /// <summary>
    /// [from, to]: mean steps until "to" is entered, the first step counted; the diagonal is the mean recurrence time; null is infinite.
    /// </summary>
    public Rational?[,] MeanFirstPassage() => Structure.IsIrreducible && StateCount > 1
        ? PassageTableOfIrreducible()
        : PassageTableByTarget();

    /// <summary>Sum over j of pi_j m_ij with m_jj = 0, the same from every i.</summary>
    public Rational KemenyConstant()
    {
        var stationary = Stationary();
        var table = MeanFirstPassage();
        return Rational.Sum(Enumerable.Range(1, StateCount - 1).Select(j => stationary[j] * table[0, j]!.Value));
    }

    private Rational?[,] PassageTableByTarget()
    {
        var result = new Rational?[StateCount, StateCount];
        for (var target = 0; target < StateCount; target++)
        {
            var column = HittingMean(target);
            for (var from = 0; from < StateCount; from++)
            {
                result[from, target] = from == target ? MeanRecurrence(target) : column[from];
            }
        }

        return result;
    }

    /// <summary>
    /// With G the inverse of (D - A) without the last state, zero in its row and column, and h its row sums:
    /// m_ij = h_i - h_j + (g_jj - g_ij) / pi_j (Hunter, Linear Algebra Appl. 45 (1982) 157-198, from memory). The subtractions are harmless
    /// because the arithmetic is exact.
    /// </summary>
    private Rational?[,] PassageTableOfIrreducible()
    {
        var reference = StateCount - 1;
        var system = new ExactSystem(this, [.. Enumerable.Range(0, reference)]);
        var bits = Enumerable.Range(0, StateCount).Max(StepBitsWithout);
        var numbers = ResidueNumbers.Find(bits, field => PassageNumerators(field, system, reference));
        var weights = Enumerable.Range(0, StateCount).Select(j => numbers[j] * _rows[j].Scale).ToArray();
        var total = weights.Aggregate((sum, weight) => sum + weight);
        var result = new Rational?[StateCount, StateCount];
        for (var i = 0; i < StateCount; i++)
        {
            for (var j = 0; j < StateCount; j++)
            {
                result[i, j] = i == j ? new(total, weights[j]) : new Rational(numbers[StateCount * (i + 1) + j], numbers[j]);
            }
        }

        return result;
    }

    private long StepBitsWithout(int target) =>
        ExactSystem.Sizes(this, Enumerable.Range(0, StateCount).Where(state => state != target)).Step;

    /// <summary>The minors y_j, then the table of m_ij y_j row by row (anything on the diagonal).</summary>
    private ulong[] PassageNumerators(PrimeField field, ExactSystem system, int reference)
    {
        var factors = system.Factor(field);
        var minors = Minors(field, system, factors, reference);
        var scales = Array.ConvertAll(_rows, row => new ScaledInteger(row.Scale).In(field));
        var total = 0UL;
        for (var j = 0; j < StateCount; j++)
        {
            total = field.Add(total, field.Multiply(minors[j], scales[j]));
        }

        var means = factors.SolveRight(scales[..reference]);
        var result = new ulong[StateCount * (StateCount + 1)];
        minors.CopyTo(result, 0);
        for (var j = 0; j < StateCount; j++)
        {
            var column = new ulong[StateCount];
            if (j != reference)
            {
                // Column j of the inverse of S (D - A); times s_j it is that of G, and s_j cancels against 1/pi_j = total / (y_j s_j).
                var unit = new ulong[reference];
                unit[j] = field.One;
                factors.SolveRight(unit).CopyTo(column, 0);
            }

            var meanOfTarget = j == reference ? 0 : means[j];
            for (var i = 0; i < StateCount; i++)
            {
                var fromReference = field.Multiply(field.Subtract(i == reference ? 0 : means[i], meanOfTarget), minors[j]);
                var between = field.Multiply(field.Subtract(column[j], column[i]), total);
                result[StateCount * (i + 1) + j] = i == j ? 0 : field.Add(fromReference, between);
            }
        }

        return result;
    }
}
