namespace Stochastic.Chains.Tests.Samples;

/// <summary>What the crate pool sample says to logs and arguments that are no good, and to logs of other pools.</summary>
public sealed class CratePoolRefusalTests
{
    private const string Header = "crate,scanned_at,stage";

    public static TheoryData<string, string[], string> BadLogs => new()
    {
        { "empty file", [], "The log is empty" },
        { "no rows", [Header], "The log has no events" },
        { "missing column", ["crate,when,stage", "C1,2025-01-06T08:00:00Z,clean"], "There is no column 'scanned_at'" },
        { "unreadable time", [Header, "C1,6 Jan,clean"], "The time '6 Jan' on line 2 cannot be read" },
        { "time without offset", [Header, "C1,2025-01-06T08:00:00,clean"], "The time '2025-01-06T08:00:00' on line 2 has no offset" },
        { "two stages at one instant", [Header, "C1,2025-01-06T08:00:00Z,clean", "C1,2025-01-06T09:00:00+01:00,filled"], "'clean' (line 2) and in 'filled' (line 3) at one instant" },
        { "too short", [Header, "C1,2025-01-06T08:00:00Z,clean"], "The log shows 0 weekly moves and 1 crate in use" },
    };

    [Theory]
    [MemberData(nameof(BadLogs))]
    public void A_bad_log_is_refused_in_one_clear_message(string fault, string[] lines, string message)
    {
        using var run = CratePoolRun.OnLog(lines);
        run.ExitCode.Should().Be(1, fault);
        run.Output.Should().BeEmpty();
        run.Errors.Should().Contain(message).And.NotContain("   at ");
    }

    [Fact]
    public void A_missing_log_is_refused()
    {
        using var run = CratePoolRun.With("no-such-log.csv");
        run.ExitCode.Should().Be(1);
        run.Errors.Should().Contain("There is no file 'no-such-log.csv'").And.NotContain("   at ");
    }

    [Theory]
    [InlineData("There is no option '--bogus'", "--bogus")]
    [InlineData("--lost-after takes a whole number of weeks", "--lost-after", "soon")]
    [InlineData("--lost-after takes a whole number of weeks", "--lost-after", "-1")]
    [InlineData("'Nowhere' is not a time zone", "--zone", "Nowhere")]
    [InlineData("--separator takes one character", "--separator", "")]
    [InlineData("--separator takes one character", "--separator", "\"")]
    [InlineData("No crate of the log was ever \"on the moon\". Give --goal one of the log's stages", "--goal", "on the moon")]
    [InlineData("A crate cannot both start and end as \"scrapped\"", "--new", "scrapped")]
    public void A_bad_argument_is_refused(string message, params string[] arguments)
    {
        using var run = CratePoolRun.With(arguments);
        run.ExitCode.Should().Be(1);
        run.Errors.Should().Contain(message).And.NotContain("   at ");
    }

    [Fact]
    public void A_cancelled_run_ends_with_130()
    {
        using var run = CratePoolRun.Cancelled();
        run.ExitCode.Should().Be(130);
        run.Errors.Should().Contain("Cancelled");
        Directory.Exists(run.PictureFolder).Should().BeFalse();
    }

    [Fact]
    public void Help_lists_the_arguments()
    {
        using var run = CratePoolRun.With("--help");
        run.ExitCode.Should().Be(0);
        run.Output.Should().Contain("--lost-after").And.Contain("--crate-column");
    }

    [Fact]
    public void A_log_of_another_pool_is_read_as_it_is_written()
    {
        using var run = CratePoolRun.OnLog(OtherPool(), "--separator", ";", "--zone", "UTC", "--crate-column", "keg", "--time-column", "day",
            "--time-format", "dd.MM.yyyy", "--stage-column", "where", "--new", "cellar", "--goal", "bar", "--scrapped", "sold");
        run.ExitCode.Should().Be(0, run.Errors);
        run.Table("What the log holds", "found")["crates"].Should().Equal("4");
        run.Table("How long until a crate is first \"bar\"", "stage today").Keys.Should().Equal("cellar");
        run.Table("How long until a crate is lost or sold", "stage today").Keys.Should().Equal("cellar", "bar");
        Directory.GetFiles(run.PictureFolder).Should().HaveCount(2);
    }

    [Fact]
    public void Questions_about_stages_that_the_log_lacks_are_not_asked_and_the_report_says_why()
    {
        using var run = CratePoolRun.OnLog(OtherPool(), "--separator", ";", "--zone", "UTC", "--crate-column", "keg", "--time-column", "day",
            "--time-format", "dd.MM.yyyy", "--stage-column", "where");
        run.ExitCode.Should().Be(0, run.Errors);
        var text = run.Output.ReplaceLineEndings(" ");
        text.Should().Contain("the log has no stage \"clean\". Name the one you mean with --new");
        text.Should().Contain("the log has no stage \"at shop\". Name the one you mean with --goal");
        text.Should().Contain("No crate was ever seen to leave \"sold\"");
        Directory.GetFiles(run.PictureFolder).Should().ContainSingle("without a stage for new crates there is no pool that is kept full");
    }

    private static string[] OtherPool() =>
    [
        "keg;day;where",
        "1;06.01.2025;cellar", "1;16.01.2025;bar", "1;30.01.2025;cellar", "1;13.02.2025;bar", "1;20.02.2025;sold",
        "2;07.01.2025;cellar", "2;31.01.2025;bar", "2;12.02.2025;cellar",
        "3;08.01.2025;bar", "3;22.01.2025;cellar", "3;21.02.2025;cellar",
        "4;09.01.2025;cellar", "4;24.02.2025;cellar",
    ];
}
