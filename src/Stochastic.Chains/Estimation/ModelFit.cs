namespace Stochastic.Chains;

/// <summary>How well a model fits the counts, and what it spends on that.</summary>
/// <param name="LogLikelihood">The natural logarithm of the probability of the counted moves, at its maximum; 0 or less.</param>
/// <param name="ParameterCount">The number of probabilities that were free to be fitted.</param>
/// <param name="ObservationCount">The number of moves.</param>
/// <remarks>
/// Compare models of the same counts only. Sources: Akaike (1974), IEEE Trans. Automat. Control 19, 716–723; Schwarz (1978), Ann. Statist. 6, 461–464;
/// for chains: Katz (1981), Technometrics 23, 243–249.
/// </remarks>
/// <example><code>bool orderOneIsBetter = test.Alternative.BayesianCriterion &lt; test.Null.BayesianCriterion;</code></example>
public readonly record struct ModelFit(double LogLikelihood, long ParameterCount, long ObservationCount)
{
    /// <summary>Gets Akaike's information criterion, 2k − 2 ln L; the smaller the better.</summary>
    public double AkaikeCriterion => (2.0 * ParameterCount) - (2 * LogLikelihood);

    /// <summary>Gets the Bayesian (Schwarz) information criterion, k ln n − 2 ln L; the smaller the better.</summary>
    public double BayesianCriterion => (ParameterCount * Math.Log(Math.Max(1, ObservationCount))) - (2 * LogLikelihood);
}
