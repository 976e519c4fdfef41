using System.Globalization;

namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// A generated chain that says how to make it again. Rows of the matrix sum to one within a few units in the last place; a positive
/// diagonal is a self-loop. Families made for it name a target state (rarely entered, or seldom left).
/// </summary>
internal sealed record SampleChain(string Family, int Size, ulong Seed, double[,] Matrix, int? Target)
{
    public int StateCount => Matrix.GetLength(0);

    /// <summary>All positive entries, row by row, self-loops included.</summary>
    public IEnumerable<(int From, int To, double Probability)> Transitions =>
        from i in Enumerable.Range(0, StateCount)
        from j in Enumerable.Range(0, StateCount)
        where Matrix[i, j] > 0
        select (i, j, Matrix[i, j]);

    public IEnumerable<(int From, int To, double Probability)> OffDiagonals => Transitions.Where(move => move.From != move.To);

    public IEnumerable<int> SelfLoops => Transitions.Where(move => move.From == move.To).Select(move => move.From);

    public ExactChain ToExact() => ExactChain.FromMatrix(Matrix);

    public override string ToString() => string.Create(
        CultureInfo.InvariantCulture,
        $"{Family}, size {Size}, seed {Seed} (again: ChainFamilies.Named(\"{Family}\").Create({Size}, {Seed}))");
}
