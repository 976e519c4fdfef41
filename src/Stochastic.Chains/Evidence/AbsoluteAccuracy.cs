namespace Stochastic.Chains;

/// <summary>Lets only proved results through, by their absolute error.</summary>
public static class AbsoluteAccuracy
{
    /// <summary>Returns the result itself when every entry is proved to be within an absolute error, and throws otherwise.</summary>
    /// <typeparam name="TResult">The type of the result.</typeparam>
    /// <param name="result">The result.</param>
    /// <param name="absoluteError">The largest absolute error of any entry to let through, above 0. Name the argument: there is a twin for relative errors.</param>
    /// <exception cref="ArgumentOutOfRangeException">The error is not above 0.</exception>
    /// <exception cref="AccuracyException">The certificate is no proof, or its bound is larger.</exception>
    /// <example><code>double share = chain.Stationary().Require(absoluteError: 1e-9)["in repair"];</code></example>
    public static TResult Require<TResult>(this TResult result, double absoluteError)
        where TResult : ICertified
    {
        ArgumentNullException.ThrowIfNull(result);
        RequiredAccuracy.Check(result.Certificate, "absolute", result.Certificate.AbsoluteErrorBound, absoluteError);
        return result;
    }
}
