namespace Stochastic.Chains.Kernels;

/// <summary>The flows x_i p_ij of a vector through the moves of a chain, added up at their ends without rounding.</summary>
internal static class ExactFlows
{
    private const int WordBits = 64;
    private const int LeadingBits = 11;

    /// <summary>Adds inflow − outflow of every state.</summary>
    internal static void AddImbalances<TRows>(TRows rows, ReadOnlySpan<int> states, ReadOnlySpan<double> values, ExactSums sums)
        where TRows : struct, IRateRows
    {
        foreach (var from in states)
        {
            var weight = Significand.Of(values[from]);
            var rates = rows.Rates(from);
            for (var position = 0; position < rates.Length; position++)
            {
                var to = rows.Column(from, position);
                if (rates[position] != 0 && to != from)
                {
                    var rate = Significand.Of(rates[position]);
                    var high = Math.BigMul(weight.Bits, rate.Bits, out var low);
                    sums.Move(from, to, new UInt128(high, low), weight.Exponent + rate.Exponent, 1);
                }
            }
        }
    }

    /// <summary>
    /// Adds the effect of changing each flow by (q_i − q_j) / 2^precision of itself, cut off towards zero to an integer multiple of a power
    /// of two that depends on its rate and weight; returns the largest |q_i − q_j|.
    /// </summary>
    internal static long AddSpread<TRows>(
        TRows rows, ReadOnlySpan<int> states, ReadOnlySpan<double> values, long[] potentials, int precision, ExactSums sums)
        where TRows : struct, IRateRows
    {
        var widest = 0L;
        foreach (var from in states)
        {
            var weight = Significand.Of(values[from]);
            var leading = weight.Bits << LeadingBits;
            var potential = potentials[from];
            var rates = rows.Rates(from);
            for (var position = 0; position < rates.Length; position++)
            {
                var to = rows.Column(from, position);
                var difference = potential - potentials[to];
                if (rates[position] != 0 && difference != 0)
                {
                    var size = Math.Abs(difference);
                    widest = Math.Max(widest, size);
                    var rate = Significand.Of(rates[position]);
                    var flow = Math.BigMul(leading, rate.Bits << LeadingBits, out _);
                    var change = Math.BigMul(flow, (ulong)size, out _);
                    var exponent = weight.Exponent + rate.Exponent + (2 * (WordBits - LeadingBits)) - precision;
                    sums.Move(from, to, change, exponent, Math.Sign(difference));
                }
            }
        }

        return widest;
    }
}
