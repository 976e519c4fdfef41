using System.Numerics;
using System.Text.Json;

namespace Stochastic.Chains.Tests.Support;

/// <summary>An answer: the exact fraction where it was recorded, else a decimal correctly rounded to 17 significant digits.</summary>
internal readonly record struct PublishedNumber(string Decimal, string? Fraction)
{
    private const int Digits = 17;

    /// <summary>The fraction, or the rounded decimal where there is none.</summary>
    public Rational Value => Rational.Parse(Fraction ?? Decimal);

    /// <summary>
    /// Whether an exact answer is the recorded one: equal to the fraction, and within half a unit of the last place of the decimal.
    /// </summary>
    public bool IsRoundingOf(Rational exact) =>
        (Fraction is null || exact == Rational.Parse(Fraction)) && Rational.Abs(exact - Rational.Parse(Decimal)) <= HalfUnit(exact);

    public double RelativeDifference(double value) => Value.RelativeDifference(value);

    public static PublishedNumber[] List(JsonElement values, JsonElement? exact) => values.ValueKind == JsonValueKind.Array
        ? [.. values.EnumerateArray().Select((item, i) => new PublishedNumber(item.ToString(), FractionAt(exact, i)))]
        : [new(values.ToString(), exact?.GetString())];

    public override string ToString() => Fraction is null ? Decimal : $"{Decimal} = {Fraction}";

    private static string? FractionAt(JsonElement? exact, int index) => exact is { ValueKind: JsonValueKind.Array } list
        ? list[index].GetString()
        : null;

    /// <summary>Half a unit of the 17th significant digit of a value.</summary>
    private static Rational HalfUnit(Rational value)
    {
        if (value.IsZero)
        {
            return 0;
        }

        var magnitude = Rational.Abs(value);
        var exponent = (int)Math.Floor(BigInteger.Log10(magnitude.Numerator) - BigInteger.Log10(magnitude.Denominator)) - 1;
        while (Rational.Pow(10, exponent + 1) <= magnitude)
        {
            exponent++;
        }

        return Rational.Pow(10, exponent + 1 - Digits) / 2;
    }
}
