using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>Makes prior opinions about the rows of a chain, as Dirichlet distributions.</summary>
/// <remarks>Source: Gelman et al., Bayesian Data Analysis, 3rd ed. 2013, section 3.4.</remarks>
/// <example>
/// <code>
/// var options = new EstimateOptions&lt;string&gt; { Prior = DirichletPrior.Jeffreys&lt;string&gt;() };
/// </code>
/// </example>
public static class DirichletPrior
{
    private const double JeffreysWeight = 0.5;

    /// <summary>Jeffreys' prior: half an observation for each possible move. Its credible intervals keep their level well when moves are rare.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    public static DirichletPrior<TState> Jeffreys<TState>()
        where TState : notnull => Symmetric<TState>(JeffreysWeight);

    /// <summary>The uniform prior: one observation for each possible move (Laplace).</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    public static DirichletPrior<TState> Uniform<TState>()
        where TState : notnull => Symmetric<TState>(1);

    /// <summary>A prior with the same weight for each possible move.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="weight">The number of observations that the opinion about one move is worth, above 0 and finite.</param>
    /// <exception cref="ArgumentOutOfRangeException">The weight is not above 0 and finite.</exception>
    public static DirichletPrior<TState> Symmetric<TState>(double weight)
        where TState : notnull
    {
        RequireWeight(weight);
        return new DirichletPrior<TState>(weight, []);
    }

    internal static void RequireWeight(double weight)
    {
        if (!(weight > 0 && double.IsFinite(weight)))
        {
            throw new ArgumentOutOfRangeException(nameof(weight), weight, Messages.PriorWeightOutOfRange);
        }
    }
}
