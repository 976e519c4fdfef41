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
}
