namespace Stochastic.Chains.Internal;

/// <summary>Messages of eigenvalue computations.</summary>
internal static partial class Messages
{
    internal static string MatrixNotSquare(int length, int order) =>
        $"The matrix has {Text.Count(length, "entry", "entries")}, but its order is given as {Text.Count(order)}. Give order times order entries, of an order of 1 or more.";

    internal static string MatrixEntryNotFinite(int row, int column, double value) =>
        $"Entry ({Text.Count(row)}, {Text.Count(column)}) of the matrix, counted from 0, is {Text.Number(value)}. Give finite numbers.";

    internal static string SchurFormUnfinished(int unresolved, int order, int sweeps) =>
        $"{Text.Count(unresolved)} of {Text.Count(order, "eigenvalue", "eigenvalues")} had not separated after {Text.Count(sweeps, "QR sweep", "QR sweeps")}. " +
        "Check HasConverged before asking for eigenvalues or eigenvectors.";

    internal const string AskSquaring = "Ask NStep for powers: repeated squaring needs no eigenvalues.";
}
