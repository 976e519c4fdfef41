namespace Stochastic.Chains;

/// <summary>What the periods of a log are counted in.</summary>
public enum LogPeriodUnit
{
    /// <summary>A fixed length of elapsed time, which no calendar changes.</summary>
    Elapsed,

    /// <summary>Calendar days, of 23 or 25 hours where clocks change.</summary>
    Days,

    /// <summary>Calendar weeks of seven calendar days.</summary>
    Weeks,

    /// <summary>Calendar months.</summary>
    Months,
}
