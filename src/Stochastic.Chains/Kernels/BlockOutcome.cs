namespace Stochastic.Chains.Kernels;

/// <summary>How the elimination of several states at once ended.</summary>
internal enum BlockOutcome
{
    /// <summary>A product of the method itself could leave the normal range; the table is half done.</summary>
    OutOfRange,

    /// <summary>A product of this form of the method could leave the normal range; the table is as before, for a form with fewer products.</summary>
    Untouched,

    /// <summary>The states are eliminated.</summary>
    Eliminated,
}
