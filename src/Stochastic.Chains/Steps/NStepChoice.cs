using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>The rule by which a method is chosen; it looks at sizes, the number of steps and what can be proved, never at what was asked before.</summary>
internal static class NStepChoice
{
    /// <summary>How much less an entry of a dense product costs than a move taken by itself, measured.</summary>
    private const double DenseAdvantage = 24;

    // Where the spectrum, once kept with the chain, is faster than squaring; measured.
    private const int MostStatesForSpectrum = 32;
    private const long FewestStepsForSpectrum = 1 << 10;
    private const double SpectralTolerance = 1e-12;

    internal static NStepMatrix<TState> Solve<TState>(Chain<TState> chain, long steps, SolveOptions options)
        where TState : notnull
    {
        var propagation = (double)steps * chain.TransitionCount * DenseAdvantage;
        var squaring = (double)SquaringChain.For(steps).Products.Count * chain.StateCount * chain.StateCount;
        if (propagation <= squaring)
        {
            return new PropagationMethod().Solve(chain, steps, "A few steps of a chain with few moves cost less than squaring its matrix.", options);
        }

        return TrySpectrum(chain, steps, options)
            ?? new SquaringMethod().Solve(chain, steps, "Products of non-negative numbers keep the digits of small probabilities.", options);
    }

    /// <summary>The power through a spectrum that is kept with the chain, where it proves every entry; else null.</summary>
    private static NStepMatrix<TState>? TrySpectrum<TState>(Chain<TState> chain, long steps, SolveOptions options)
        where TState : notnull
    {
        if (chain.StateCount > MostStatesForSpectrum || steps < FewestStepsForSpectrum || options.CertificateLevel != CertificateLevel.Proof)
        {
            return null;
        }

        var power = chain.Derive(static chain => new KeptSpectrum<TState>(chain)).Spectrum?.Power(
            steps, "Many steps of a small chain: its spectrum, made once, proves every entry to 12 digits.");
        return power?.Certificate.RelativeErrorBound <= SpectralTolerance ? power : null;
    }

    /// <summary>The spectrum of a small chain, or nothing when its iteration did not converge.</summary>
    private sealed class KeptSpectrum<TState>
        where TState : notnull
    {
        internal KeptSpectrum(Chain<TState> chain)
        {
            try
            {
                Spectrum = chain.Spectrum();
            }
            catch (ConvergenceException)
            {
                // Squaring answers as well.
            }
        }

        internal SpectralDecomposition<TState>? Spectrum { get; }
    }
}
