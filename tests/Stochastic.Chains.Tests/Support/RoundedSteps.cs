namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// n-step probabilities for many steps, where exact fractions grow too long: repeated squaring in <see cref="RoundedNumber"/>. Only sums
/// and products of non-negative numbers, so every entry is correct within <see cref="RelativeErrorBound"/>, tiny entries included (those
/// below about 2^-4700 come back as zero).
/// </summary>
internal static class RoundedSteps
{
    /// <summary>
    /// A term of an entry is rounded once for each of its steps and at most n times in each of the fewer than "steps" products on its way.
    /// </summary>
    public static double RelativeErrorBound(int stateCount, long steps) =>
        Math.ScaleB((double)steps * (stateCount + 1), 1 - RoundedNumber.Bits);

    public static Rational[,] NStepMatrix(ExactChain chain, long steps)
    {
        var result = Identity(chain.StateCount);
        foreach (var power in PowersWithin(chain, steps))
        {
            result = Multiply(result, power);
        }

        var exact = new Rational[chain.StateCount, chain.StateCount];
        for (var i = 0; i < chain.StateCount; i++)
        {
            for (var j = 0; j < chain.StateCount; j++)
            {
                exact[i, j] = result[i][j].ToRational();
            }
        }

        return exact;
    }

    public static Rational[] NStepRow(ExactChain chain, int start, long steps)
    {
        RoundedNumber[][] row = [Identity(chain.StateCount)[start]];
        foreach (var power in PowersWithin(chain, steps))
        {
            row = Multiply(row, power);
        }

        return Array.ConvertAll(row[0], value => value.ToRational());
    }

    /// <summary>The powers P^(2^k) whose bit is set in the number of steps.</summary>
    private static IEnumerable<RoundedNumber[][]> PowersWithin(ExactChain chain, long steps)
    {
        var power = OneStep(chain);
        for (var remaining = steps; remaining > 0; remaining >>= 1)
        {
            if ((remaining & 1) != 0)
            {
                yield return power;
            }

            if (remaining > 1)
            {
                power = Multiply(power, power);
            }
        }
    }

    public static RoundedNumber[][] OneStep(ExactChain chain)
    {
        var matrix = new RoundedNumber[chain.StateCount][];
        for (var state = 0; state < chain.StateCount; state++)
        {
            matrix[state] = new RoundedNumber[chain.StateCount];
            var (moves, sum) = chain.StepRow(state);
            foreach (var (to, weight) in moves)
            {
                matrix[state][to] = RoundedNumber.Quotient(weight, sum);
            }
        }

        return matrix;
    }

    public static RoundedNumber[][] Identity(int count)
    {
        var matrix = new RoundedNumber[count][];
        for (var i = 0; i < count; i++)
        {
            matrix[i] = new RoundedNumber[count];
            matrix[i][i] = RoundedNumber.Quotient(1, 1);
        }

        return matrix;
    }

    public static RoundedNumber[][] Multiply(RoundedNumber[][] left, RoundedNumber[][] right)
    {
        var product = new RoundedNumber[left.Length][];
        for (var i = 0; i < left.Length; i++)
        {
            product[i] = new RoundedNumber[right.Length];
            for (var k = 0; k < right.Length; k++)
            {
                for (var j = 0; !left[i][k].IsZero && j < right.Length; j++)
                {
                    if (!right[k][j].IsZero)
                    {
                        product[i][j] += left[i][k] * right[k][j];
                    }
                }
            }
        }

        return product;
    }
}
