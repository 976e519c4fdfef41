namespace Stochastic.Chains;

/// <summary>What is wrong with one piece of an event log.</summary>
public enum LogFaultKind
{
    /// <summary>There is no file of that name.</summary>
    FileNotFound,

    /// <summary>The log has no events at all.</summary>
    EmptyLog,

    /// <summary>The header does not name a column that was asked for.</summary>
    MissingColumn,

    /// <summary>The header names a column twice that was asked for.</summary>
    RepeatedColumn,

    /// <summary>A row has more or fewer fields than the header.</summary>
    RaggedRow,

    /// <summary>The quotes of a row do not follow RFC 4180, so that it is not certain where its fields end.</summary>
    UnreadableRow,

    /// <summary>The item of an event is empty or null.</summary>
    EmptyItem,

    /// <summary>The state of an event is empty or null.</summary>
    EmptyState,

    /// <summary>A time cannot be read, or names no single instant.</summary>
    UnreadableTime,

    /// <summary>An event is in a state that is not in the given list of states.</summary>
    UnknownState,

    /// <summary>An event is later than the given end of the log.</summary>
    AfterLogEnd,

    /// <summary>An item is in two different states at one instant.</summary>
    TwoStatesAtOneInstant,
}
