using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>Reads a square table of probabilities into a chain.</summary>
internal static class MatrixReader<TState>
    where TState : notnull
{
    internal static Chain<TState>? Read(IReadOnlyList<TState> states, double[,] matrix, ChainOptions<TState> options, FaultCollector faults)
    {
        if (ReadStates(states, matrix.GetLength(0), matrix.GetLength(1), options, faults) is not { } space)
        {
            return null;
        }

        var size = space.Count;
        var transitions = 0L;
        foreach (var value in matrix)
        {
            transitions += value == 0 ? 0 : 1;
        }

        var writer = new MatrixWriter(size, transitions);
        var validator = new RowValidator<TState>(space, options.RowSums, faults);
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

            validator.Check(row, columns.AsSpan(0, count), values.AsSpan(0, count));
            writer.Write(row, columns.AsSpan(0, count), values.AsSpan(0, count));
        }

        return faults.HasFaults ? null : new Chain<TState>(space, writer.ToMatrix(), validator.Rescaled, uniformizationRate: null);
    }

    internal static Chain<TState>? Read(IReadOnlyList<TState> states, Matrix<double> matrix, ChainOptions<TState> options, FaultCollector faults)
    {
        if (matrix.Storage.IsDense)
        {
            return Read(states, matrix.ToArray(), options, faults);
        }

        if (ReadStates(states, matrix.RowCount, matrix.ColumnCount, options, faults) is not { } space)
        {
            return null;
        }

        var assembler = ChainAssembler<TState>.ForStates(space, options);
        foreach (var (row, column, value) in matrix.EnumerateIndexed(Zeros.AllowSkip))
        {
            assembler.Add(space[row], space[column], value);
        }

        var chain = assembler.Assemble();
        faults.AddAll(assembler.Faults);
        return chain;
    }

    private static StateSpace<TState>? ReadStates(IReadOnlyList<TState> states, int rows, int columns, ChainOptions<TState> options, FaultCollector faults)
    {
        var builder = StateSpaceBuilder<TState>.FromList(states, options.Comparer, faults);
        if (rows != columns)
        {
            faults.Add(ChainFaultKind.WrongShape, [], columns, Messages.NotSquare(rows, columns));
        }

        if (states.Count != rows)
        {
            faults.Add(ChainFaultKind.WrongShape, [], states.Count, Messages.WrongStateCount(states.Count, rows));
        }

        return faults.HasFaults ? null : builder.ToStateSpace();
    }
}
