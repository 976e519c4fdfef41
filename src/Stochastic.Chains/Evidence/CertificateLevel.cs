namespace Stochastic.Chains;

/// <summary>How much evidence a result is asked to carry.</summary>
public enum CertificateLevel
{
    /// <summary>The method and the reason only.</summary>
    None,

    /// <summary>Also the residual, re-computed from the returned numbers.</summary>
    Residual,

    /// <summary>Also the best bound on the error that can be given. The default.</summary>
    Proof,
}
