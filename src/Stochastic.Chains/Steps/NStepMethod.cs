namespace Stochastic.Chains;

/// <summary>
/// A way to compute an n-step transition matrix: <see cref="SquaringMethod"/>, <see cref="SpectralMethod"/> or
/// <see cref="PropagationMethod"/>.
/// </summary>
/// <remarks>Closed to others, because each method has an error bound of its own that a residual could not replace.</remarks>
/// <example>
/// <code>
/// NStepMethod insisted = new SquaringMethod();
/// NStepMatrix&lt;string&gt; year = chain.NStep(52, insisted);
/// </code>
/// </example>
public abstract record NStepMethod
{
    private protected NStepMethod()
    {
    }

    /// <summary>Gets the name of the method, as the certificate shows it.</summary>
    public abstract string Name { get; }

    /// <summary>Computes a power of two steps or more.</summary>
    internal abstract NStepMatrix<TState> Solve<TState>(Chain<TState> chain, long steps, string reason, SolveOptions options)
        where TState : notnull;
}
