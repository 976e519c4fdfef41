using System.Globalization;
using System.Numerics;

namespace Stochastic.Chains.Tests.Support;

/// <summary>Reading and writing: "a/b", decimals and exponents such as "1e-8" or ".438", always culture-invariant.</summary>
internal readonly partial struct Rational
{
    public static Rational Parse(string text)
    {
        ArgumentNullException.ThrowIfNull(text);
        var slash = text.IndexOf('/', StringComparison.Ordinal);
        return slash < 0
            ? ParseDecimal(text)
            : (ParseDecimal(text[..slash]) / ParseDecimal(text[(slash + 1)..]));
    }

    public override string ToString()
    {
        var reduced = Reduced();
        return reduced.Denominator.IsOne
            ? reduced.Numerator.ToString(CultureInfo.InvariantCulture)
            : string.Create(CultureInfo.InvariantCulture, $"{reduced.Numerator}/{reduced.Denominator}");
    }

    private static Rational ParseDecimal(string text)
    {
        var trimmed = text.Trim();
        var mark = trimmed.IndexOfAny(['e', 'E']);
        var exponent = mark < 0
            ? 0
            : int.Parse(trimmed.AsSpan(mark + 1), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture);
        var significand = mark < 0 ? trimmed : trimmed[..mark];
        var point = significand.IndexOf('.', StringComparison.Ordinal);
        if (point >= 0)
        {
            exponent -= significand.Length - point - 1;
            significand = significand.Remove(point, 1);
        }

        if (!BigInteger.TryParse(significand, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out var digits))
        {
            throw new FormatException($"'{text}' is not a fraction, a decimal or a number with an exponent.");
        }

        var scale = BigInteger.Pow(10, Math.Abs(exponent));
        return (exponent < 0 ? new Rational(digits, scale) : new Rational(digits * scale, BigInteger.One)).Reduced();
    }
}
