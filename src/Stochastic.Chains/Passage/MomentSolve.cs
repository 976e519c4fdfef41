using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>Variances and third moments of the time until some states are reached.</summary>
/// <remarks>
/// The third moment M solves A · M = 3 V + 3 h (h − 1) + 1 with the variance V, in continuous time A · M = 3 (V + h²): nothing large is
/// subtracted.
/// </remarks>
internal static class MomentSolve<TState>
    where TState : notnull
{
    private const double SecondOrder = 1.01;
    private const double RootError = 2 * Refinement.UnitRoundoff;

    internal static PassageMoments<TState> Of(Chain<TState> chain, int[] members, bool[] isTarget, double[] means, Certificate evidence, SolveOptions options)
    {
        if (members.Length == 0)
        {
            return new(chain.States, means, new ScaledDoubleDouble[means.Length], new ScaledDoubleDouble[means.Length], evidence);
        }

        using var system = new ExitSystem<TState>(chain, members, exits: 1, Array.ConvertAll(isTarget, target => target ? 0 : -1), options);
        var (variances, errors, basis) = new VarianceCandidates<TState>(chain, system, members).Best();
        var given = Enumerable.Range(0, members.Length).Select(k => ThirdGiven(chain.UniformizationRate, means[members[k]], variances[k])).ToArray();
        var third = system.Solve(given);
        var all = Scatter(third.Values, members, means.Length);
        var (relative, absolute) = options.CertificateLevel == CertificateLevel.Proof
            ? Bounds(variances, errors)
            : (double.PositiveInfinity, double.PositiveInfinity);
        return new(chain.States, means, Scatter(variances, members, means.Length), all, new Certificate
        {
            Method = "state reduction with exit rates",
            Reason = "For each state the better of two ways: squared deviations added up, or the mean square less the squared mean.",
            Residual = options.CertificateLevel >= CertificateLevel.Residual ? system.Residual(given, all) : double.PositiveInfinity,
            RelativeErrorBound = relative,
            AbsoluteErrorBound = absolute,
            Basis = double.IsFinite(absolute) ? basis : ErrorBasis.None,
            IsProof = double.IsFinite(absolute),
        });
    }

    /// <summary>
    /// Bounds on the relative error of variances, which covers their roots, and on the absolute error of the roots: a change of V by e changes
    /// its root by at most √e, and by at most e / √V where V is not zero.
    /// </summary>
    private static (double Relative, double Absolute) Bounds(ScaledDoubleDouble[] variances, ScaledDoubleDouble[] errors)
    {
        var (relative, absolute) = (0.0, 0.0);
        for (var k = 0; k < variances.Length; k++)
        {
            if (errors[k].IsZero)
            {
                continue;
            }

            var root = variances[k].SquareRoot();
            var share = variances[k].IsZero ? double.PositiveInfinity : (errors[k] / variances[k]).ToDouble() + RootError;
            relative = Math.Max(relative, share < 0.5 ? share * SecondOrder / (1 - share) : double.PositiveInfinity);
            absolute = Math.Max(absolute, Math.Min(share < 1 ? share * root : double.PositiveInfinity, errors[k].SquareRoot()) + (root * RootError));
        }

        return double.IsFinite(absolute) ? (relative, absolute * SecondOrder) : (double.PositiveInfinity, double.PositiveInfinity);
    }

    private static ScaledDoubleDouble ThirdGiven(double? rate, double mean, ScaledDoubleDouble variance)
    {
        var second = variance + ((ScaledDoubleDouble)mean * mean);
        return rate is { } perUnit
            ? (ScaledDoubleDouble)3 * second / perUnit
            : ((ScaledDoubleDouble)3 * variance) + ((ScaledDoubleDouble)3 * mean * Math.Max(0, mean - 1)) + 1;
    }

    private static ScaledDoubleDouble[] Scatter(ScaledDoubleDouble[] solution, int[] members, int count)
    {
        var values = new ScaledDoubleDouble[count];
        for (var k = 0; k < members.Length; k++)
        {
            values[members[k]] = solution[k];
        }

        return values;
    }
}
