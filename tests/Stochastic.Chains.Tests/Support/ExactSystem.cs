using System.Numerics;

namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// The matrix "outflow minus moves" of some states of a chain, every row multiplied by its own integer scale so that all entries are
/// integers: M = S (D - A). Every state must reach a state outside the set, so that M is a non-singular M-matrix; then its determinant and
/// all cofactors are non-negative integers (all-minors matrix tree theorem: Chaiken, SIAM J. Alg. Disc. Meth. 3 (1982) 319-329, from
/// memory) and the determinant is at most the product of the diagonal.
/// </summary>
internal sealed class ExactSystem
{
    private readonly ExactChain _chain;
    private readonly int[] _position;
    private readonly int[][] _lowerColumns;
    private readonly int[][] _upperColumns;

    public ExactSystem(ExactChain chain, IReadOnlyList<int> states)
    {
        _chain = chain;
        States = [.. states];
        _position = new int[chain.StateCount];
        Array.Fill(_position, -1);
        for (var i = 0; i < States.Length; i++)
        {
            _position[States[i]] = i;
        }

        _lowerColumns = new int[States.Length][];
        _upperColumns = new int[States.Length][];
        FindFillIn();
        (DeterminantBits, StepBits) = Sizes(chain, States);
    }

    public int[] States { get; }

    /// <summary>The determinant is below 2^this.</summary>
    public long DeterminantBits { get; }

    /// <summary>Determinant times any mean number of steps out of the set, and the determinant itself, are below 2^this.</summary>
    public long StepBits { get; }

    public int PositionOf(int state) => _position[state];

    /// <summary>The two size bounds, from the diagonal alone: a cofactor is at most the product of the other diagonal entries.</summary>
    public static (long Determinant, long Step) Sizes(ExactChain chain, IEnumerable<int> states)
    {
        var (diagonal, steps) = (BigInteger.One, BigInteger.One);
        foreach (var row in states.Select(chain.Row))
        {
            diagonal *= row.Outflow;
            steps += (row.Scale / row.Outflow) + 1;
        }

        return ((long)diagonal.GetBitLength(), (long)(diagonal * steps).GetBitLength());
    }

    public ResidueFactors Factor(PrimeField field)
    {
        var count = States.Length;
        var lower = new ulong[count][];
        var upper = new ulong[count][];
        var inversePivots = new ulong[count];
        var determinant = field.One;
        var work = new ulong[count];
        for (var i = 0; i < count; i++)
        {
            var outflow = 0UL;
            foreach (var move in _chain.Row(States[i]).Moves)
            {
                var amount = move.Amount.In(field);
                outflow = field.Add(outflow, amount);
                if (_position[move.To] >= 0)
                {
                    work[_position[move.To]] = field.Subtract(0, amount);
                }
            }

            work[i] = outflow;
            lower[i] = EliminateRow(field, i, work, upper, inversePivots);
            determinant = field.Multiply(determinant, work[i]);
            inversePivots[i] = field.Inverse(work[i]);
            work[i] = 0;
            upper[i] = Gather(work, _upperColumns[i]);
        }

        return new ResidueFactors(field, determinant, inversePivots, _lowerColumns, lower, _upperColumns, upper);
    }

    private static ulong[] Gather(ulong[] work, int[] columns)
    {
        var values = new ulong[columns.Length];
        for (var entry = 0; entry < columns.Length; entry++)
        {
            values[entry] = work[columns[entry]];
            work[columns[entry]] = 0;
        }

        return values;
    }

    private ulong[] EliminateRow(PrimeField field, int row, ulong[] work, ulong[][] upper, ulong[] inversePivots)
    {
        foreach (var pivot in _lowerColumns[row])
        {
            var factor = field.Multiply(work[pivot], inversePivots[pivot]);
            work[pivot] = factor;
            field.SubtractMultiple(factor, upper[pivot], _upperColumns[pivot], work);
        }

        return Gather(work, _lowerColumns[row]);
    }

    /// <summary>Which entries elimination in the given order can touch; the same for every prime.</summary>
    private void FindFillIn()
    {
        var marked = new bool[States.Length];
        for (var i = 0; i < States.Length; i++)
        {
            var (first, last) = (i, i);
            foreach (var move in _chain.Row(States[i]).Moves)
            {
                Mark(_position[move.To]);
            }

            for (var pivot = first; pivot < i; pivot++)
            {
                if (marked[pivot])
                {
                    Array.ForEach(_upperColumns[pivot], Mark);
                }
            }

            _lowerColumns[i] = [.. Enumerable.Range(first, i - first).Where(column => marked[column])];
            _upperColumns[i] = [.. Enumerable.Range(i + 1, last - i).Where(column => marked[column])];
            Array.Clear(marked, first, last - first + 1);

            void Mark(int column)
            {
                if (column >= 0)
                {
                    marked[column] = true;
                    (first, last) = (Math.Min(first, column), Math.Max(last, column));
                }
            }
        }
    }
}
