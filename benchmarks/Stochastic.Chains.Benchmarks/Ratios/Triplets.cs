namespace Stochastic.Chains.Benchmarks.Ratios;

/// <summary>Moves as three arrays, the way sparse matrices of other libraries take them.</summary>
internal sealed class Triplets(Transition<int>[] moves)
{
    /// <summary>From, to, probability.</summary>
    internal IReadOnlyList<Array> Arrays { get; } =
    [
        Array.ConvertAll(moves, move => move.From), Array.ConvertAll(moves, move => move.To), Array.ConvertAll(moves, move => move.Probability),
    ];
}
