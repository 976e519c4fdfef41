using System.CommandLine;
using System.CommandLine.Parsing;
using System.Globalization;

namespace CratePool;

/// <summary>The arguments of the program.</summary>
internal sealed class CommandLine
{
    private const int MostWeeks = 5200;
    private static readonly string InventedLog = Path.Combine(AppContext.BaseDirectory, "crate-pool-scans.csv");

    private readonly Argument<string?> _log = new("log")
    {
        Description = "The scan log: a CSV file with a heading line. [default: the invented log of the sample]",
        Arity = ArgumentArity.ZeroOrOne,
    };

    private readonly Option<string> _out = Text("--out", "The folder for the two pictures.", "crate-pool-report");
    private readonly Option<string> _crate = Text("--crate-column", "The column that tells the crates apart.", "crate");
    private readonly Option<string> _time = Text("--time-column", "The column with the time of the scan, such as 2025-03-31T07:12:00+02:00.", "scanned_at");
    private readonly Option<string> _stage = Text("--stage-column", "The column with the stage the crate was in.", "stage");
    private readonly Option<string> _new = Text("--new", "The stage a new crate starts in.", "clean");
    private readonly Option<string> _goal = Text("--goal", "The stage you want to know the first time of.", "at shop");
    private readonly Option<string> _lost = Text("--lost", "The stage of crates that are not scanned any more.", "lost");

    private readonly Option<string[]> _scrapped = new("--scrapped")
    {
        Description = "A stage in which a crate's life ends by decision; may be given several times.",
        HelpName = "name",
        DefaultValueFactory = _ => ["scrapped"],
    };

    private readonly Option<char> _separator = new("--separator")
    {
        Description = "The character between two fields of the log.",
        HelpName = "character",
        DefaultValueFactory = _ => ',',
        CustomParser = ParseSeparator,
    };

    private readonly Option<string[]> _timeFormats = new("--time-format")
    {
        Description = "How times are written where it is not as above, such as dd.MM.yyyy HH:mm; may be given several times.",
        HelpName = "format",
    };

    private readonly Option<TimeZoneInfo?> _zone = new("--zone")
    {
        Description = "The time zone in which weeks begin on Monday, and of times without an offset, such as Europe/Paris. " +
            "[default: weeks in UTC, times must have an offset]",
        HelpName = "zone",
        CustomParser = ParseZone,
    };

    private readonly Option<int> _lostAfter = new("--lost-after")
    {
        Description = "After how many weeks without a scan a crate counts as lost; 0 for never.",
        HelpName = "weeks",
        DefaultValueFactory = _ => 8,
        CustomParser = ParseWeeks,
    };

    private readonly RootCommand _command = new("Answers questions about a pool of reusable crates from its scan log, and draws two pictures.");

    internal CommandLine()
    {
        _log.Validators.Add(RefuseOption);
        _command.Arguments.Add(_log);
        foreach (var option in new Option[] { _out, _crate, _time, _timeFormats, _stage, _separator, _zone, _new, _goal, _scrapped, _lost, _lostAfter })
        {
            _command.Options.Add(option);
        }
    }

    /// <summary>Parses the arguments and hands them on, or prints the help, or what is wrong with them.</summary>
    /// <returns>The exit code: of what was run, or 0 after the help, or 1.</returns>
    internal int Invoke(IReadOnlyList<string> arguments, TextWriter output, TextWriter errors, Func<PoolOptions, int> run)
    {
        _command.SetAction(read => run(Read(read)));
        var parsed = _command.Parse(arguments);
        if (parsed.Errors.Count > 0)
        {
            errors.WriteLine(string.Join(Environment.NewLine, parsed.Errors.Select(error => error.Message)) + " --help lists the arguments.");
            return Application.Failed;
        }

        return parsed.Invoke(new InvocationConfiguration { Output = output, Error = errors, EnableDefaultExceptionHandler = false });
    }

    private PoolOptions Read(ParseResult parsed) => new()
    {
        LogPath = parsed.GetValue(_log) ?? InventedLog,
        IsInvented = parsed.GetValue(_log) is null,
        OutputFolder = parsed.GetRequiredValue(_out),
        CrateColumn = parsed.GetRequiredValue(_crate),
        TimeColumn = parsed.GetRequiredValue(_time),
        StageColumn = parsed.GetRequiredValue(_stage),
        TimeFormats = parsed.GetValue(_timeFormats) ?? [],
        Separator = parsed.GetRequiredValue(_separator),
        Zone = parsed.GetValue(_zone),
        NewStage = Choice(parsed, _new),
        GoalStage = Choice(parsed, _goal),
        ScrappedStages = [.. parsed.GetRequiredValue(_scrapped).Select(stage => new StageChoice(_scrapped.Name, stage, IsGiven(parsed, _scrapped)))],
        LostStage = parsed.GetRequiredValue(_lost),
        LostAfterWeeks = parsed.GetRequiredValue(_lostAfter),
    };

    private static StageChoice Choice(ParseResult parsed, Option<string> option) =>
        new(option.Name, parsed.GetRequiredValue(option), IsGiven(parsed, option));

    private static bool IsGiven(ParseResult parsed, Option option) => parsed.GetResult(option) is { Implicit: false };

    private static Option<string> Text(string name, string description, string assumed) => new(name)
    {
        Description = description,
        HelpName = "name",
        DefaultValueFactory = _ => assumed,
    };

    private static TimeZoneInfo? ParseZone(ArgumentResult result)
    {
        var name = result.Tokens[0].Value;
        if (!TimeZoneInfo.TryFindSystemTimeZoneById(name, out var zone))
        {
            result.AddError($"'{name}' is not a time zone of this machine. Give a name such as Europe/Paris or UTC.");
        }

        return zone;
    }

    private static char ParseSeparator(ArgumentResult result)
    {
        var text = result.Tokens[0].Value;
        if (text is ['\t' or (>= ' ' and <= '~' and not '"')])
        {
            return text[0];
        }

        result.AddError($"--separator takes one character, such as ';', but no quote, not '{text}'.");
        return default;
    }

    private static int ParseWeeks(ArgumentResult result)
    {
        if (!int.TryParse(result.Tokens[0].Value, NumberStyles.None, CultureInfo.InvariantCulture, out var weeks) || weeks > MostWeeks)
        {
            result.AddError($"--lost-after takes a whole number of weeks from 0 to {MostWeeks}, not '{result.Tokens[0].Value}'.");
        }

        return weeks;
    }

    /// <summary>A misspelt option would else be taken for the path of a log.</summary>
    private static void RefuseOption(ArgumentResult result)
    {
        if (result.Tokens is [var token, ..] && token.Value.StartsWith("--", StringComparison.Ordinal))
        {
            result.AddError($"There is no option '{token.Value}'.");
        }
    }
}
