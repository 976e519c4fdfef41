using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>
/// A power of the step matrix by few multiplications, most of them squarings. Rows are divided by their sums after each product: without
/// it, what the sums miss of one would double with each squaring.
/// </summary>
internal sealed class StepPower : IDisposable
{
    private const int RowsPerPiece = 64;

    private readonly int _size;
    private readonly CyclicGroups? _groups;
    private readonly InstructionSet _instructions;
    private readonly WorkSharing _sharing;
    private readonly List<WorkTable> _rented = [];
    private readonly Stack<MatrixView> _unused = new();
    private readonly PowerTable[] _powers;
    private readonly SquaringChain _chain;

    /// <summary>Prepares a power; without groups no errors are followed.</summary>
    internal StepPower(StepMatrix matrix, int size, long steps, CyclicGroups? groups, InstructionSet instructions, SolveOptions options)
    {
        _chain = SquaringChain.For(steps);
        options.RequireMemory(size, Bytes(size, _chain.LargestHeld()));
        _size = size;
        _groups = groups;
        _instructions = instructions;
        _sharing = new WorkSharing(options.Parallelism, options.CancellationToken);
        _powers = new PowerTable[_chain.Products.Count + 1];
        var table = EmptyTable();
        matrix.CopyTo(table);
        _powers[0] = new PowerTable(table, groups is null ? [] : LeastOfRows(table), groups is null ? null : PowerErrors.OfStep(size, matrix.StayRoundings + 4));
    }

    /// <summary>The errors of the power; null when they are not followed.</summary>
    internal PowerErrors? Errors => _powers[^1].Errors;

    /// <summary>The number of matrix multiplications.</summary>
    internal int Products => _chain.Products.Count;

    /// <summary>Computes the power and copies it into a row-major array.</summary>
    internal double[] Raise(Action<double>? report)
    {
        for (var product = 0; product < _chain.Products.Count; product++)
        {
            var (left, right) = _chain.Products[product];
            _powers[product + 1] = Multiply(_powers[left], _powers[right]);
            report?.Invoke((product + 1.0) / _chain.Products.Count);
            Release(product, left);
            if (right != left)
            {
                Release(product, right);
            }
        }

        var values = new double[_size * _size];
        var result = _powers[^1].Table;
        for (var row = 0; row < _size; row++)
        {
            result.Row(row, 0, _size).CopyTo(values.AsSpan(row * _size));
        }

        return values;
    }

    /// <summary>Gives the tables back to the pool.</summary>
    public void Dispose()
    {
        foreach (var table in _rented)
        {
            table.Dispose();
        }
    }

    private static long Bytes(int size, int tables) =>
        sizeof(double) * (((long)size * size) + ((long)tables * size * WorkTable.PreferredStride(size)));

    private void Release(int product, int factor)
    {
        if (_chain.LastUses[factor] == product)
        {
            _unused.Push(_powers[factor].Table);
        }
    }

    private PowerTable Multiply(PowerTable left, PowerTable right)
    {
        var (factor, multiplier, target) = (left.Table, right.Table, EmptyTable());
        MatrixMultiply.Add(factor, multiplier, target, _size, _size, _size, _instructions, _sharing);
        var least = new double[_groups is null ? 0 : _size];
        var corrections = new double[_size];
        _sharing.Run((_size + RowsPerPiece - 1) / RowsPerPiece, piece =>
        {
            for (var row = piece * RowsPerPiece; row < Math.Min(_size, (piece + 1) * RowsPerPiece); row++)
            {
                var entries = target.Row(row, 0, _size);
                corrections[row] = Math.Abs(SquaringRows.Normalize(entries) - 1);
                if (least.Length > 0)
                {
                    least[row] = NormalRange.SmallestNonzero(entries);
                }
            }
        });
        if (_groups is null)
        {
            return new PowerTable(target, [], null);
        }

        var keepsRange = KeepsRange(left, right, least, target);
        return new PowerTable(target, least, PowerErrors.OfProduct(left.Errors!, right.Errors!, factor, multiplier, corrections.Max(), keepsRange, _groups));
    }

    private MatrixView EmptyTable()
    {
        if (!_unused.TryPop(out var table))
        {
            _rented.Add(WorkTable.Rent(_size, _size));
            table = _rented[^1].View;
        }

        table.Row(0, 0, _size * table.Stride).Clear();
        return table;
    }

    /// <summary>
    /// Whether the product has lost nothing below the normal range of doubles: either no product of two entries fell below it, or every
    /// entry of the result is so large that what fell below does not count.
    /// </summary>
    private bool KeepsRange(PowerTable left, PowerTable right, double[] least, MatrixView product)
    {
        const double large = 1e-280;
        return NormalRange.KeepsProduct(NormalRange.Least(left.Least), NormalRange.Least(right.Least))
            || (NormalRange.Least(least) >= large && HasNoZero(product))
            || NormalRange.KeepsProducts(LeastOfColumns(left.Table), right.Least);
    }

    private bool HasNoZero(MatrixView table)
    {
        for (var row = 0; row < _size; row++)
        {
            if (table.Row(row, 0, _size).Contains(0.0))
            {
                return false;
            }
        }

        return true;
    }

    private double[] LeastOfRows(MatrixView table) =>
        [.. Enumerable.Range(0, _size).Select(row => NormalRange.SmallestNonzero(table.Row(row, 0, _size)))];

    private double[] LeastOfColumns(MatrixView table)
    {
        var least = new double[_size];
        Array.Fill(least, double.PositiveInfinity);
        for (var row = 0; row < _size; row++)
        {
            var entries = table.Row(row, 0, _size);
            for (var column = 0; column < _size; column++)
            {
                least[column] = entries[column] == 0 ? least[column] : Math.Min(least[column], entries[column]);
            }
        }

        return least;
    }

    /// <summary>A power that has been made: its table, which is used again after its last use, the least positive entry of each row, and its errors.</summary>
    private readonly record struct PowerTable(MatrixView Table, double[] Least, PowerErrors? Errors);
}
