namespace Stochastic.Chains.Kernels;

/// <summary>
/// A growing list of (row, column, value) entries, kept in blocks so that growing never copies: 16 bytes an entry, freed block by
/// block while the compressed rows (12 bytes an entry) are filled.
/// </summary>
internal sealed class TripletList
{
    private const int FirstLength = 1 << 8;
    private const int LargestLength = 1 << 16;

    private readonly List<Block> _blocks = [];
    private int _inLast;

    internal long Count { get; private set; }

    internal void Add(int row, int column, double value)
    {
        if (_blocks.Count == 0 || _inLast == _blocks[^1].Length)
        {
            var length = _blocks.Count == 0 ? FirstLength : Math.Min(2 * _blocks[^1].Length, LargestLength);
            _blocks.Add(new Block(new int[length], new int[length], new double[length]));
            _inLast = 0;
        }

        Count++;
        var block = _blocks[^1];
        block.Rows[_inLast] = row;
        block.Columns[_inLast] = column;
        block.Values[_inLast] = value;
        _inLast++;
    }

    /// <summary>Moves all entries into compressed rows with ascending columns; entries of one cell stay side by side. Empties the list.</summary>
    /// <exception cref="OverflowException">More than 2³¹ − 1 entries.</exception>
    internal CompressedRows ToCompressedRows(int rowCount)
    {
        var total = checked((int)Count);
        var starts = CountRows(rowCount);
        var next = starts.AsSpan(0, rowCount).ToArray();
        var columns = new int[total];
        var values = new double[total];
        for (var b = 0; b < _blocks.Count; b++)
        {
            var block = _blocks[b];
            var length = LengthOf(b);
            _blocks[b] = default; // free to be collected once its entries have moved
            for (var k = 0; k < length; k++)
            {
                var position = next[block.Rows[k]]++;
                columns[position] = block.Columns[k];
                values[position] = block.Values[k];
            }
        }

        _blocks.Clear();
        Count = 0;
        var rows = new CompressedRows(starts, columns, values);
        for (var row = 0; row < rowCount; row++)
        {
            var rowColumns = rows.RowColumns(row);
            if (!IsAscending(rowColumns))
            {
                rowColumns.Sort(rows.RowValues(row));
            }
        }

        return rows;
    }

    private static bool IsAscending(ReadOnlySpan<int> columns)
    {
        for (var k = 1; k < columns.Length; k++)
        {
            if (columns[k - 1] > columns[k])
            {
                return false;
            }
        }

        return true;
    }

    private int[] CountRows(int rowCount)
    {
        var starts = new int[rowCount + 1];
        for (var b = 0; b < _blocks.Count; b++)
        {
            foreach (var row in _blocks[b].Rows.AsSpan(0, LengthOf(b)))
            {
                starts[row + 1]++;
            }
        }

        for (var row = 0; row < rowCount; row++)
        {
            starts[row + 1] += starts[row];
        }

        return starts;
    }

    private int LengthOf(int block) => block == _blocks.Count - 1 ? _inLast : _blocks[block].Length;

    private readonly record struct Block(int[] Rows, int[] Columns, double[] Values)
    {
        internal int Length => Rows.Length;
    }
}
