using System.Numerics;

namespace Stochastic.Chains.Tests.Support;

/// <summary>Times and probabilities of reaching a set of states.</summary>
internal sealed partial class ExactChain
{
    /// <summary>Mean steps until the target is first entered: 0 inside it, null where it is not reached with certainty.</summary>
    public Rational?[] HittingMean(params int[] target)
    {
        var states = CertainToReach(target);
        var result = WithZeroOn(target);
        if (states.Length == 0)
        {
            return result;
        }

        var system = new ExactSystem(this, states);
        var numbers = ResidueNumbers.Find(system.StepBits, field =>
        {
            var factors = system.Factor(field);
            return [factors.Determinant, .. Multiples(field, factors.Determinant, factors.SolveRight(Scales(field, system)))];
        });
        return Fill(result, states, numbers, numbers[0]);
    }

    /// <summary>
    /// The variance of the same time: A V = s with s_i = sum over j of p_ij (1 + h_j - h_i)^2, where p_ii is <see cref="SelfLoop"/>. It
    /// equals the mean square (A m = 2 h - 1) minus the squared mean whenever the row sums to one exactly; otherwise it differs by a
    /// solution of A d = change of p_ii. So the squared determinant is a common denominator.
    /// </summary>
    public Rational?[] HittingVariance(params int[] target)
    {
        var states = CertainToReach(target);
        var result = WithZeroOn(target);
        if (states.Length == 0)
        {
            return result;
        }

        var system = new ExactSystem(this, states);
        var numbers = ResidueNumbers.Find((2 * system.StepBits) + 3, field =>
        {
            var factors = system.Factor(field);
            var means = factors.SolveRight(Scales(field, system));
            var square = field.Multiply(factors.Determinant, factors.Determinant);
            return [square, .. Multiples(field, square, factors.SolveRight(SquaredJumps(field, system, means)))];
        });
        return Fill(result, states, numbers, numbers[0]);
    }

    /// <summary>The probability of ever entering the target; 1 inside it.</summary>
    public Rational[] ReachingProbability(params int[] target)
    {
        var inTarget = target.ToHashSet();
        var reaches = Structure.CanReach(target);
        int[] states = [.. Enumerable.Range(0, StateCount).Where(state => reaches[state] && !inTarget.Contains(state))];
        var result = new Rational[StateCount];
        foreach (var state in target)
        {
            result[state] = 1;
        }

        if (states.Length == 0)
        {
            return result;
        }

        var system = new ExactSystem(this, states);
        var numbers = ResidueNumbers.Find(system.DeterminantBits, field =>
        {
            var factors = system.Factor(field);
            return [factors.Determinant, .. Multiples(field, factors.Determinant, factors.SolveRight(FlowInto(field, system, inTarget)))];
        });
        for (var i = 0; i < states.Length; i++)
        {
            result[states[i]] = new(numbers[i + 1], numbers[0]);
        }

        return result;
    }

    private static ulong[] Multiples(PrimeField field, ulong factor, ulong[] values) =>
        Array.ConvertAll(values, value => field.Multiply(factor, value));

    private static Rational?[] Fill(Rational?[] result, int[] states, BigInteger[] numbers, BigInteger denominator)
    {
        for (var i = 0; i < states.Length; i++)
        {
            result[states[i]] = new Rational(numbers[i + 1], denominator);
        }

        return result;
    }

    private Rational?[] WithZeroOn(int[] target)
    {
        var result = new Rational?[StateCount];
        foreach (var state in target)
        {
            result[state] = Rational.Zero;
        }

        return result;
    }

    /// <summary>States outside the target from which no path leads, before the target, to a state that cannot reach it.</summary>
    private int[] CertainToReach(int[] target)
    {
        var inTarget = target.ToHashSet();
        var reaches = Structure.CanReach(target);
        var mayMiss = Structure.CanReach(
            Enumerable.Range(0, StateCount).Where(state => !reaches[state]),
            state => !inTarget.Contains(state));
        return [.. Enumerable.Range(0, StateCount).Where(state => !mayMiss[state] && !inTarget.Contains(state))];
    }

    private ulong[] Scales(PrimeField field, ExactSystem system) =>
        Array.ConvertAll(system.States, state => new ScaledInteger(_rows[state].Scale).In(field));

    private ulong[] FlowInto(PrimeField field, ExactSystem system, HashSet<int> target) =>
        Array.ConvertAll(system.States, state => _rows[state].Moves
            .Where(move => target.Contains(move.To))
            .Aggregate(0UL, (sum, move) => field.Add(sum, move.Amount.In(field))));

    private ulong[] SquaredJumps(PrimeField field, ExactSystem system, ulong[] means) =>
        Array.ConvertAll(system.States, state =>
        {
            var row = _rows[state];
            var sum = HasSelfLoop(state) && row.Scale > row.Outflow ? field.FromInteger(row.Scale - row.Outflow) : 0;
            var mean = means[system.PositionOf(state)];
            foreach (var move in row.Moves)
            {
                var next = system.PositionOf(move.To);
                var jump = field.Subtract(field.Add(field.One, next < 0 ? 0 : means[next]), mean);
                sum = field.Add(sum, field.Multiply(move.Amount.In(field), field.Multiply(jump, jump)));
            }

            return sum;
        });
}
