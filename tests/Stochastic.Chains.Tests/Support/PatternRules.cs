namespace Stochastic.Chains.Tests.Support;

/// <summary>Waiting for something to appear in independent trials; the start is state 0, what is waited for absorbs.</summary>
internal static class PatternRules
{
    /// <summary>
    /// Fair coin tosses until one of the patterns (of H and T) appears. States are the prefixes by increasing length, the patterns last in
    /// the order given; the next state is the longest suffix of state + toss that is a prefix.
    /// </summary>
    public static PublishedChain Coin(params string[] patterns)
    {
        string[] prefixes =
        [
            .. patterns.SelectMany(pattern => Enumerable.Range(0, pattern.Length).Select(length => pattern[..length]))
                .Distinct().OrderBy(prefix => prefix.Length).ThenBy(prefix => prefix, StringComparer.Ordinal),
            .. patterns,
        ];
        var half = new Rational(1, 2);
        return PublishedChain.FromEntries(
            prefixes.Length,
            prefixes.SelectMany((prefix, from) => patterns.Contains(prefix)
                ? [(from, from, Rational.One)]
                : new[] { (from, After(prefix + "H"), half), (from, After(prefix + "T"), half) }));

        int After(string tosses) => Enumerable.Range(0, tosses.Length + 1)
            .Select(start => Array.IndexOf(prefixes, tosses[start..]))
            .First(index => index >= 0);
    }

    /// <summary>The current run of successes; a failure goes back to 0, a run of the given length absorbs.</summary>
    public static PublishedChain Run(int length, Rational success) => PublishedChain.FromEntries(
        length + 1,
        Enumerable.Range(0, length)
            .SelectMany(run => new[] { (run, run + 1, success), (run, 0, 1 - success) })
            .Append((length, length, Rational.One)));
}
