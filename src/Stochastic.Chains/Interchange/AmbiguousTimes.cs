namespace Stochastic.Chains;

/// <summary>How a local time that comes twice is read: in the hour after clocks are set back.</summary>
public enum AmbiguousTimes
{
    /// <summary>It is refused. The default.</summary>
    Refuse,

    /// <summary>It is the earlier of the two instants, before clocks were set back.</summary>
    Earlier,

    /// <summary>It is the later of the two instants, after clocks were set back.</summary>
    Later,
}
