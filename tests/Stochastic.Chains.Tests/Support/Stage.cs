namespace Stochastic.Chains.Tests.Support;

/// <summary>The life of an invented pump.</summary>
public enum Stage
{
    /// <summary>Just installed.</summary>
    New,

    /// <summary>Still running.</summary>
    Worn,

    /// <summary>Standing still.</summary>
    Failed,
}
