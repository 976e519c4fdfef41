using System.Runtime.InteropServices;

namespace Stochastic.Chains.Estimation;

/// <summary>Counts moves between states by position: a small table for the first states, a dictionary of packed pairs for the others.</summary>
internal sealed class MoveCounter(PathRecorder? recorder)
{
    private const int TableSize = 64;

    private readonly long[] _table = new long[TableSize * TableSize];
    private readonly Dictionary<long, long> _others = new(PairComparer.Instance);

    internal MoveCounter()
        : this(null)
    {
    }

    internal PathRecorder? Recorder => recorder;

    internal void StartPath() => recorder?.StartPath();

    internal void Add(int from, int to) => Add(from, to, 1);

    /// <exception cref="OverflowException">A count passes 2⁶³ − 1.</exception>
    internal void Add(int from, int to, long count)
    {
        recorder?.Add(from, to, count);
        if ((from | to) < TableSize)
        {
            ref var cell = ref _table[(from * TableSize) + to];
            cell = checked(cell + count);
        }
        else
        {
            ref var cell = ref CollectionsMarshal.GetValueRefOrAddDefault(_others, ((long)from << 32) | (uint)to, out _);
            cell = checked(cell + count);
        }
    }

    internal void AddAll(CountRows rows)
    {
        for (var row = 0; row < rows.RowCount; row++)
        {
            var columns = rows.Columns(row);
            var counts = rows.Counts(row);
            for (var k = 0; k < columns.Length; k++)
            {
                Add(row, columns[k], counts[k]);
            }
        }
    }

    internal CountRows ToRows(int stateCount)
    {
        var entries = ListEntries();
        entries.Sort(static (one, other) => one.Pair.CompareTo(other.Pair));
        var starts = new int[stateCount + 1];
        var columns = new int[entries.Count];
        var counts = new long[entries.Count];
        for (var k = 0; k < entries.Count; k++)
        {
            var (pair, count) = entries[k];
            starts[(int)(pair >> 32) + 1]++;
            columns[k] = (int)pair;
            counts[k] = count;
        }

        for (var row = 0; row < stateCount; row++)
        {
            starts[row + 1] += starts[row];
        }

        return new CountRows(starts, columns, counts);
    }

    private List<(long Pair, long Count)> ListEntries()
    {
        var entries = new List<(long Pair, long Count)>(_others.Count);
        for (var cell = 0; cell < _table.Length; cell++)
        {
            if (_table[cell] != 0)
            {
                entries.Add((((long)(cell / TableSize) << 32) | (uint)(cell % TableSize), _table[cell]));
            }
        }

        foreach (var (pair, count) in _others)
        {
            if (count != 0)
            {
                entries.Add((pair, count));
            }
        }

        return entries;
    }
}
