using Stochastic.Chains.Estimation;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Estimation;

/// <summary>Tests of order, homogeneity and stay lengths. Paths are invented; published tables are in the sweep of published cases.</summary>
public sealed class ChainTestTests
{
    private static readonly string[] Round = ["on", "on", "on", "off"];
    private static readonly PathOptions<string> Kept = new() { KeepsHistory = true };

    [Fact]
    public void Three_states_in_a_row_are_counted_along_each_path_and_never_across()
    {
        var counts = TransitionCounts.FromPaths([["a", "b", "a", "a", "a"], ["b", "a", "a"]], Kept);

        counts.History!["a", "b", "a"].Should().Be(1);
        counts.History["b", "a", "a"].Should().Be(2);
        counts.History["a", "a", "a"].Should().Be(1);
        counts.History["a", "a", "b"].Should().Be(0);
        counts.History.States.Should().Equal("a", "b");
        var both = (counts + counts).History!;
        both["b", "a", "a"].Should().Be(4);
        TransitionCounts.FromPaths([["a", "b"]]).History.Should().BeNull();
        (counts + TransitionCounts.FromPaths([["a", "b"]])).History.Should().BeNull();
    }

    [Fact]
    public void A_log_counts_the_same_history_as_the_paths_it_stands_for()
    {
        // Weekly boundaries: a, a, a, b, then b again for two weeks.
        static DateTimeOffset Week(int week) => new DateTimeOffset(2025, 1, 6, 0, 0, 0, TimeSpan.Zero).AddDays(7 * week);
        LogEvent<int, string>[] events = [new(1, Week(0), "a"), new(1, Week(3), "b"), new(2, Week(0), "b"), new(1, Week(5), "a"), new(2, Week(5), "b")];
        var fromLog = TransitionCounts.FromEvents(events, new LogOptions<string> { Period = LogPeriod.Weeks(1, TimeZoneInfo.Utc), KeepsHistory = true });
        var fromPaths = TransitionCounts.FromPaths([["a", "a", "a", "b", "b", "a"], ["b", "b", "b", "b", "b", "b"]], Kept);

        fromLog.Moves.Should().BeEquivalentTo(fromPaths.Moves);
        foreach (var earlier in fromPaths.States)
        {
            foreach (var from in fromPaths.States)
            {
                foreach (var to in fromPaths.States)
                {
                    fromLog.History![earlier, from, to].Should().Be(fromPaths.History![earlier, from, to], "{0} {1} {2}", earlier, from, to);
                }
            }
        }

        fromLog.History!.Recorder.Stays.Should().BeEquivalentTo(fromPaths.History!.Recorder.Stays);
    }

    [Fact]
    public void Stays_are_counted_by_the_steps_spent_so_far()
    {
        var stays = TransitionCounts.FromPaths([["a", "a", "a", "b"], ["a", "b", "a", "a"]], Kept).History!.Recorder.Stays[0];

        stays.Stays[..3].ToArray().Should().Equal(2, 1, 0);
        stays.Leaves[..4].ToArray().Should().Equal(1, 0, 1, 0);
    }

    [Fact]
    public void Very_long_stays_are_counted_together()
    {
        var stays = new StayCounts();
        stays.AddStays(98, 1000);
        stays.AddLeave(1098);

        stays.Stays[97..].ToArray().Should().Equal(1, 1, 998);
        stays.Leaves[99].Should().Be(1);
    }

    [Fact]
    public void Statistics_are_those_of_their_definitions()
    {
        var test = TransitionCounts.FromCounts(["a", "b"], new long[,] { { 30, 10 }, { 12, 28 } }).TestIndependence();

        test.DegreesOfFreedom.Should().Be(1);
        test.ChiSquare.Value.Should().BeApproximately(test.Cells.Sum(cell => Math.Pow(cell.Observed - cell.Expected, 2) / cell.Expected), Tolerances.Published);
        test.LikelihoodRatio.Value.Should().BeApproximately(2 * test.Cells.Sum(cell => cell.Observed * Math.Log(cell.Observed / cell.Expected)), Tolerances.Published);
        test.LikelihoodRatio.Value.Should().BeApproximately(2 * (test.Alternative.LogLikelihood - test.Null.LogLikelihood), Tolerances.Published);
        test.Rejects(0.05).Should().BeTrue();
        test.Warning.Should().BeNull();
        test.Finding.Should().StartWith("The next state depends on the present one").And.EndWith("with 1 degree of freedom, p < 0.001).");
        test.ToString().Should().Be(test.Finding);
    }

    [Fact]
    public void Tiny_differences_in_huge_counts_are_not_lost_to_cancellation()
    {
        // Deviations of 1 in 10^15 expected: the exact statistic is 4 · (1/2)² / 10^15, about; the naive difference of logarithms has no digit of it.
        const long Many = 1_000_000_000_000_000;
        var test = TransitionCounts.FromCounts(["a", "b"], new long[,] { { Many + 1, Many }, { Many, Many } }).TestIndependence();

        test.ChiSquare.Value.Should().BeApproximately(0.25 / Many, 1e-3 / Many);
        test.LikelihoodRatio.Value.Should().BeApproximately(0.25 / Many, 1e-3 / Many);
        test.ChiSquare.PValue.Should().BeApproximately(1, 1e-6);
    }

    [Theory]
    [InlineData(-1, 1)]
    [InlineData(0, 0)]
    [InlineData(1, 0.38629436111989062)] // 2 ln 2 − 1
    [InlineData(0.1, 0.0048411977847573460)] // 1.1 ln 1.1 − 0.1
    [InlineData(-0.1, 0.0051755359079563289)] // 0.9 ln 0.9 + 0.1
    public void Excess_is_that_of_its_formula(double deviation, double expected) =>
        ContingencyTable.Excess(deviation).Should().BeApproximately(expected, Tolerances.PrintedDigits(12));

    [Fact]
    public void A_second_order_process_is_told_from_a_chain()
    {
        // Alternating blocks: after two equal letters the other one comes; a chain of one letter cannot know.
        var forgetful = TransitionCounts.FromPaths([Enumerable.Range(0, 800).Select(step => step % 4 < 2 ? "a" : "b")], Kept);
        forgetful.TestSecondOrder().Rejects(0.001).Should().BeTrue();
        forgetful.TestSecondOrder().Finding.Should().StartWith("The state before the present one matters too");

        // An invented chain, drawn with a seed: nothing to find.
        var seeded = new Random(20260101);
        var path = new List<string> { "a" };
        while (path.Count < 4000)
        {
            var leaves = seeded.NextDouble() < (path[^1] == "a" ? 0.3 : 0.6);
            path.Add(leaves ? path[^1] == "a" ? "b" : "a" : path[^1]);
        }

        var chain = TransitionCounts.FromPaths([path], Kept);
        chain.TestSecondOrder().DegreesOfFreedom.Should().Be(2);
        chain.TestSecondOrder().LikelihoodRatio.PValue.Should().BeGreaterThan(0.05);
        chain.TestSecondOrder().Finding.Should().StartWith("No dependence on the state before");
        chain.TestStayLengths("a").LikelihoodRatio.PValue.Should().BeGreaterThan(0.05);
        chain.TestStayLengths("a").Finding.Should().StartWith("No influence of the time already spent in 'a' shows");
        chain.TestIndependence().Rejects(0.01).Should().BeTrue();
    }

    [Fact]
    public void Stays_of_fixed_length_are_not_those_of_a_chain()
    {
        var path = Enumerable.Range(0, 300).SelectMany(_ => Round);
        var test = TransitionCounts.FromPaths([path], Kept).TestStayLengths("on");

        test.Rejects(0.001).Should().BeTrue();
        test.Finding.Should().StartWith("The time already spent in 'on' matters");
        test.Cells.Select(cell => cell.Row).Distinct().Should().Equal("after 1 step", "after 2 steps", "after 3 steps");
        test.Cells.Select(cell => cell.Observed).Should().Equal(300, 0, 300, 0, 0, 300);
    }

    [Fact]
    public void Long_stays_are_taken_together_until_enough_are_expected()
    {
        var path = Enumerable.Range(0, 30).SelectMany(round => Enumerable.Repeat("on", 1 + (round % 10)).Append("off"));
        var test = TransitionCounts.FromPaths([path], Kept).TestStayLengths("on");

        test.SmallestExpected.Should().BeGreaterThanOrEqualTo(5);
        test.Cells.Last().Row.Should().EndWith("or more");
        test.Cells.Sum(cell => cell.Observed).Should().Be(Enumerable.Range(0, 30).Sum(round => 1 + (round % 10)));
    }

    [Fact]
    public void Groups_that_move_alike_share_a_chain_and_others_do_not()
    {
        var one = TransitionCounts.FromCounts(["a", "b"], new long[,] { { 60, 40 }, { 30, 70 } });
        var like = TransitionCounts.FromCounts(["a", "b"], new long[,] { { 118, 82 }, { 61, 139 } });
        var other = TransitionCounts.FromCounts(["a", "b"], new long[,] { { 20, 80 }, { 90, 10 } });

        new[] { ("one", one), ("like", like) }.TestHomogeneity().Finding.Should().StartWith("No difference between the groups shows");
        var test = new[] { ("one", one), ("other", other) }.TestHomogeneity();
        test.Finding.Should().StartWith("The groups move differently");
        test.DegreesOfFreedom.Should().Be(2);
        test.Cells.First().Should().Be(new TestedCell("a", "one", "a", 60, 40));
    }

    [Fact]
    public void Small_expected_counts_are_warned_of()
    {
        var test = TransitionCounts.FromCounts(["a", "b"], new long[,] { { 4, 1 }, { 1, 3 } }).TestIndependence();

        test.SmallestExpected.Should().BeApproximately(16.0 / 9, Tolerances.Published);
        test.Warning.Should().StartWith("Of 4 expected counts 4 are below 5, the smallest 1.778");
        test.ToString().Should().EndWith(test.Warning);
    }

    [Fact]
    public void Where_nothing_can_be_compared_nothing_is_found()
    {
        var test = TransitionCounts.FromPaths([["a", "a", "a"]], Kept).TestSecondOrder();

        test.DegreesOfFreedom.Should().Be(0);
        test.LikelihoodRatio.Should().Be(new TestStatistic(0, 1));
        test.SmallestExpected.Should().Be(double.PositiveInfinity);
        test.Finding.Should().StartWith("There is nothing to compare");
        TransitionCounts.FromPaths([["a", "b"]], Kept).TestStayLengths("b").Finding.Should().StartWith("There is nothing to compare");
    }

    [Fact]
    public void Questions_that_the_counts_cannot_answer_are_refused()
    {
        var plain = TransitionCounts.FromPath(["a", "b", "a"]);

        FluentActions.Invoking(plain.TestSecondOrder).Should().Throw<InvalidOperationException>().WithMessage("*KeepsHistory*");
        FluentActions.Invoking(() => plain.TestStayLengths("a")).Should().Throw<InvalidOperationException>();
        FluentActions.Invoking(() => plain.TestStayLengths("z")).Should().Throw<UnknownStateException>();
        FluentActions.Invoking(() => new[] { ("one", plain) }.TestHomogeneity()).Should().Throw<ArgumentException>().WithMessage("There is 1 group*");
        FluentActions.Invoking(() => new[] { ("one", plain), ("two", TransitionCounts.FromPath(["a", "c"])) }.TestHomogeneity()).Should().Throw<ArgumentException>();
        FluentActions.Invoking(() => plain.TestIndependence().Rejects(0)).Should().Throw<ArgumentOutOfRangeException>();
    }

    [Fact]
    public void Paths_take_a_list_of_states_and_a_comparer()
    {
        var counts = TransitionCounts.FromPaths([["A", "b"]], new PathOptions<string> { States = ["b", "a"], Comparer = StringComparer.OrdinalIgnoreCase });

        counts["a", "b"].Should().Be(1);
        TransitionCounts.FromPaths([["A", "a"]], new PathOptions<string> { Comparer = StringComparer.OrdinalIgnoreCase }).States.Should().HaveCount(1);
        FluentActions.Invoking(() => TransitionCounts.FromPaths([["A"]], new PathOptions<string> { States = ["a"] })).Should().Throw<InvalidChainException>();
    }
}
