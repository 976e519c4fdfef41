using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>
/// The distribution after one time as it is added up: after k steps of the uniformized chain with the Poisson probability of k steps in that time
/// (Jensen 1953).
/// </summary>
/// <remarks>
/// With w the kept weights, W their sum and T what was left out, the exact answer is (Σ w v + Σ left out) / (W + T), so that cutting off changes
/// an entry by at most T / W. The additions and quotients are of non-negative numbers, so rounding changes each entry by a relative amount
/// only. A small entry keeps its digits because steps go on until T is small beside the smallest entry, not beside one.
/// </remarks>
internal sealed class AfterTimeSum(double time, double jumps, int states)
{
    private const double SmallestWeight = 1e-290;
    private const double WorthLookingAt = 1e-18;
    private const double NoDigitLost = 1e-17;
    private const double SmallestProduct = 1e-300;
    private const int RoundingsOfQuotient = 10;

    private readonly ModeWeights _weights = ModeWeights.Poisson(jumps, SmallestWeight);
    private readonly double[] _sum = new double[states];
    private CompensatedSum _added;
    private double _leftOut;
    private long _steps;
    private bool _isSettled;

    internal bool IsComplete { get; private set; }

    /// <summary>The number of steps that this time needs at most.</summary>
    internal long Last => _weights.Last;

    /// <summary>Takes in the distribution after a number of steps, called once for each number from 0 on.</summary>
    /// <param name="step">The number of steps.</param>
    /// <param name="current">The distribution after them.</param>
    /// <param name="isSettled">Whether it stays as it is from here on.</param>
    /// <param name="reachable">How many states have a positive probability in the end.</param>
    internal void Add(long step, ReadOnlySpan<double> current, bool isSettled, int reachable)
    {
        if (IsComplete || (step < _weights.First && !isSettled))
        {
            return;
        }

        (_steps, _isSettled) = (step, isSettled);
        var weight = isSettled ? _weights.SumAfter(step - 1) : _weights[step];
        VectorLoops.AddScaled(weight, current, _sum);
        _added.Add(weight);
        _leftOut = isSettled ? _weights.LeftOut : step >= _weights.Mode ? _weights.LeftOutAfter(step) : double.PositiveInfinity;
        IsComplete = isSettled || step >= _weights.Last ||
            (_leftOut <= WorthLookingAt * _added.Value && HasAllDigits(reachable));
    }

    internal TimeDistribution<TState> ToDistribution<TState>(StateSpace<TState> states, StepPath<TState> path, StepMatrix matrix, int reachable, SolveOptions options)
        where TState : notnull
    {
        var total = _added.Value;
        var values = new double[_sum.Length];
        VectorLoops.Divide(_sum, total, values);
        var steps = _isSettled ? Math.Max(_steps, _weights.Last) : _steps;
        var roundings = (steps * StepPath<TState>.RoundingsOf(matrix)) + (2.0 * ModeWeights.RoundingsPerQuotient * _weights.Reach) + (2.0 * _weights.Values.Length) + RoundingsOfQuotient;
        var rounded = SubtractionFreeBound.OfRoundings(roundings);
        var lost = path.StaysInRange && double.IsNormal(jumps) ? SmallestProduct : SmallestProduct + (steps * (double)values.Length * (matrix.LargestIndegree + 1) * double.Epsilon);
        var absolute = (_leftOut / total * SubtractionFreeBound.SecondOrder) + lost;
        var isProof = options.CertificateLevel == CertificateLevel.Proof && double.IsFinite(rounded);
        return new TimeDistribution<TState>(states, values, time, new Certificate
        {
            Method = "uniformization",
            Reason = _isSettled
                ? "A sum over the number of steps, each with its Poisson probability; the steps ended early because they changed nothing any more."
                : "A sum over the number of steps, each with its Poisson probability; what is left out of it is part of the bound.",
            Residual = options.CertificateLevel >= CertificateLevel.Residual ? Math.Abs(CompensatedSum.Of(values) - 1) : double.PositiveInfinity,
            RelativeErrorBound = isProof ? Relative(values, rounded, absolute, time == 0 ? CountPositive(values) : reachable) : double.PositiveInfinity,
            AbsoluteErrorBound = isProof ? Math.Min(1, Upward.Add(AbsoluteBound.From(rounded, values.Max()), absolute)) : double.PositiveInfinity,
            Basis = isProof ? ErrorBasis.SubtractionFree : ErrorBasis.None,
            IsProof = isProof,
            Iterations = _steps,
        });
    }

    private bool HasAllDigits(int reachable) =>
        CountPositive(_sum) == reachable && _leftOut <= NoDigitLost * StepPath<int>.SmallestPositive(_sum);

    /// <summary>An entry x̂ ≥ 2 A that is off by at most ρ x + A is off by at most (ρ + 2.02 A / x̂) x.</summary>
    private static double Relative(double[] values, double rounded, double absolute, int reachable)
    {
        var smallest = StepPath<int>.SmallestPositive(values);
        return CountPositive(values) == reachable && absolute <= smallest / 2
            ? Upward.Add(rounded, 2.02 * absolute / smallest)
            : double.PositiveInfinity;
    }

    private static int CountPositive(ReadOnlySpan<double> values)
    {
        var count = 0;
        foreach (var value in values)
        {
            count += value > 0 ? 1 : 0;
        }

        return count;
    }
}
