using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>The solution of a system of first steps, of any magnitude, with what is proved about each of its entries.</summary>
/// <param name="Values">The solution.</param>
/// <param name="Basis">What the bound rests on.</param>
/// <param name="RelativeErrorBound">A bound on the relative error of each entry rounded to a double.</param>
/// <param name="WideErrorBound">A bound on the relative error of each entry as it stands.</param>
internal sealed record WideSolution(ScaledDoubleDouble[] Values, ErrorBasis Basis, double RelativeErrorBound, double WideErrorBound)
{
    /// <summary>The solution in doubles; an entry that no double can hold is refused by name.</summary>
    /// <exception cref="NumericalRangeException">An entry is out of range.</exception>
    internal ExitSolution ToDoubles<TState>(StateSpace<TState> states, int[] members, Func<object, long, string> outOfRange)
        where TState : notnull
    {
        var values = Array.ConvertAll(Values, value => value.ToDouble());
        for (var k = 0; k < values.Length; k++)
        {
            if (!Values[k].IsZero && !double.IsNormal(values[k]))
            {
                var state = states[members[k]];
                throw new NumericalRangeException(outOfRange(state, Values[k].Exponent), Text.Label(state));
            }
        }

        return new ExitSolution(values, Basis, RelativeErrorBound);
    }
}
