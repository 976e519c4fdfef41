using System.Globalization;

namespace Stochastic.Chains.Tests.Support;

/// <summary>Runs the code inside a using statement in a culture that writes 0,5 for a half.</summary>
internal sealed class CommaCulture : IDisposable
{
    private readonly CultureInfo _before = CultureInfo.CurrentCulture;

    internal CommaCulture()
    {
        CultureInfo.CurrentCulture = CultureInfo.GetCultureInfo("de-DE");
        0.5.ToString(CultureInfo.CurrentCulture).Should().Be("0,5", "the culture data must be there for the test to mean anything");
    }

    public void Dispose() => CultureInfo.CurrentCulture = _before;
}
