using System.Numerics;

namespace Stochastic.Chains.Tests.Support;

/// <summary>An integer split as odd · 2^shift, so that a wide but sparse one (a scaled double) is cheap to reduce modulo a prime.</summary>
internal readonly struct ScaledInteger
{
    private readonly BigInteger _odd;
    private readonly ulong _shortOdd;
    private readonly int _shift;

    public ScaledInteger(BigInteger value)
    {
        Value = value;
        _shift = value.IsZero ? 0 : (int)BigInteger.TrailingZeroCount(value);
        _odd = value >> _shift;
        _shortOdd = _odd <= ulong.MaxValue ? (ulong)_odd : 0;
    }

    public BigInteger Value { get; }

    public ulong In(PrimeField field)
    {
        var odd = _shortOdd != 0 ? field.FromInteger(_shortOdd) : field.FromInteger(_odd);
        return _shift == 0 ? odd : field.Multiply(odd, field.PowerOfTwo(_shift));
    }
}
