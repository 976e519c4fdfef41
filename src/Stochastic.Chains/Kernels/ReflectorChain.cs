using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// A run of small reflectors, each on three neighboring rows and one row below the one before, as a bulge leaves them behind when it
/// is chased down a Hessenberg matrix; the last may be on two rows only. Kept together so that a table is read and written once for
/// all of them: sixteen columns side by side, three rows of them in registers.
/// </summary>
internal sealed class ReflectorChain(int capacity)
{
    private const int Lanes = 16;

    private readonly Factors[] _reflectors = new Factors[capacity];
    private readonly double[] _panel = new double[(capacity + 2) * Lanes];
    private int _count;
    private int _firstRow;
    private bool _endsInPair;

    private int RowCount => _count + (_endsInPair ? 1 : 2);

    /// <summary>Empties the chain; its next reflector starts at this row.</summary>
    internal void Restart(int firstRow)
    {
        _firstRow = firstRow;
        _count = 0;
        _endsInPair = false;
    }

    /// <summary>Adds I − β v vᵀ with v = (1, second, third).</summary>
    internal void Add(double beta, double second, double third) =>
        _reflectors[_count++] = new Factors(beta, beta * second, beta * third, -second, -third);

    /// <summary>Adds I − β v vᵀ with v = (1, second); nothing can follow.</summary>
    internal void AddPair(double beta, double second)
    {
        Add(beta, second, 0);
        _endsInPair = true;
    }

    /// <summary>Multiplies from the left: the rows of the chain, in so many columns from the given one on.</summary>
    internal void ApplyToRows(Span<double> table, int stride, int column, int width)
    {
        if (_count == 0 || width <= 0)
        {
            return;
        }

        var rows = table.Slice((_firstRow * stride) + column, ((RowCount - 1) * stride) + width);
        var done = 0;
        for (; done + Lanes <= width; done += Lanes)
        {
            Reflect(rows[done..], stride);
        }

        if (done < width)
        {
            ReflectRest(rows[done..], stride, width - done);
        }
    }

    /// <summary>Multiplies from the right: the columns of the chain, in the rows from 0 up to the given one.</summary>
    internal void ApplyToColumns(Span<double> table, int stride, int rows)
    {
        if (_count == 0)
        {
            return;
        }

        var columns = RowCount;
        for (var done = 0; done < rows; done += Lanes)
        {
            var height = Math.Min(Lanes, rows - done);
            for (var lane = 0; lane < height; lane++)
            {
                var row = table.Slice(((done + lane) * stride) + _firstRow, columns);
                for (var column = 0; column < row.Length; column++)
                {
                    _panel[(column * Lanes) + lane] = row[column];
                }
            }

            Reflect(_panel, Lanes);
            for (var lane = 0; lane < height; lane++)
            {
                var row = table.Slice(((done + lane) * stride) + _firstRow, columns);
                for (var column = 0; column < row.Length; column++)
                {
                    row[column] = _panel[(column * Lanes) + lane];
                }
            }
        }
    }

    private void ReflectRest(Span<double> rows, int stride, int width)
    {
        for (var row = 0; row < RowCount; row++)
        {
            rows.Slice(row * stride, width).CopyTo(_panel.AsSpan(row * Lanes, Lanes));
        }

        Reflect(_panel, Lanes);
        for (var row = 0; row < RowCount; row++)
        {
            _panel.AsSpan(row * Lanes, width).CopyTo(rows.Slice(row * stride, width));
        }
    }

    private void Reflect(Span<double> rows, int stride)
    {
        // Checked once here; the loop below then needs no check of its own.
        ref var row = ref MemoryMarshal.GetReference(rows[..(((RowCount - 1) * stride) + Lanes)]);
        var (a0, a1, a2, a3) = Load(ref row);
        var (b0, b1, b2, b3) = Load(ref Unsafe.Add(ref row, stride));
        var triples = _reflectors.AsSpan(0, _endsInPair ? _count - 1 : _count);
        foreach (ref readonly var reflector in triples)
        {
            var (c0, c1, c2, c3) = Load(ref Unsafe.Add(ref row, 2 * stride));
            var beta = Vector256.Create(reflector.Beta);
            var betaSecond = Vector256.Create(reflector.BetaSecond);
            var betaThird = Vector256.Create(reflector.BetaThird);
            var w0 = Vector256.MultiplyAddEstimate(betaSecond, b0, Vector256.MultiplyAddEstimate(beta, a0, betaThird * c0));
            var w1 = Vector256.MultiplyAddEstimate(betaSecond, b1, Vector256.MultiplyAddEstimate(beta, a1, betaThird * c1));
            var w2 = Vector256.MultiplyAddEstimate(betaSecond, b2, Vector256.MultiplyAddEstimate(beta, a2, betaThird * c2));
            var w3 = Vector256.MultiplyAddEstimate(betaSecond, b3, Vector256.MultiplyAddEstimate(beta, a3, betaThird * c3));
            Store(ref row, a0 - w0, a1 - w1, a2 - w2, a3 - w3);
            var second = Vector256.Create(reflector.MinusSecond);
            a0 = Vector256.MultiplyAddEstimate(second, w0, b0);
            a1 = Vector256.MultiplyAddEstimate(second, w1, b1);
            a2 = Vector256.MultiplyAddEstimate(second, w2, b2);
            a3 = Vector256.MultiplyAddEstimate(second, w3, b3);
            var third = Vector256.Create(reflector.MinusThird);
            b0 = Vector256.MultiplyAddEstimate(third, w0, c0);
            b1 = Vector256.MultiplyAddEstimate(third, w1, c1);
            b2 = Vector256.MultiplyAddEstimate(third, w2, c2);
            b3 = Vector256.MultiplyAddEstimate(third, w3, c3);
            row = ref Unsafe.Add(ref row, stride);
        }

        if (_endsInPair)
        {
            ref readonly var reflector = ref _reflectors[_count - 1];
            var beta = Vector256.Create(reflector.Beta);
            var betaSecond = Vector256.Create(reflector.BetaSecond);
            var second = Vector256.Create(reflector.MinusSecond);
            var w0 = Vector256.MultiplyAddEstimate(betaSecond, b0, beta * a0);
            var w1 = Vector256.MultiplyAddEstimate(betaSecond, b1, beta * a1);
            var w2 = Vector256.MultiplyAddEstimate(betaSecond, b2, beta * a2);
            var w3 = Vector256.MultiplyAddEstimate(betaSecond, b3, beta * a3);
            (a0, a1, a2, a3) = (a0 - w0, a1 - w1, a2 - w2, a3 - w3);
            b0 = Vector256.MultiplyAddEstimate(second, w0, b0);
            b1 = Vector256.MultiplyAddEstimate(second, w1, b1);
            b2 = Vector256.MultiplyAddEstimate(second, w2, b2);
            b3 = Vector256.MultiplyAddEstimate(second, w3, b3);
        }

        Store(ref row, a0, a1, a2, a3);
        Store(ref Unsafe.Add(ref row, stride), b0, b1, b2, b3);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static (Vector256<double> First, Vector256<double> Second, Vector256<double> Third, Vector256<double> Fourth) Load(ref double row) =>
        (Vector256.LoadUnsafe(ref row), Vector256.LoadUnsafe(ref row, 4), Vector256.LoadUnsafe(ref row, 8), Vector256.LoadUnsafe(ref row, 12));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Store(ref double row, Vector256<double> first, Vector256<double> second, Vector256<double> third, Vector256<double> fourth)
    {
        first.StoreUnsafe(ref row);
        second.StoreUnsafe(ref row, 4);
        third.StoreUnsafe(ref row, 8);
        fourth.StoreUnsafe(ref row, 12);
    }

    private readonly record struct Factors(double Beta, double BetaSecond, double BetaThird, double MinusSecond, double MinusThird);
}
