using System.Diagnostics.CodeAnalysis;
using MathNet.Numerics.LinearAlgebra;

namespace Stochastic.Chains;

public static partial class Chain
{
    /// <summary>Makes a chain on the states 0 to n − 1 from a transition matrix.</summary>
    /// <param name="matrix">The probabilities: row = from, column = to; each row sums to one. Copied.</param>
    /// <exception cref="InvalidChainException">The matrix has faults; all are listed.</exception>
    /// <example><code>Chain&lt;int&gt; chain = Chain.FromMatrix(new[,] { { 0.9, 0.1 }, { 0.5, 0.5 } });</code></example>
    public static Chain<int> FromMatrix(double[,] matrix) => FromMatrix(matrix, new ChainOptions<int>());

    /// <summary>Makes a chain on the states 0 to n − 1 from a transition matrix, with options.</summary>
    /// <param name="matrix">The probabilities: row = from, column = to; each row sums to one. Copied.</param>
    /// <param name="options">What is done with row sums.</param>
    /// <exception cref="InvalidChainException">The matrix has faults; all are listed.</exception>
    public static Chain<int> FromMatrix(double[,] matrix, ChainOptions<int> options)
    {
        ArgumentNullException.ThrowIfNull(matrix);
        return FromMatrix(Numbered(matrix.GetLength(0)), matrix, options);
    }

    /// <summary>Makes a chain on the states 0 to n − 1 from a MathNet.Numerics matrix.</summary>
    /// <param name="matrix">The probabilities: row = from, column = to; each row sums to one. Copied.</param>
    /// <exception cref="InvalidChainException">The matrix has faults; all are listed.</exception>
    public static Chain<int> FromMatrix(Matrix<double> matrix) => FromMatrix(matrix, new ChainOptions<int>());

    /// <summary>Makes a chain on the states 0 to n − 1 from a MathNet.Numerics matrix, with options.</summary>
    /// <param name="matrix">The probabilities: row = from, column = to; each row sums to one. Copied.</param>
    /// <param name="options">What is done with row sums.</param>
    /// <exception cref="InvalidChainException">The matrix has faults; all are listed.</exception>
    public static Chain<int> FromMatrix(Matrix<double> matrix, ChainOptions<int> options)
    {
        ArgumentNullException.ThrowIfNull(matrix);
        return FromMatrix(Numbered(matrix.RowCount), matrix, options);
    }

    /// <summary>Makes a chain on labelled states from a transition matrix.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">The states, each once, in the order of the rows and columns.</param>
    /// <param name="matrix">The probabilities: row = from, column = to; each row sums to one. Copied.</param>
    /// <exception cref="InvalidChainException">The states or the matrix have faults; all are listed.</exception>
    /// <example><code>var chain = Chain.FromMatrix(["up", "down"], new[,] { { 0.9, 0.1 }, { 0.5, 0.5 } });</code></example>
    public static Chain<TState> FromMatrix<TState>(IReadOnlyList<TState> states, double[,] matrix)
        where TState : notnull => FromMatrix(states, matrix, new ChainOptions<TState>());

    /// <summary>Makes a chain on labelled states from a transition matrix, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">The states, each once, in the order of the rows and columns.</param>
    /// <param name="matrix">The probabilities: row = from, column = to; each row sums to one. Copied.</param>
    /// <param name="options">How labels are compared and what is done with row sums.</param>
    /// <exception cref="InvalidChainException">The states or the matrix have faults; all are listed.</exception>
    public static Chain<TState> FromMatrix<TState>(IReadOnlyList<TState> states, double[,] matrix, ChainOptions<TState> options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(states);
        ArgumentNullException.ThrowIfNull(matrix);
        ArgumentNullException.ThrowIfNull(options);
        var faults = new FaultCollector();
        return MatrixReader<TState>.Read(states, matrix, options, faults) ?? throw faults.ToException();
    }

    /// <summary>Makes a chain on labelled states from a MathNet.Numerics matrix, dense or sparse.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">The states, each once, in the order of the rows and columns.</param>
    /// <param name="matrix">The probabilities: row = from, column = to; each row sums to one. Copied.</param>
    /// <exception cref="InvalidChainException">The states or the matrix have faults; all are listed.</exception>
    public static Chain<TState> FromMatrix<TState>(IReadOnlyList<TState> states, Matrix<double> matrix)
        where TState : notnull => FromMatrix(states, matrix, new ChainOptions<TState>());

    /// <summary>Makes a chain on labelled states from a MathNet.Numerics matrix, dense or sparse, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">The states, each once, in the order of the rows and columns.</param>
    /// <param name="matrix">The probabilities: row = from, column = to; each row sums to one. Copied.</param>
    /// <param name="options">How labels are compared and what is done with row sums.</param>
    /// <exception cref="InvalidChainException">The states or the matrix have faults; all are listed.</exception>
    public static Chain<TState> FromMatrix<TState>(IReadOnlyList<TState> states, Matrix<double> matrix, ChainOptions<TState> options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(states);
        ArgumentNullException.ThrowIfNull(matrix);
        ArgumentNullException.ThrowIfNull(options);
        var faults = new FaultCollector();
        return MatrixReader<TState>.Read(states, matrix, options, faults) ?? throw faults.ToException();
    }

    /// <summary>Makes a chain from a transition matrix, or reports the faults without throwing.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">The states, each once, in the order of the rows and columns.</param>
    /// <param name="matrix">The probabilities: row = from, column = to; each row sums to one. Copied.</param>
    /// <param name="chain">The chain, or null when there are faults.</param>
    /// <param name="faults">The faults; empty when there is a chain.</param>
    /// <returns>Whether there is a chain.</returns>
    public static bool TryFromMatrix<TState>(
        IReadOnlyList<TState> states, double[,] matrix, [NotNullWhen(true)] out Chain<TState>? chain, out IReadOnlyList<ChainFault> faults)
        where TState : notnull => TryFromMatrix(states, matrix, new ChainOptions<TState>(), out chain, out faults);

    /// <summary>Makes a chain from a transition matrix, with options, or reports the faults without throwing.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">The states, each once, in the order of the rows and columns.</param>
    /// <param name="matrix">The probabilities: row = from, column = to; each row sums to one. Copied.</param>
    /// <param name="options">How labels are compared and what is done with row sums.</param>
    /// <param name="chain">The chain, or null when there are faults.</param>
    /// <param name="faults">The faults; empty when there is a chain.</param>
    /// <returns>Whether there is a chain.</returns>
    public static bool TryFromMatrix<TState>(
        IReadOnlyList<TState> states, double[,] matrix, ChainOptions<TState> options, [NotNullWhen(true)] out Chain<TState>? chain, out IReadOnlyList<ChainFault> faults)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(states);
        ArgumentNullException.ThrowIfNull(matrix);
        ArgumentNullException.ThrowIfNull(options);
        var collector = new FaultCollector();
        chain = MatrixReader<TState>.Read(states, matrix, options, collector);
        faults = collector.ToList();
        return chain is not null;
    }

    private static int[] Numbered(int count) => [.. Enumerable.Range(0, count)];
}
