namespace Stochastic.Chains.Kernels;

/// <summary>
/// Iterative refinement of a positive solution that is kept as high + low: each step solves for the residual and is kept when the proved
/// error gets smaller.
/// </summary>
/// <param name="states">The states whose numbers are corrected, in the order of the system.</param>
/// <param name="highs">The solution by state of the chain; overwritten.</param>
/// <param name="reach">How far it may be from the truth.</param>
internal sealed class Refinement(int[] states, double[] highs, RefinementReach reach)
{
    /// <summary>Half a unit in the last place: the rounding of the answer to a double that nothing can avoid.</summary>
    internal const double UnitRoundoff = 1.1102230246251565e-16;

    private const double GoodEnough = UnitRoundoff / 16;
    private const double WithinReach = UnitRoundoff;

    private bool _isCorrected;

    internal double[] Highs { get; } = highs;

    internal double[] Lows { get; } = new double[highs.Length];

    /// <summary>The residuals in the order of the system; those that are nothing but rounding are zero.</summary>
    internal double[] Residuals { get; } = new double[states.Length];

    /// <summary>Upper bounds of the absolute values of the residuals without rounding.</summary>
    internal double[] Bounds { get; } = new double[states.Length];

    /// <summary>The smallest relative error proved; +∞ before the first step that succeeds.</summary>
    internal double Error { get; private set; } = double.PositiveInfinity;

    /// <summary>The numbers it was proved of.</summary>
    internal double[] BestHighs { get; private set; } = highs;

    internal double[] BestLows { get; private set; } = [];

    /// <summary>
    /// Whether residuals without rounding can be expected to prove more: the error of double-double, about 4 n u² times the condition,
    /// stands in the way while the condition is still below 1 / u.
    /// </summary>
    internal bool NeedsExactResiduals => states.Length <= ExactResiduals.MostStates
        && Error > WithinReach && Error <= DoubledLoops.SumError(states.Length) / UnitRoundoff;

    /// <summary>Makes as many steps as help.</summary>
    /// <param name="findResiduals">Writes residuals and their bounds.</param>
    /// <param name="findError">The largest relative error that the bounds prove; may overwrite them.</param>
    /// <param name="solve">Solves the system in place; false when that is not possible.</param>
    /// <param name="cancellation">Looked at in each step.</param>
    internal void Improve(Action findResiduals, Func<double> findError, Func<double[], bool> solve, CancellationToken cancellation)
    {
        for (var step = 0; ; step++)
        {
            cancellation.ThrowIfCancellationRequested();
            findResiduals();
            if (step > 0)
            {
                var error = findError();
                if (!(error < Error))
                {
                    return;
                }

                (Error, BestHighs, BestLows) = (error, [.. Highs], [.. Lows]);
            }

            if (Error <= GoodEnough || step == reach.MostSteps || !solve(Residuals) || !TryCorrect())
            {
                return;
            }
        }
    }

    /// <summary>False when a correction is so large that refinement cannot be contracting.</summary>
    private bool TryCorrect()
    {
        var largest = _isCorrected ? RefinementReach.LargestCorrection : reach.LargestFirstCorrection;
        for (var k = 0; k < Residuals.Length; k++)
        {
            var state = states[k];
            if (!(Math.Abs(Residuals[k]) <= largest * Highs[state] && Highs[state] + Residuals[k] > 0))
            {
                return false;
            }

            (Highs[state], Lows[state]) = DoubleDouble.Add(Highs[state], Lows[state], Residuals[k], 0);
        }

        _isCorrected = true;
        return true;
    }
}
