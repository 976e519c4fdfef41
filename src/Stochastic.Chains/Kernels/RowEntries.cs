namespace Stochastic.Chains.Kernels;

/// <summary>The nonzero entries of one row, from either storage; enumerate to read them in column order.</summary>
/// <param name="columns">The columns, ascending; empty when <paramref name="values"/> holds a whole dense row.</param>
/// <param name="values">The values, one for each column, or a whole dense row.</param>
internal readonly ref struct RowEntries(ReadOnlySpan<int> columns, ReadOnlySpan<double> values)
{
    private readonly ReadOnlySpan<int> _columns = columns;
    private readonly ReadOnlySpan<double> _values = values;

    public Enumerator GetEnumerator() => new(_columns, _values);

    internal ref struct Enumerator(ReadOnlySpan<int> columns, ReadOnlySpan<double> values)
    {
        private readonly ReadOnlySpan<int> _columns = columns;
        private readonly ReadOnlySpan<double> _values = values;
        private readonly bool _isSparse = columns.Length > 0;
        private int _position = -1;

        public readonly (int Column, double Value) Current =>
            (_isSparse ? _columns[_position] : _position, _values[_position]);

        public bool MoveNext()
        {
            do
            {
                _position++;
            }
            while (_position < _values.Length && _values[_position] == 0);

            return _position < _values.Length;
        }
    }
}
