namespace Stochastic.Chains;

/// <summary>
/// An answer lies outside the range of a double (about 10⁻³⁰⁸ to 10³⁰⁸). The message names the state; no infinity or zero is
/// returned in its place.
/// </summary>
public sealed class NumericalRangeException : ArithmeticException
{
    internal NumericalRangeException(string message, string state)
        : base(message) => State = state;

    /// <summary>Gets the text of the state whose figure is out of range.</summary>
    public string State { get; }
}
