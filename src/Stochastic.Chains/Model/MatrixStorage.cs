namespace Stochastic.Chains;

/// <summary>How the transition probabilities of a chain are held in memory.</summary>
public enum MatrixStorage
{
    /// <summary>
    /// Every pair of states has its place, 8 bytes each. Chosen up to 64 states, and above that where at least a quarter of all
    /// pairs are possible moves.
    /// </summary>
    Dense,

    /// <summary>Only the possible moves are held, row by row, 12 bytes each. Chosen in all other cases.</summary>
    CompressedSparseRows,
}
