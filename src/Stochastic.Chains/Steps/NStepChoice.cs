using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>The rule by which a method is chosen; it looks at sizes, the number of steps and what can be proved, never at what was asked before.</summary>
internal static class NStepChoice
{
    /// <summary>What an entry of a dense product costs less than a move taken by itself, measured.</summary>
    private const double DenseAdvantage = 24;

    internal static NStepMatrix<TState> Solve<TState>(Chain<TState> chain, long steps, SolveOptions options)
        where TState : notnull
    {
        var propagation = (double)steps * chain.TransitionCount * DenseAdvantage;
        var squaring = (double)SquaringChain.For(steps).Products.Count * chain.StateCount * chain.StateCount;
        return propagation <= squaring
            ? new PropagationMethod().Solve(chain, steps, "A few steps of a chain with few moves cost less than squaring its matrix.", options)
            : new SquaringMethod().Solve(chain, steps, "Products of non-negative numbers keep the digits of small probabilities.", options);
    }
}
