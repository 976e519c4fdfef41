using System.Numerics;

namespace Stochastic.Chains.Tests.Support;

/// <summary>One move out of a state: the amount is the probability times the scale of the row, an integer.</summary>
internal readonly record struct ExactMove(int To, Rational Probability, ScaledInteger Amount);

/// <summary>The off-diagonals of one state over their common denominator (the scale), in increasing column order.</summary>
internal sealed class ExactRow
{
    public ExactRow(IEnumerable<(int To, Rational Probability)> moves)
    {
        var ordered = moves.OrderBy(move => move.To).ToArray();
        Scale = ordered.Aggregate(BigInteger.One, (scale, move) => LeastCommonMultiple(scale, move.Probability.Denominator));
        Moves = Array.ConvertAll(
            ordered,
            move => new ExactMove(
                move.To,
                move.Probability,
                new ScaledInteger(move.Probability.Numerator * (Scale / move.Probability.Denominator))));
        Outflow = Moves.Aggregate(BigInteger.Zero, (sum, move) => sum + move.Amount.Value);
    }

    public BigInteger Scale { get; }

    public ExactMove[] Moves { get; }

    /// <summary>The sum of all amounts: scale times the probability of leaving the state in one step.</summary>
    public BigInteger Outflow { get; }

    private static BigInteger LeastCommonMultiple(BigInteger left, BigInteger right) =>
        left / BigInteger.GreatestCommonDivisor(left, right) * right;
}
