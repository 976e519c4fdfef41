using System.Text.Json;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.SupportTests;

/// <summary>The oracle against every published value it can answer: equal to the fraction, or rounding to all 17 digits.</summary>
public class PublishedAnswersTests
{
    public static TheoryData<string> QueryNames => [.. PublishedAnswers.ByQuery.Keys];

    [Theory]
    [MemberData(nameof(QueryNames))]
    public void Oracle_gives_the_published_values(string name)
    {
        var queries = PublishedCases.Queries(name).ToArray();
        queries.Should().NotBeEmpty();
        foreach (var query in queries)
        {
            var pairs = PublishedAnswers.ByQuery[name](query).ToArray();

            pairs.Should().HaveCount(CountOfNumbers(query.Values), query.ToString());
            foreach (var (published, exact) in pairs)
            {
                published.IsRoundingOf(exact).Should().BeTrue(
                    "{0} is {1} there and {2} here; source: {3}", query, published, exact.ToDouble(), query.Case);
            }
        }
    }

    [Fact]
    public void Both_riffle_chains_have_the_published_stationary_distribution()
    {
        var query = PublishedCases.Named("RIFFLE-52").Queries.Single(candidate => candidate.Name == "stationary");
        var descents = ShuffleRules.RiffleDescents(52).ToExact().Stationary();
        var rising = ShuffleRules.RiffleRisingSequences(52).ToExact().Stationary();

        rising.Should().Equal(descents);
        query.Vector().Zip(query.States("states")).Should().OnlyContain(pair => pair.First.IsRoundingOf(descents[pair.Second]));
    }

    [Fact]
    public void Repair_straight_to_both_up_gives_the_published_stationary_distribution()
    {
        var query = PublishedCases.Queries("stationary_full_renewal").Single();
        var exact = new ExactChain(
            3,
            query.Chain().OffDiagonals.Select(move => (move.From, move.From == 2 ? 0 : move.To, move.Probability)),
            [0, 1, 2]).Stationary();

        query.Vector().Zip(exact).Should().OnlyContain(pair => pair.First.IsRoundingOf(pair.Second));
    }

    [Fact]
    public void Answers_cover_most_of_the_collection()
    {
        var answered = PublishedAnswers.ByQuery.Keys.SelectMany(PublishedCases.Queries).ToArray();

        PublishedAnswers.ByQuery.Should().HaveCountGreaterThanOrEqualTo(33);
        answered.Should().HaveCountGreaterThanOrEqualTo(194);
        answered.Select(query => query.Case.Id).Distinct().Should().HaveCountGreaterThanOrEqualTo(45);
        answered.Sum(query => CountOfNumbers(query.Values)).Should().BeGreaterThanOrEqualTo(1231);
    }

    private static int CountOfNumbers(JsonElement values) => values.ValueKind switch
    {
        JsonValueKind.Array => values.EnumerateArray().Sum(CountOfNumbers),
        JsonValueKind.Object => values.EnumerateObject().Sum(member => CountOfNumbers(member.Value)),
        _ => 1,
    };
}
