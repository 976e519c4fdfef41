namespace Stochastic.Chains;

/// <summary>What the error bound of a result rests on.</summary>
public enum ErrorBasis
{
    /// <summary>No bound was asked for, or none can be given; the bounds are infinite.</summary>
    None,

    /// <summary>The answer follows from the structure alone and is exact: certain, impossible or infinite.</summary>
    Structure,

    /// <summary>
    /// An a priori bound on each entry: only additions, products and quotients of non-negative numbers were made, so rounding is a
    /// small relative change of the data, which changes each entry by a small relative amount (O'Cinneide 1993). A proof.
    /// </summary>
    SubtractionFree,

    /// <summary>
    /// The equations were solved once more for what the answer leaves unbalanced, in twice the precision, and the bound is itself a
    /// solve with non-negative numbers: the inverse of the system has no negative entry. A proof, for each entry.
    /// </summary>
    RefinedMonotone,

    /// <summary>The whole elimination was repeated in twice the precision and rounded once. A proof, for each entry.</summary>
    DoubledElimination,

    /// <summary>
    /// The answer was shown to be the exact answer of a chain whose probabilities differ from the given ones by a tiny relative
    /// amount; the Markov chain tree theorem carries that over to each entry (O'Cinneide 1993). A proof, for any method.
    /// </summary>
    FlowBalance,

    /// <summary>The sum of what is left unbalanced, times the largest mean time to a reference state. A proof for the sum of all errors.</summary>
    MonotoneResidual,

    /// <summary>The sum of what is left unbalanced, over how much closer a step brings any two distributions. A proof for the sum of all errors.</summary>
    Contraction,

    /// <summary>
    /// What computed eigenvectors leave of their equations and of the identity, times the entries of their inverse (after Bauer &amp; Fike
    /// 1960). A proof, for each entry.
    /// </summary>
    SpectralResidual,
}
