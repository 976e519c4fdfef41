namespace Stochastic.Chains.Tests.Support;

/// <summary>Holds an answer against its own certificate: no entry is off by more than its bounds, and what cannot be is exactly zero.</summary>
internal static class Enclosure
{
    /// <summary>Checks every entry against the exact one.</summary>
    public static void Check(IReadOnlyList<Rational> exact, ReadOnlySpan<double> computed, Certificate certificate, string because) =>
        Check(exact, computed, certificate, because, _ => 0);

    /// <summary>Checks every entry against one that itself is known to within so much.</summary>
    public static void Check(
        IReadOnlyList<Rational> exact, ReadOnlySpan<double> computed, Certificate certificate, string because, Func<Rational, Rational> knownTo)
    {
        computed.Length.Should().Be(exact.Count);
        certificate.IsProof.Should().BeTrue(because);
        for (var k = 0; k < exact.Count; k++)
        {
            Check(exact[k], computed[k], certificate, because, knownTo(exact[k]));
        }
    }

    /// <summary>Checks one entry against the exact one.</summary>
    public static void Check(Rational exact, double computed, Certificate certificate, string because) =>
        Check(exact, computed, certificate, because, 0);

    private static void Check(Rational exact, double computed, Certificate certificate, string because, Rational known)
    {
        if (exact.IsZero)
        {
            computed.Should().Be(0, because);
            return;
        }

        var error = Rational.Abs(exact - Rational.FromDouble(computed));
        (error <= Rational.FromDouble(certificate.AbsoluteErrorBound) + known)
            .Should().BeTrue("{0} is {1}, bound {2}; {3}", computed, exact.ToDouble(), certificate.AbsoluteErrorBound, because);
        if (double.IsFinite(certificate.RelativeErrorBound))
        {
            (error <= (Rational.FromDouble(certificate.RelativeErrorBound) * exact) + known)
            .Should().BeTrue("{0} is {1}, relative bound {2}; {3}", computed, exact.ToDouble(), certificate.RelativeErrorBound, because);
        }
    }
}
