namespace Stochastic.Chains.Kernels;

/// <summary>A row-major matrix inside an array: entry (i, j) is <c>values[start + i·stride + j]</c>. The extent is the caller's to know.</summary>
internal readonly struct MatrixView(double[] values, int start, int stride)
{
    /// <summary>The array that holds the matrix.</summary>
    internal double[] Values { get; } = values;

    /// <summary>Index of entry (0, 0).</summary>
    internal int Start { get; } = start;

    /// <summary>Distance between the starts of consecutive rows.</summary>
    internal int Stride { get; } = stride;

    /// <summary>A reference to one entry.</summary>
    internal ref double this[int row, int column] => ref Values[Start + (row * Stride) + column];

    /// <summary>The matrix that begins at the given entry.</summary>
    internal MatrixView From(int row, int column) => new(Values, Start + (row * Stride) + column, Stride);

    /// <summary>A part of one row.</summary>
    internal Span<double> Row(int row, int column, int count) => Values.AsSpan(Start + (row * Stride) + column, count);
}
