using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>
/// The right-hand sides of the equations of variances, A · V = s: from state i a step to j changes the expected total by
/// d = 1 + h_j − h_i (in continuous time by h_j − h_i), and s_i is the mean of d², the stay included. Squares are added up; the
/// difference of two large moments, which loses everything where times hardly vary, is never taken.
/// </summary>
/// <param name="chain">The chain.</param>
/// <param name="means">The mean times h by state, finite wherever a member can go.</param>
/// <param name="meansError">A bound on the relative error of each mean time.</param>
internal sealed class SquaredDeviations<TState>(Chain<TState> chain, double[] means, double meansError)
    where TState : notnull
{
    /// <summary>Three roundings of a deviation and one of its sum with the others, as a factor of the sizes that meet in it.</summary>
    private const double DeviationError = 4.4408920985006262e-16;
    private const double SmallestSum = 1e-200;
    private const double UnitRoundoff = 1.1102230246251565e-16;
    private const double Inflation = 1.01;

    private readonly StepMatrix _steps = StepMatrix.Of(chain);
    private readonly double _step = chain.UniformizationRate is null ? 1 : 0;

    /// <summary>s_i, and a bound on how far it is from the exact mean of squares.</summary>
    internal (ScaledDoubleDouble Sum, ScaledDoubleDouble Error) Of(int state)
    {
        if (IsCertainMove(state))
        {
            return (default, default);
        }

        var largest = _step;
        foreach (var (to, _) in chain.Matrix.Row(state))
        {
            largest = Math.Max(largest, Math.Max(Math.Abs(Deviation(state, to)), means[to] * meansError));
        }

        largest = Math.Max(largest, means[state] * meansError);
        if (largest == 0)
        {
            return (default, default);
        }

        var exponent = Math.ILogB(largest);
        var (sum, error) = Scaled(state, exponent);
        if (sum < SmallestSum)
        {
            return Careful(state);
        }

        var unit = Power(exponent);
        return (unit * unit * sum, unit * unit * error);
    }

    /// <summary>A step that can only go one way changes the expected total by nothing at all.</summary>
    private bool IsCertainMove(int state)
    {
        var moves = 0;
        var isOne = false;
        foreach (var (_, probability) in chain.Matrix.Row(state))
        {
            moves++;
            isOne = probability == 1;
        }

        return moves == 1 && isOne && _step == 1;
    }

    private static ScaledDoubleDouble Power(int exponent)
    {
        var half = exponent / 2;
        return (ScaledDoubleDouble)Math.ScaleB(1, half) * Math.ScaleB(1, exponent - half);
    }

    private double Deviation(int from, int to) => to == from ? _step : _step + means[to] - means[from];

    /// <summary>What rounding and the errors of both means can add to a deviation.</summary>
    private double DeviationErrorOf(int from, int to) => to == from
        ? 0
        : (meansError * (1 + (2 * meansError)) * (means[from] + means[to])) + (DeviationError * (_step + means[from] + means[to]));

    private double Probability(int from, int to, double given) => to == from ? _steps.Stay(from) : given;

    /// <summary>The relative error of a probability: none where it was given, that of one minus a sum where it is a stay.</summary>
    private double ProbabilityError(int from, int to) => to == from ? _steps.StayRoundings * UnitRoundoff : 0;

    private (double Sum, double Error) Scaled(int state, int exponent)
    {
        var (sum, error, terms) = (0.0, 0.0, 0);
        foreach (var (to, given) in chain.Matrix.Row(state))
        {
            var probability = Probability(state, to, given);
            var deviation = Math.ScaleB(Math.Abs(Deviation(state, to)), -exponent);
            var uncertainty = Math.ScaleB(DeviationErrorOf(state, to), -exponent);
            sum += probability * deviation * deviation;
            error += probability * ((uncertainty * ((2 * deviation) + uncertainty)) + (ProbabilityError(state, to) * deviation * deviation));
            terms++;
        }

        return (sum, (error * Inflation) + (sum * (terms + 4) * DeviationError));
    }

    /// <summary>The same where squares of some deviations, or their products with rare moves, leave the range of doubles.</summary>
    private (ScaledDoubleDouble Sum, ScaledDoubleDouble Error) Careful(int state)
    {
        var (sum, error) = (default(ScaledDoubleDouble), default(ScaledDoubleDouble));
        foreach (var (to, given) in chain.Matrix.Row(state))
        {
            ScaledDoubleDouble probability = Probability(state, to, given);
            ScaledDoubleDouble deviation = Math.Abs(Deviation(state, to));
            ScaledDoubleDouble uncertainty = DeviationErrorOf(state, to);
            sum += probability * deviation * deviation;
            error += probability * ((uncertainty * (deviation + deviation + uncertainty)) + (deviation * deviation * ProbabilityError(state, to)));
        }

        return (sum, (error * Inflation) + (sum * DeviationError));
    }
}
