namespace Stochastic.Chains;

/// <summary>Where the chains come from on which an answer is asked again and again.</summary>
/// <example><code>var options = new ConfidenceOptions&lt;string&gt; { Method = ConfidenceMethod.ParametricBootstrap };</code></example>
public enum ConfidenceMethod
{
    /// <summary>
    /// From the posterior: each row is drawn from its Dirichlet law. The default and the recommended one: it keeps its level where moves are rare.
    /// Source: Gelman et al., Bayesian Data Analysis, 3rd ed. 2013, section 3.4.
    /// </summary>
    PosteriorSampling,

    /// <summary>
    /// From new counts, drawn from the most likely chain with the same number of observations in each row, and estimated again. Rare moves are often
    /// not drawn at all. Source: Efron and Tibshirani, An Introduction to the Bootstrap, 1993, section 6.5.
    /// </summary>
    ParametricBootstrap,
}
