using System.Text.Json;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Published;

/// <summary>
/// The library against published values: textbooks, handbooks and papers, each case with its source and provenance beside it in
/// PublishedCases. Where a printed figure is off, the recorded exact value is what counts, and the case says so.
/// </summary>
public class PublishedValueTests
{
    public static TheoryData<string> QueryNames => [.. LibraryAnswers.ByQuery.Keys];

    [Theory]
    [MemberData(nameof(QueryNames))]
    public void Library_gives_the_published_values(string name)
    {
        var queries = PublishedCases.Queries(name).Where(IsOfOrdinarySize).ToArray();

        queries.Should().NotBeEmpty();
        foreach (var query in queries)
        {
            var pairs = LibraryAnswers.ByQuery[name](query).ToArray();

            pairs.Should().NotBeEmpty();
            foreach (var (published, computed) in pairs)
            {
                var error = LibraryAnswers.Absolute.Contains(name) ? Math.Abs(computed - published.Value.ToDouble()) : published.RelativeDifference(computed);
                error.Should().BeLessThanOrEqualTo(
                    query.Case.SuggestedRelativeTolerance, "{0} is {1} there and {2} here; source: {3}", query, published, computed, query.Case);
            }
        }
    }

    [Fact]
    public void The_sweep_covers_most_of_the_collection()
    {
        var answered = LibraryAnswers.ByQuery.Keys.SelectMany(PublishedCases.Queries).ToArray();

        answered.Should().HaveCountGreaterThanOrEqualTo(110);
        answered.Select(query => query.Case.Id).Distinct().Should().HaveCountGreaterThanOrEqualTo(40);
    }

    public static TheoryData<string> CasesWithClasses => [.. PublishedCases.Queries("classes").Where(ListsStates).Select(query => query.Case.Id)];

    [Theory]
    [MemberData(nameof(CasesWithClasses))]
    public void Library_finds_the_published_classes_and_periods(string id)
    {
        var query = PublishedCases.Named(id).Queries.Single(candidate => candidate.Name == "classes");
        var structure = query.Chain().ToChain().Structure();

        foreach (var published in query.Values.EnumerateArray())
        {
            var states = published.GetProperty("states").EnumerateArray().Select(state => state.GetInt32()).ToArray();
            var group = structure.ClassOf(states[0]);

            group.States.Should().Equal(states, query.Case.ToString());
            group.IsRecurrent.Should().Be(published.GetProperty("closed").GetBoolean(), query.Case.ToString());
            group.Period.Should().Be(published.GetProperty("period").GetInt32(), query.Case.ToString());
        }
    }

    [Fact]
    public void The_rare_route_comes_out_right_in_every_order_of_the_states()
    {
        // STRESS-ORDER, own making, exact decimal arithmetic: transitions down to 1e-300, a plain elimination underflows in one order of four.
        var published = PublishedCases.Named("STRESS-ORDER");
        var query = published.Queries.Single();
        var transitions = query.Chain().Transitions.Select(move => new Transition<int>(move.From, move.To, move.Probability)).ToArray();
        var orders = Orders([0, 1, 2, 3]).ToArray();

        orders.Should().HaveCount(24);
        foreach (var order in orders)
        {
            var shares = Chain.FromTransitions(order, transitions).Stationary();

            foreach (var (number, state) in query.Vector().Select((number, state) => (number, state)))
            {
                number.RelativeDifference(shares[state]).Should().BeLessThanOrEqualTo(published.SuggestedRelativeTolerance);
            }
        }
    }

    /// <summary>The cycle of 10,001 vertices takes a dense table of 800 MB: too much for every run, until sparse elimination answers it.</summary>
    private static bool IsOfOrdinarySize(PublishedQuery query) =>
        query.TextArgument("chain")?.Contains("10001", StringComparison.Ordinal) is not true;

    /// <summary>One case tells the number of classes in words only.</summary>
    private static bool ListsStates(PublishedQuery query) =>
        query.Values.EnumerateArray().All(group => group.GetProperty("states").ValueKind == JsonValueKind.Array);

    private static IEnumerable<int[]> Orders(int[] states) => states.Length == 0
        ? [[]]
        : states.SelectMany(first => Orders([.. states.Where(state => state != first)]).Select(rest => (int[])[first, .. rest]));
}
