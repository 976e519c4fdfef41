namespace Stochastic.Chains;

/// <summary>Lets only proved results through, by their relative error.</summary>
public static class RelativeAccuracy
{
    /// <summary>Returns the result itself when every entry is proved to be within a relative error, and throws otherwise.</summary>
    /// <typeparam name="TResult">The type of the result.</typeparam>
    /// <param name="result">The result.</param>
    /// <param name="relativeError">The largest relative error of any entry to let through, above 0. Name the argument: there is a twin for absolute errors.</param>
    /// <exception cref="ArgumentOutOfRangeException">The error is not above 0.</exception>
    /// <exception cref="AccuracyException">The certificate is no proof, or its bound is larger.</exception>
    /// <example><code>double share = chain.Stationary().Require(relativeError: 1e-12)["in repair"];</code></example>
    public static TResult Require<TResult>(this TResult result, double relativeError)
        where TResult : ICertified
    {
        ArgumentNullException.ThrowIfNull(result);
        RequiredAccuracy.Check(result.Certificate, "relative", result.Certificate.RelativeErrorBound, relativeError);
        return result;
    }
}
