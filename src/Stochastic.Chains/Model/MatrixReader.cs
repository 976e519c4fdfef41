using System.Collections.ObjectModel;
using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>Reads a square table of probabilities into a chain.</summary>
internal static class MatrixReader<TState>
    where TState : notnull
{
    internal static Chain<TState>? Read(IReadOnlyList<TState> states, double[,] matrix, ChainOptions<TState> options, FaultCollector faults)
    {
        var builder = StateSpaceBuilder<TState>.FromList(states, options.Comparer, faults);
        if (!HasShape(states, matrix.GetLength(0), matrix.GetLength(1), faults))
        {
            return null;
        }

        var size = states.Count;
        var transitions = 0L;
        foreach (var value in matrix)
        {
            transitions += value == 0 ? 0 : 1;
        }

        var writer = new MatrixWriter(size, transitions);
        var validator = new RowValidator<TState>(states, options.RowSums, faults);
        var columns = new int[size];
        var values = new double[size];
        for (var row = 0; row < size; row++)
        {
            var count = 0;
            for (var column = 0; column < size; column++)
            {
                if (matrix[row, column] != 0)
                {
                    columns[count] = column;
                    values[count++] = matrix[row, column];
                }
            }

            validator.Check(row, columns.AsSpan(0, count), values.AsSpan(0, count), refused: 0);
            writer.Write(row, columns.AsSpan(0, count), values.AsSpan(0, count));
        }

        return faults.HasFaults
            ? null
            : new Chain<TState>(builder.ToStateSpace(), writer.ToMatrix(), validator.Rescaled, uniformizationRate: null);
    }

    internal static Chain<TState>? Read(IReadOnlyList<TState> states, Matrix<double> matrix, ChainOptions<TState> options, FaultCollector faults)
    {
        if (matrix.Storage.IsDense)
        {
            return Read(states, matrix.ToArray(), options, faults);
        }

        var builder = StateSpaceBuilder<TState>.FromList(states, options.Comparer, faults);
        if (!HasShape(states, matrix.RowCount, matrix.ColumnCount, faults))
        {
            return null;
        }

        var entries = new TripletList();
        foreach (var (row, column, value) in matrix.EnumerateIndexed(Zeros.AllowSkip))
        {
            if (value != 0)
            {
                entries.Add(row, column, value);
            }
        }

        var rows = entries.ToCompressedRows(states.Count);
        var validator = new RowValidator<TState>(states, options.RowSums, faults);
        validator.CheckAll(rows, ReadOnlyDictionary<int, double>.Empty);
        return faults.HasFaults
            ? null
            : new Chain<TState>(builder.ToStateSpace(), TransitionMatrix.FromCompressedRows(rows), validator.Rescaled, uniformizationRate: null);
    }

    /// <summary>Whether the rows can be told apart by state; where they cannot, nothing is said about them.</summary>
    private static bool HasShape(IReadOnlyList<TState> states, int rows, int columns, FaultCollector faults)
    {
        if (rows != columns)
        {
            faults.Add(ChainFaultKind.WrongShape, [], columns, Messages.NotSquare(rows, columns));
        }

        if (states.Count != rows)
        {
            faults.Add(ChainFaultKind.WrongShape, [], states.Count, Messages.WrongStateCount(states.Count, rows));
        }

        return rows == columns && states.Count == rows && rows > 0;
    }
}
