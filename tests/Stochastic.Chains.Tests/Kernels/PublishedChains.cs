namespace Stochastic.Chains.Tests.Kernels;

/// <summary>Transition matrices of published chains, row-major.</summary>
internal static class PublishedChains
{
    /// <summary>Nearly completely decomposable, eight states: Courtois, Decomposability, Academic Press 1977 (from memory).</summary>
    internal static double[] Courtois { get; } =
    [
        0.85, 0, 0.149, 0.0009, 0, 0.00005, 0, 0.00005,
        0.1, 0.65, 0.249, 0, 0.0009, 0.00005, 0, 0.00005,
        0.1, 0.8, 0.0996, 0.0003, 0, 0, 0.0001, 0,
        0, 0.0004, 0, 0.7, 0.2995, 0, 0.0001, 0,
        0.0005, 0, 0.0004, 0.399, 0.6, 0.0001, 0, 0,
        0, 0.00005, 0, 0, 0.00005, 0.6, 0.2499, 0.15,
        0.00003, 0, 0.00003, 0.00004, 0, 0.1, 0.8, 0.0999,
        0, 0.00005, 0, 0, 0.00005, 0.1999, 0.25, 0.55,
    ];

    /// <summary>
    /// The top card of four is put back at one of the four places, each as likely: Aldous and Diaconis, Amer. Math. Monthly 93 (1986)
    /// 333-348. States are the orders of the deck, 24 of them.
    /// </summary>
    internal static double[] TopToRandomOfFourCards()
    {
        var decks = (from a in "1234" from b in "1234" from c in "1234" from d in "1234" select string.Concat(a, b, c, d))
            .Where(deck => deck.Distinct().Count() == 4).ToList();
        return EigenCases.Table(24, (from, to) =>
            Enumerable.Range(0, 4).Count(place => decks[from][1..].Insert(place, decks[from][..1]) == decks[to]) / 4.0);
    }
}
