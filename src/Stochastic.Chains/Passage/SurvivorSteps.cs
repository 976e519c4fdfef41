using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>
/// Follows step by step those that are still on their way: who arrives at a target with this step, who has lost the way to it, who goes
/// on. Everything is added up from non-negative numbers; nobody is counted by subtraction.
/// </summary>
internal sealed class SurvivorSteps
{
    /// <summary>Beside the additions of a step: the row sum, the division by it, the stay, and the product.</summary>
    private const int RoundingsPerStep = 8;
    private const double UnitRoundoff = 1.1102230246251565e-16;

    private readonly StepMatrix _steps;
    private readonly int[] _targets;
    private readonly int[] _lost;
    private double[] _previous;
    private double[] _current;
    private CompensatedSum _arrived;
    private CompensatedSum _gone;

    /// <summary>Starts in one state.</summary>
    /// <param name="steps">The matrix of a step.</param>
    /// <param name="targets">Where to arrive.</param>
    /// <param name="lost">From where a target is out of reach.</param>
    /// <param name="start">The state to start in.</param>
    internal SurvivorSteps(StepMatrix steps, int[] targets, int[] lost, int start)
    {
        _steps = steps;
        _targets = targets;
        _lost = lost;
        _previous = new double[steps.Size];
        _current = new double[steps.Size];
        _current[start] = 1;
        TakeOut();
    }

    /// <summary>The probability of arriving with exactly the last step.</summary>
    internal double ArrivedNow { get; private set; }

    /// <summary>The probability of losing the way with exactly the last step.</summary>
    internal double LostNow { get; private set; }

    /// <summary>The probability of having arrived.</summary>
    internal double Arrived => _arrived.Value;

    /// <summary>The probability of having lost the way.</summary>
    internal double Lost => _gone.Value;

    /// <summary>The probability of being on the way.</summary>
    internal double OnTheWay { get; private set; }

    /// <summary>Whether every product so far was a normal number, so that all roundings are relative.</summary>
    internal bool StaysInRange { get; private set; } = true;

    /// <summary>The largest number of roundings that one step adds to a probability.</summary>
    internal double RoundingsOfStep => _steps.LargestIndegree + _steps.StayRoundings + RoundingsPerStep + 1;

    internal void Step()
    {
        StaysInRange = StaysInRange && SmallestPositive(_current) * _steps.SmallestProbability >= NormalRange.Smallest;
        _steps.Multiply(_current, _previous);
        (_previous, _current) = (_current, _previous);
        TakeOut();
    }

    /// <summary>
    /// The factor by which each further step shrinks everything on the way, when the last step shrank every state alike but for rounding.
    /// With v the row before the step and a v ≤ v Q ≤ b v in each entry, the same holds after any number of steps, for Q is
    /// not negative: what arrives after k more steps lies between aᵏ and bᵏ times what arrives now. b / a − 1 is at most
    /// 4 roundings of a step, so k steps continued by the factor are off by no more than as many steps made.
    /// </summary>
    internal bool TryFindFactor(out double factor)
    {
        factor = 0;
        if (OnTheWay == 0)
        {
            return true;
        }

        var (least, most) = (double.PositiveInfinity, 0.0);
        for (var state = 0; state < _current.Length; state++)
        {
            if (_previous[state] > 0 || _current[state] > 0)
            {
                var ratio = _current[state] / _previous[state];
                least = Math.Min(least, ratio);
                most = Math.Max(most, ratio);
            }
        }

        factor = (least + most) / 2;
        return StaysInRange && least > 0 && double.IsFinite(most) && most - least <= 2 * RoundingsOfStep * UnitRoundoff * least;
    }

    private static double SmallestPositive(double[] values)
    {
        var smallest = double.PositiveInfinity;
        foreach (var value in values)
        {
            smallest = value > 0 && value < smallest ? value : smallest;
        }

        return smallest;
    }

    private void TakeOut()
    {
        ArrivedNow = TakeOut(_targets);
        LostNow = TakeOut(_lost);
        _arrived.Add(ArrivedNow);
        _gone.Add(LostNow);
        OnTheWay = CompensatedSum.Of(_current);
    }

    private double TakeOut(int[] states)
    {
        var taken = default(CompensatedSum);
        foreach (var state in states)
        {
            taken.Add(_current[state]);
            _current[state] = 0;
        }

        return taken.Value;
    }
}
