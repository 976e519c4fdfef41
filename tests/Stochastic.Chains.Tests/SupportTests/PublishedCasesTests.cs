using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.SupportTests;

public class PublishedCasesTests
{
    private static readonly string[] ChainQueries =
    [
        "stationary", "classes", "cyclic_classes", "hitting_mean", "absorption_mean", "absorption_probabilities",
        "class_absorption_probability", "nstep_row", "nstep_distribution", "nstep_matrix", "mean_recurrence", "mean_first_passage",
        "transition_estimate",
    ];

    [Fact]
    public void Every_case_says_where_it_comes_from()
    {
        PublishedCases.All.Should().HaveCount(47).And.OnlyHaveUniqueItems(published => published.Id);
        PublishedCases.All.Should().OnlyContain(published =>
            published.Source.Length > 0 && published.Title.Length > 0 && published.Queries.Count > 0 && published.Capabilities.Count > 0
            && (published.IsOwnMaking || published.Provenance.Length > 0));
        PublishedCases.All.Select(published => published.SuggestedRelativeTolerance).Should().OnlyContain(tolerance =>
            tolerance > 0 && tolerance < 1e-9);
        PublishedCases.Named("KS-WEATHER").ToString().Should().StartWith("KS-WEATHER").And.Contain("Kemeny, J. G. & Snell, J. L.");
    }

    [Fact]
    public void Every_question_about_a_chain_loads_its_chain()
    {
        var queries = ChainQueries.SelectMany(PublishedCases.Queries).ToArray();
        foreach (var query in queries)
        {
            var chain = query.Chain();
            var outflows = chain.OffDiagonals.Concat(chain.SelfLoops).GroupBy(move => move.From, move => move.Probability).ToArray();

            outflows.Should().HaveCount(chain.StateCount, query.ToString());
            if (query.Case.Id != "STRESS-ORDER")
            {
                outflows.Should().OnlyContain(row => Rational.Sum(row) == Rational.One, query.ToString());
            }

            chain.Transitions.Should().OnlyContain(move => move.Probability > 0 && move.Probability <= 1, query.ToString());
        }

        queries.Should().HaveCountGreaterThanOrEqualTo(110);
    }

    [Fact]
    public void A_row_of_the_elimination_order_case_sums_to_slightly_more_than_one()
    {
        var chain = PublishedCases.Named("STRESS-ORDER").Queries[0].Chain();

        chain.SelfLoops.Select(loop => loop.From).Should().Equal(0, 3);
        Rational.Sum(chain.OffDiagonals.Where(move => move.From == 2).Select(move => move.Probability))
            .Should().Be(1 + Rational.Pow(10, -200));
    }

    [Fact]
    public void Continuous_time_gives_its_rates_back()
    {
        var chain = PublishedCases.Named("REL-1OO2").Queries[0].Chain();

        chain.Rates.Should().Equal(
            (0, 1, new Rational(2, 25000)), (1, 0, new Rational(1, 16)), (1, 2, new Rational(1, 25000)), (2, 1, new Rational(1, 16)));
    }

    [Fact]
    public void A_case_of_several_matrices_gives_each_by_name()
    {
        var published = PublishedCases.Named("EMBED-NOT");

        PublishedInput.Matrix(published, "A").ToMatrix().Should().BeEquivalentTo(new[,] { { 0.375, 0.625 }, { 0.875, 0.125 } });
        FluentActions.Invoking(published.Queries[0].Chain).Should().Throw<InvalidOperationException>();
    }

    [Fact]
    public void Observed_counts_are_kept_and_groups_are_added_up()
    {
        PublishedInput.Counts(PublishedCases.Named("RAIN-HOMOGENEITY")).Should().BeEquivalentTo(
            PublishedInput.Counts(PublishedCases.Named("RAIN-TELAVIV")), options => options.WithStrictOrdering());
        FluentActions.Invoking(() => PublishedInput.Counts(PublishedCases.Named("MM1K"))).Should().Throw<InvalidOperationException>();
    }

    [Fact]
    public void Numbers_know_their_own_rounding()
    {
        var third = new PublishedNumber("0.33333333333333333", null);

        third.IsRoundingOf(new(1, 3)).Should().BeTrue();
        third.IsRoundingOf(Rational.Parse("0.333333333333333331")).Should().BeTrue();
        third.IsRoundingOf(Rational.Parse("0.33333333333333339")).Should().BeFalse();
        new PublishedNumber("0", null).IsRoundingOf(Rational.Parse("1e-300")).Should().BeFalse();
        new PublishedNumber("0.5", "1/2").IsRoundingOf(Rational.Parse("0.50000000000000000001")).Should().BeFalse();
        new PublishedNumber("1.2397999308571486E-68", null).IsRoundingOf(Rational.Parse("1.23979993085714855e-68")).Should().BeTrue();
    }
}
