namespace Stochastic.Chains;

/// <summary>What an estimate makes of moves that were never counted.</summary>
/// <example><code>var options = new EstimateOptions&lt;string&gt; { UnseenMoves = UnseenMoves.Impossible };</code></example>
public enum UnseenMoves
{
    /// <summary>They can happen and were not seen by chance: a prior gives them weight, and they count as parameters. The default of an estimate.</summary>
    Possible,

    /// <summary>They cannot happen: structural zeros, with probability 0 for certain. Right where the process itself rules them out.</summary>
    Impossible,
}
