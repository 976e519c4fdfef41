namespace Stochastic.Chains;

/// <summary>What is wrong with one piece of a chain's input.</summary>
public enum ChainFaultKind
{
    /// <summary>The chain has no states at all.</summary>
    NoStates,

    /// <summary>A state is null.</summary>
    NullState,

    /// <summary>A state is listed twice.</summary>
    DuplicateState,

    /// <summary>A move names a state that is not in the given list of states.</summary>
    UnknownState,

    /// <summary>The matrix is not square, or its size differs from the number of states.</summary>
    WrongShape,

    /// <summary>A state has no way on, not even to stay: its row is missing or all zeros.</summary>
    EmptyRow,

    /// <summary>A probability is NaN or infinite.</summary>
    NotFinite,

    /// <summary>A probability or a rate is below zero.</summary>
    Negative,

    /// <summary>A probability is above one.</summary>
    AboveOne,

    /// <summary>The probabilities of a row do not sum to one.</summary>
    RowSum,

    /// <summary>The same move is given twice.</summary>
    DuplicateTransition,

    /// <summary>A rate leads from a state to itself, which has no meaning in continuous time.</summary>
    SelfRate,

    /// <summary>The rates out of a state sum to more than a double can hold, or a rate is too small to be stored beside the largest.</summary>
    RateOutOfRange,

    /// <summary>A state was never left in the counts from which the chain is to be estimated.</summary>
    UnobservedRow,

    /// <summary>A move was counted that the options of the estimate say is impossible.</summary>
    ImpossibleMove,

    /// <summary>Stands last in a list of faults that was cut; its value is the number of faults not listed.</summary>
    Unlisted,
}
