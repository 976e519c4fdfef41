namespace Stochastic.Chains.Internal;

/// <summary>Messages about accuracy and convergence.</summary>
internal static partial class Messages
{
    internal const string RequiredErrorOutOfRange = "The required error must be above 0.";
    internal const string ToleranceOutOfRange = "The tolerance must be above 0 and below 1.";

    internal static string NotProved(string kind, double required, double bound, bool isProof, string certificate) =>
        $"A {kind} error of at most {Text.Short(required)} is required, but {(isProof ? $"only {Text.Short(bound)} is proved" : "nothing is proved")} ({certificate}). " +
        "Ask a direct method with CertificateLevel.Proof, or require less.";

    internal static string NotConverged(string method, long iterations, double residual, string advice) =>
        $"The {method} did not reach its tolerance in {Text.Count(iterations, "iteration", "iterations")}; " +
        $"its residual is {Text.Short(residual)}. {advice}";

    internal static string NotPositive(string method, object state, double value) =>
        $"The {method} returned {Text.Number(value)} for {Text.Quoted(state)}, whose long-run share is certainly positive. " +
        "The chain is too ill-conditioned for this method. Ask EliminationMethod, which cannot lose the sign.";

    internal static string WrongLength(string method, int length, int expected) =>
        $"The {method} returned {Text.Count(length, "number", "numbers")} for {Text.Count(expected, "state", "states")}. Return one for each state of the problem.";

    internal static string EigenNotConverged(string method, int states) =>
        $"The {method} found no eigenvalues for {Text.Count(states, "state", "states")} within its cap. Ask EliminationMethod.";
}
