namespace Stochastic.Chains.Estimation;

/// <summary>One event of an item, its state by position; 24 bytes.</summary>
/// <param name="Ticks">The instant, in UTC ticks.</param>
/// <param name="Number">The line of the file, or the number of the event.</param>
/// <param name="State">The state's position.</param>
/// <param name="Previous">The event of the same item read before, or −1.</param>
internal readonly record struct Scan(long Ticks, long Number, int State, int Previous);

/// <summary>
/// The events of a log as they are read, in blocks so that growing never copies. The events of an item are linked backwards, so that
/// items may be interleaved in any way at no cost for grouping.
/// </summary>
internal sealed class ScanLog<TItem>
    where TItem : notnull
{
    private const int BlockBits = 14;
    private const int BlockLength = 1 << BlockBits;

    private readonly Dictionary<TItem, int> _itemIndex = [];
    private readonly List<(TItem Item, int LastScan)> _items = [];
    private readonly List<Scan[]> _blocks = [];
    private Scan[] _history = new Scan[64];
    private int _count;

    internal long Count => _count;

    internal int ItemCount => _items.Count;

    internal TItem Item(int index) => _items[index].Item;

    /// <exception cref="OverflowException">More than 2³¹ − 1 events.</exception>
    internal void Add(TItem item, long ticks, int state, long number)
    {
        if (!_itemIndex.TryGetValue(item, out var index))
        {
            index = _items.Count;
            _itemIndex.Add(item, index);
            _items.Add((item, -1));
        }

        if (_count % BlockLength == 0)
        {
            _blocks.Add(new Scan[BlockLength]);
        }

        _blocks[^1][_count % BlockLength] = new Scan(ticks, number, state, _items[index].LastScan);
        _items[index] = (_items[index].Item, _count);
        _count = checked(_count + 1);
    }

    /// <summary>The events of one item by time, those of one instant in the order read. Valid until the next call.</summary>
    internal Span<Scan> History(int item)
    {
        var length = 0;
        var isAscending = true;
        for (var k = _items[item].LastScan; k >= 0; k = _history[length - 1].Previous)
        {
            if (length == _history.Length)
            {
                Array.Resize(ref _history, 2 * length);
            }

            _history[length] = _blocks[k >> BlockBits][k % BlockLength];
            isAscending &= length == 0 || _history[length].Ticks <= _history[length - 1].Ticks;
            length++;
        }

        var history = _history.AsSpan(0, length);
        history.Reverse();
        if (!isAscending)
        {
            history.Sort(static (one, other) => one.Ticks != other.Ticks ? one.Ticks.CompareTo(other.Ticks) : one.Previous.CompareTo(other.Previous));
        }

        return history;
    }
}
