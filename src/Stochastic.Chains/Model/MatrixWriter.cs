using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>Writes rows in order into the storage that the density rule chooses.</summary>
internal sealed class MatrixWriter
{
    private readonly int _size;
    private readonly int _transitions;
    private readonly double[]? _dense;
    private readonly CompressedRows? _rows;

    internal MatrixWriter(int size, long transitions)
    {
        _size = size;
        _transitions = checked((int)transitions);
        if (TransitionMatrix.ChooseStorage(size, transitions) == MatrixStorage.Dense)
        {
            _dense = new double[size * size];
        }
        else
        {
            _rows = new CompressedRows(new int[size + 1], new int[_transitions], new double[_transitions]);
        }
    }

    internal void Write(int row, ReadOnlySpan<int> columns, ReadOnlySpan<double> values)
    {
        if (_rows is not null)
        {
            var start = _rows.Starts[row];
            _rows.Starts[row + 1] = start + columns.Length;
            columns.CopyTo(_rows.Columns.AsSpan(start));
            values.CopyTo(_rows.Values.AsSpan(start));
            return;
        }

        var target = _dense.AsSpan(row * _size, _size);
        for (var k = 0; k < columns.Length; k++)
        {
            target[columns[k]] = values[k];
        }
    }

    internal TransitionMatrix ToMatrix() => _rows is not null
        ? TransitionMatrix.FromCompressedRows(_rows)
        : TransitionMatrix.FromDense(_dense!, _size, _transitions);
}
