using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Stationary;

/// <summary>Published long-run shares of states of one recurrent class, and the chain that they belong to.</summary>
/// <param name="Query">Where they are published.</param>
/// <param name="Chain">The whole chain; where it has several recurrent classes, the class alone.</param>
/// <param name="Shares">The shares that are published: of all states, or of some.</param>
internal sealed record PublishedShares(PublishedQuery Query, Chain<int> Chain, IReadOnlyList<(int State, Rational Share)> Shares)
{
    /// <summary>For more states than this the exact answer of the chain as rounded to doubles takes too long.</summary>
    private const int LargestExact = 64;

    /// <summary>All of the collection, mean times of return counting as one over a share.</summary>
    public static IReadOnlyList<PublishedShares> All { get; } =
    [
        .. PublishedCases.Queries("stationary").Concat(PublishedCases.Queries("restart_ranking")).Select(query => Of(query, query.Vector(), "states")),
        .. PublishedCases.Queries("loss_probability").Select(query => Of(query, [(query.Chain().StateCount - 1, query.Scalar().Value)])),
        .. PublishedCases.Queries("mean_recurrence").Select(MeanRecurrence),
        .. PublishedCases.Queries("stationary_by_class").SelectMany(query => query.Matrix().Zip(query.StateLists("classes"), (shares, states) =>
            Of(query, [.. states.Zip(shares, (state, share) => (state, share.Value))]))),
    ];

    /// <summary>The published chains with several recurrent classes.</summary>
    public static IReadOnlyList<Chain<int>> WithSeveralClasses { get; } =
    [
        .. PublishedCases.All.SelectMany(published => published.Queries)
            .Where(query => query.Name is "stationary_by_class" or "absorption_probabilities" or "classes" && query.Case.InputKind is "dtmc_dense" or "dtmc_triplets")
            .Select(query => query.Chain().ToStepChain())
            .Where(chain => chain.Structure().RecurrentClasses.Count > 1),
    ];

    /// <summary>
    /// The exact shares of the chain with its probabilities as the doubles they are, which is what a certificate speaks of; null for a
    /// large chain.
    /// </summary>
    public Rational[]? ExactAsGiven() => Chain.StateCount > LargestExact
        ? null
        : ExactChain.FromTransitions(
            Chain.StateCount,
            Chain.Transitions.Select(move => (Chain.States.IndexOf(move.From), Chain.States.IndexOf(move.To), move.Probability))).Stationary();

    public override string ToString() => $"{Query}; source: {Query.Case}";

    private static PublishedShares MeanRecurrence(PublishedQuery query)
    {
        var argument = query.HasArgument("states") ? "states" : "state";
        var shares = query.Vector().Select(mean => 1 / mean.Value);
        var states = query.HasArgument(argument) ? query.States(argument) : [.. Enumerable.Range(0, query.Chain().StateCount)];
        return Of(query, [.. states.Zip(shares)]);
    }

    private static PublishedShares Of(PublishedQuery query, PublishedNumber[] shares, string argument)
    {
        var states = query.HasArgument(argument) ? query.States(argument) : Enumerable.Range(0, shares.Length);
        return Of(query, [.. states.Zip(shares, (state, share) => (state, share.Value))]);
    }

    private static PublishedShares Of(PublishedQuery query, (int State, Rational Share)[] shares)
    {
        var chain = query.Chain().ToChain();
        var structure = chain.Structure();
        if (structure.RecurrentClasses.Count > 1)
        {
            var members = structure.ClassOf(shares[0].State).States;
            chain = Stochastic.Chains.Chain.FromTransitions(members, chain.Transitions.Where(move => members.Contains(move.From)));
        }

        return new(query, chain, shares);
    }
}
