using System.Globalization;

namespace Stochastic.Chains;

/// <summary>The evidence that comes with a result: how it was computed, and how far it can be off.</summary>
/// <remarks>
/// The probabilities of the chain are taken as exact; what a certificate bounds is the error of computing with them, not the
/// uncertainty of having estimated them. Bounds are +∞ where there is none, never NaN.
/// </remarks>
/// <example>
/// <code>
/// StationaryDistribution&lt;string&gt; shares = chain.Stationary();
/// Certificate proof = shares.Certificate;
/// Console.WriteLine($"{proof.Method}: every share within {proof.RelativeErrorBound:G2} of itself, {proof.Reason}");
/// </code>
/// </example>
public sealed record Certificate
{
    private readonly ErrorBasis? _absoluteBasis;

    /// <summary>Gets the method that computed the result, by its published name.</summary>
    public required string Method { get; init; }

    /// <summary>Gets why this method was taken, in a sentence.</summary>
    public required string Reason { get; init; }

    /// <summary>
    /// Gets how well the returned numbers satisfy the equations that define them, re-computed from those numbers: the largest
    /// relative difference of the two sides; each result says of which equations. +∞ when it was not asked for.
    /// </summary>
    public double Residual { get; init; } = double.PositiveInfinity;

    /// <summary>Gets a bound on the relative error of every entry; +∞ when there is none.</summary>
    public double RelativeErrorBound { get; init; } = double.PositiveInfinity;

    /// <summary>Gets a bound on the absolute error of every entry; +∞ when there is none.</summary>
    public double AbsoluteErrorBound { get; init; } = double.PositiveInfinity;

    /// <summary>Gets what the bounds rest on: that on relative errors where there is one, else that on absolute errors.</summary>
    public ErrorBasis Basis { get; init; } = ErrorBasis.None;

    /// <summary>Gets what the bound on absolute errors rests on: the same as <see cref="Basis"/>, unless something else proves more.</summary>
    public ErrorBasis AbsoluteBasis
    {
        get => _absoluteBasis ?? Basis;
        init => _absoluteBasis = value;
    }

    /// <summary>Gets whether the bounds are proved, rounding of IEEE-754 double arithmetic included.</summary>
    public bool IsProof { get; init; }

    /// <summary>Gets the number of iterations or steps made; 0 for a direct method.</summary>
    public long Iterations { get; init; }

    /// <summary>One line with the method, the residual and the bound, the same in every culture.</summary>
    public override string ToString()
    {
        var (words, bound) = WorstError;
        return string.Create(
            CultureInfo.InvariantCulture, $"{Method}; residual {Residual:G3}; {words} {bound:G3} ({(IsProof ? "proved" : "not proved")}: {Basis})");
    }

    /// <summary>The bound on relative errors, or where there is none, that on absolute ones.</summary>
    private (string Words, double Bound) WorstError => double.IsFinite(RelativeErrorBound) ? ("relative error at most", RelativeErrorBound)
        : double.IsFinite(AbsoluteErrorBound) ? ("absolute error at most", AbsoluteErrorBound)
        : ("relative error bound", RelativeErrorBound);
}
