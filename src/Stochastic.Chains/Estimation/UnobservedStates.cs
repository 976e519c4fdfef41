namespace Stochastic.Chains;

/// <summary>What an estimate does with a state that was never seen to be followed by anything: its row cannot be estimated.</summary>
/// <example><code>Chain&lt;string&gt; fitted = counts.ToChain(UnobservedStates.Absorbing);</code></example>
public enum UnobservedStates
{
    /// <summary>The estimate is refused, naming each such state. The default.</summary>
    Refuse,

    /// <summary>Such a state is taken as never left: it stays with probability 1. Right for an end such as lost or scrapped.</summary>
    Absorbing,

    /// <summary>
    /// Such a state is left out together with the moves into it, and so are the states that this leaves without a move, until every
    /// state left has one. The other moves of a row share its whole probability. Right for a state that is none, such as a misspelt label.
    /// </summary>
    Drop,
}
