namespace Stochastic.Chains.Tests.Support;

/// <summary>Lower (unit diagonal) and upper triangular factors of an <see cref="ExactSystem"/> modulo one prime.</summary>
internal sealed class ResidueFactors(
    PrimeField field,
    ulong determinant,
    ulong[] inversePivots,
    int[][] lowerColumns,
    ulong[][] lower,
    int[][] upperColumns,
    ulong[][] upper)
{
    public ulong Determinant => determinant;

    /// <summary>x with M x = b.</summary>
    public ulong[] SolveRight(ulong[] rightSide)
    {
        var solution = (ulong[])rightSide.Clone();
        for (var i = 0; i < solution.Length; i++)
        {
            solution[i] = field.Subtract(solution[i], Dot(lowerColumns[i], lower[i], solution));
        }

        for (var i = solution.Length - 1; i >= 0; i--)
        {
            solution[i] = field.Multiply(field.Subtract(solution[i], Dot(upperColumns[i], upper[i], solution)), inversePivots[i]);
        }

        return solution;
    }

    /// <summary>x with x M = b.</summary>
    public ulong[] SolveLeft(ulong[] rightSide)
    {
        var solution = (ulong[])rightSide.Clone();
        for (var i = 0; i < solution.Length; i++)
        {
            solution[i] = field.Multiply(solution[i], inversePivots[i]);
            field.SubtractMultiple(solution[i], upper[i], upperColumns[i], solution);
        }

        for (var i = solution.Length - 1; i >= 0; i--)
        {
            field.SubtractMultiple(solution[i], lower[i], lowerColumns[i], solution);
        }

        return solution;
    }

    private ulong Dot(int[] columns, ulong[] values, ulong[] vector)
    {
        var sum = 0UL;
        for (var entry = 0; entry < columns.Length; entry++)
        {
            sum = field.Add(sum, field.Multiply(values[entry], vector[columns[entry]]));
        }

        return sum;
    }
}
