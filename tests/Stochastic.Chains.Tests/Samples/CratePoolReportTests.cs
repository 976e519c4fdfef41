using System.Buffers.Binary;
using System.Globalization;
using CratePool.Pictures;
using ScottPlot;

namespace Stochastic.Chains.Tests.Samples;

/// <summary>Every figure that the crate pool sample prints for its own log, against an independent recount and solve.</summary>
public sealed class CratePoolReportTests(CratePoolRun run) : IClassFixture<CratePoolRun>
{
    private static readonly Lazy<NaivePool> Naive = new(() => new NaivePool(Path.Combine(AppContext.BaseDirectory, "crate-pool-scans.csv")));

    [Fact]
    public void The_run_succeeds()
    {
        run.ExitCode.Should().Be(0);
        run.Errors.Should().BeEmpty();
        run.Output.Should().Contain("The invented log of the sample");
    }

    [Fact]
    public void The_log_is_counted_as_by_hand()
    {
        var found = run.Table("What the log holds", "found");
        found["scans"].Should().Equal(Whole(Naive.Value.Rows));
        found["of these repeated rows, counted once"].Should().Equal(Whole(Naive.Value.Repeated));
        found["crates"].Should().Equal(Whole(Naive.Value.Crates));
        found["in use when the log ends"].Should().Equal(Whole(Naive.Value.CratesInUse));
        found["not scanned any more, so taken as lost"].Should().Equal(Whole(Naive.Value.Lost));
        found["weekly moves counted, stays included"].Should().Equal(Whole(Naive.Value.Moves));
        found["of these unobserved: no scan in the week, taken as a stay"].Should().Equal(Whole(Naive.Value.Unobserved));
    }

    [Fact]
    public void The_stages_are_listed_with_their_stock_and_moves()
    {
        var stages = run.Table("The stages, how many", "stage");
        var chances = Naive.Value.Chances(isRefilled: false);
        stages.Keys.Should().Equal(NaivePool.InUse);
        foreach (var (stage, number) in NaivePool.InUse.Select((stage, number) => (stage, number)))
        {
            stages[stage][..3].Should().Equal(Whole(Naive.Value.Stock(stage)), Whole(Naive.Value.MovesFrom(stage)), Share(chances[number, number]));
        }
    }

    [Fact]
    public void The_forecast_is_that_of_thirteen_weeks_of_multiplying()
    {
        var table = run.Table("Where the pool stands", "stage");
        var (four, thirteen) = (Naive.Value.After(4, isRefilled: false), Naive.Value.After(13, isRefilled: false));
        foreach (var (stage, number) in NaivePool.All.Select((stage, number) => (stage, number)))
        {
            table[stage].Should().Equal(
                Whole(Naive.Value.Stock(stage)), Whole(four[number] * Naive.Value.CratesInUse), Whole(thirteen[number] * Naive.Value.CratesInUse));
        }
    }

    [Fact]
    public void The_long_run_solves_the_balance_of_every_stage()
    {
        var table = run.Table("The long-run shares", "stage");
        var (four, thirteen, longRun) = (Naive.Value.After(4, isRefilled: true), Naive.Value.After(13, isRefilled: true), Naive.Value.LongRun());
        foreach (var (stage, number) in NaivePool.All.Select((stage, number) => (stage, number)))
        {
            var today = Naive.Value.Stock(stage) / Naive.Value.CratesInUse;
            table[stage][..4].Should().Equal(Share(today), Share(four[number]), Share(thirteen[number]), Share(longRun[number]));
        }

        var newCrates = (longRun[6] + longRun[7]) * Naive.Value.CratesInUse;
        run.Output.ReplaceLineEndings(" ").Should().Contain($"needs about {Tenths(newCrates)} new crates a week");
    }

    [Fact]
    public void The_first_time_at_a_shop_solves_the_equations_of_the_first_step()
    {
        var table = run.Table("How long until a crate is first \"at shop\"", "stage today");
        var chances = Naive.Value.UntilTarget(isRefilled: false, ["at shop", "lost", "scrapped"], perWeek: 0, stage => stage == "at shop" ? 1 : 0);
        var weeks = Naive.Value.UntilTarget(isRefilled: true, ["at shop"], perWeek: 1, _ => 0);
        table.Keys.Should().BeEquivalentTo(NaivePool.InUse.Except(["at shop"]));
        foreach (var (stage, cells) in table)
        {
            var number = NaivePool.All.ToList().IndexOf(stage);
            cells.Should().Equal(Share(chances[number]), Tenths(weeks[number]));
        }
    }

    [Fact]
    public void The_end_solves_the_equations_of_the_first_step()
    {
        var table = run.Table("How long until a crate is lost or scrapped, and which", "stage today");
        var weeks = Naive.Value.UntilTarget(isRefilled: false, ["lost", "scrapped"], perWeek: 1, _ => 0);
        var lost = Naive.Value.UntilTarget(isRefilled: false, ["lost", "scrapped"], perWeek: 0, stage => stage == "lost" ? 1 : 0);
        table.Keys.Should().Equal(NaivePool.InUse);
        foreach (var (stage, number) in NaivePool.InUse.Select((stage, number) => (stage, number)))
        {
            table[stage].Should().Equal(Tenths(weeks[number]), Tenths(weeks[number] / 52.18m), Share(lost[number]), Share(1 - lost[number]));
        }
    }

    [Fact]
    public void Every_answer_is_proved_to_twelve_digits_or_more()
    {
        var proofs = run.Output.Split(Environment.NewLine).Where(line => line.Contains(": proved, no figure is off by more than", StringComparison.Ordinal)).ToList();
        proofs.Should().HaveCount(7);
        proofs.Should().AllSatisfy(line => int.Parse(line.Split("10^")[1].Split(' ')[0], CultureInfo.InvariantCulture).Should().BeGreaterThanOrEqualTo(12));
        run.Output.Should().NotContain("not proved");
    }

    [Theory]
    [InlineData("state-diagram.png", 1440, 1000)]
    [InlineData("forecast.png", 1440, 860)]
    public void The_pictures_are_drawn(string name, int width, int height)
    {
        var picture = File.ReadAllBytes(Path.Combine(run.PictureFolder, name));
        picture[1..4].Should().Equal("PNG"u8.ToArray());
        BinaryPrimitives.ReadInt32BigEndian(picture.AsSpan(16)).Should().Be(width);
        BinaryPrimitives.ReadInt32BigEndian(picture.AsSpan(20)).Should().Be(height);
        picture.Length.Should().BeGreaterThan(40_000, "an empty sheet of this size takes far less");
    }

    [Fact]
    public void The_pictures_bring_their_own_typeface()
    {
        using var typeface = Fonts.GetTypeface(PictureFont.Name, bold: false, italic: false);
        typeface.FamilyName.Should().Be("DejaVu Sans");
    }

    [Fact]
    public void The_report_is_the_same_where_numbers_are_written_with_a_comma_and_in_every_folder()
    {
        using (new Support.CommaCulture())
        {
            using var again = new CratePoolRun();
            WithoutPaths(again).Should().Be(WithoutPaths(run));
        }
    }

    private static string WithoutPaths(CratePoolRun run) => run.Output[..run.Output.IndexOf("Pictures:", StringComparison.Ordinal)];

    private static string Whole(decimal number) => number.ToString("N0", CultureInfo.InvariantCulture);

    private static string Tenths(decimal number) => number.ToString("N1", CultureInfo.InvariantCulture);

    private static string Share(decimal share) => (share * 100).ToString("0.0", CultureInfo.InvariantCulture) + "%";
}
