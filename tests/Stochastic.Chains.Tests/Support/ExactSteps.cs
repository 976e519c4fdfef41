using System.Numerics;

namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// Distributions after n steps. A row is its off-diagonals and its <see cref="SelfLoop"/>, divided by their sum; everything exact, so
/// the number of digits grows with every step (see <see cref="RoundedSteps"/> for many steps).
/// </summary>
internal sealed partial class ExactChain
{
    /// <summary>One row of the step matrix: integer weights, the self-loop included, and their sum.</summary>
    public (IReadOnlyList<(int To, BigInteger Weight)> Moves, BigInteger Sum) StepRow(int state)
    {
        var row = _rows[state];
        var moves = row.Moves.Select(move => (move.To, move.Amount.Value)).ToList();
        var loop = HasSelfLoop(state) && row.Scale > row.Outflow ? row.Scale - row.Outflow : BigInteger.Zero;
        if (!loop.IsZero)
        {
            moves.Add((state, loop));
        }

        var sum = row.Outflow + loop;
        return sum.Sign > 0
            ? (moves, sum)
            : throw new InvalidOperationException($"State {state} has neither a move nor a self-loop: it cannot make a step.");
    }

    public Rational[] NStepRow(int start, int steps)
    {
        var initial = new Rational[StateCount];
        initial[start] = 1;
        return NStepDistribution(initial, steps);
    }

    public Rational[] NStepDistribution(IReadOnlyList<Rational> initial, int steps)
    {
        var rows = Enumerable.Range(0, StateCount).Select(StepRow).ToArray();
        var common = initial.Aggregate(BigInteger.One, (multiple, value) => LeastCommonMultiple(multiple, value.Denominator));
        var mass = initial.Select(value => value.Numerator * (common / value.Denominator)).ToArray();
        for (var step = 0; step < steps; step++)
        {
            var lift = BigInteger.One;
            for (var state = 0; state < StateCount; state++)
            {
                lift = mass[state].IsZero ? lift : LeastCommonMultiple(lift, rows[state].Sum);
            }

            var next = new BigInteger[StateCount];
            for (var state = 0; state < StateCount; state++)
            {
                var share = mass[state].IsZero ? BigInteger.Zero : mass[state] * (lift / rows[state].Sum);
                foreach (var (to, weight) in share.IsZero ? [] : rows[state].Moves)
                {
                    next[to] += share * weight;
                }
            }

            mass = next;
            common *= lift;
        }

        return Array.ConvertAll(mass, value => new Rational(value, common));
    }

    public Rational[,] NStepMatrix(int steps)
    {
        var result = new Rational[StateCount, StateCount];
        for (var from = 0; from < StateCount; from++)
        {
            var row = NStepRow(from, steps);
            for (var to = 0; to < StateCount; to++)
            {
                result[from, to] = row[to];
            }
        }

        return result;
    }

    private static BigInteger LeastCommonMultiple(BigInteger left, BigInteger right) =>
        left == right ? left : left / BigInteger.GreatestCommonDivisor(left, right) * right;
}
