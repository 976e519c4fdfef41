using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>Which moves are possible in exactly so many steps, from the structure alone: the others have probability zero, whatever rounding says.</summary>
internal static class SpectralPossible
{
    /// <summary>A test by position, row · states + column.</summary>
    internal static Func<int, bool> After<TState>(Chain<TState> chain, double[] step, long steps, CancellationToken cancellation)
        where TState : notnull
    {
        var size = chain.StateCount;
        if (chain.Structure().TransientStates.Count == 0 && steps >= (long)size * size)
        {
            // Inside a recurrent class every state of the right cyclic class can be reached by then (Schwarz 1967, after Wielandt 1950).
            var groups = CyclicGroups.Of(chain);
            return index => groups.After(index / size, steps) == groups.After(index % size, 0);
        }

        var pattern = PatternPower.Of(step, size).Raise(steps, cancellation);
        return index => pattern[index / size, index % size];
    }
}
