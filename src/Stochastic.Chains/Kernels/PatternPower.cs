using System.Numerics;

namespace Stochastic.Chains.Kernels;

/// <summary>Which states can be reached from which in exactly so many steps: a power of a pattern, a bit for each pair. O(n³ log steps / 64).</summary>
internal sealed class PatternPower
{
    private const int BitsPerWord = 64;

    private readonly int _size;
    private readonly int _words;
    private readonly ulong[] _bits;

    private PatternPower(int size)
    {
        _size = size;
        _words = (size + BitsPerWord - 1) / BitsPerWord;
        _bits = new ulong[(long)size * _words];
    }

    /// <summary>Whether a move between two states is possible.</summary>
    internal bool this[int from, int to] => (Word(from, to) >> (to % BitsPerWord) & 1) == 1;

    /// <summary>The pattern of the positive entries of a table.</summary>
    internal static PatternPower Of(ReadOnlySpan<double> table, int size)
    {
        var pattern = new PatternPower(size);
        for (var index = 0; index < table.Length; index++)
        {
            if (table[index] > 0)
            {
                pattern.Word(index / size, index % size) |= 1UL << (index % size % BitsPerWord);
            }
        }

        return pattern;
    }

    /// <summary>The pattern of so many steps, one or more.</summary>
    internal PatternPower Raise(long steps, CancellationToken cancellation)
    {
        var power = this;
        for (var digit = BitOperations.Log2((ulong)steps) - 1; digit >= 0; digit--)
        {
            power = power.Times(power, cancellation);
            power = ((steps >> digit) & 1) == 1 ? power.Times(this, cancellation) : power;
        }

        return power;
    }

    private ref ulong Word(int row, int column) => ref _bits[((long)row * _words) + (column / BitsPerWord)];

    private PatternPower Times(PatternPower right, CancellationToken cancellation)
    {
        var product = new PatternPower(_size);
        for (var row = 0; row < _size; row++)
        {
            cancellation.ThrowIfCancellationRequested();
            var target = product._bits.AsSpan(row * _words, _words);
            for (var middle = 0; middle < _size; middle++)
            {
                if (this[row, middle])
                {
                    var source = right._bits.AsSpan(middle * _words, _words);
                    for (var word = 0; word < _words; word++)
                    {
                        target[word] |= source[word];
                    }
                }
            }
        }

        return product;
    }
}
