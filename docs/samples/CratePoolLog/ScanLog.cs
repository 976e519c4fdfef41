namespace CratePoolLog;

/// <summary>Forty weeks in the life of the pool, scan by scan.</summary>
internal sealed class ScanLog
{
    internal const int Weeks = 40;
    private const int CratesAtFirst = 2_600;
    private const int WeeksBetweenDeliveries = 5;
    private const int CratesPerDelivery = 50;
    private const int CratesForTheSeason = 300;
    private const int StocktakeInTenThousand = 4_900;
    private const int LongestUnseenWeeks = 4;
    private const int LateInTenThousand = 250;
    private const int TwiceInTenThousand = 30;
    private const int MinutesPerDay = 24 * 60;
    private const int MinutesPerWeek = 7 * MinutesPerDay;
    private const int OpensAt = 6 * 60;
    private const int OpenMinutes = 14 * 60;
    private const int WorkingDays = 6;

    private readonly SplitMix64 _random;
    private readonly List<Scan> _scans = [];

    private ScanLog(ulong seed) => _random = new SplitMix64(seed);

    /// <summary>Invents a log; rows come in the order in which the handhelds handed them in.</summary>
    internal static IReadOnlyList<Scan> Invent(ulong seed)
    {
        var log = new ScanLog(seed);
        for (var crate = 1; crate <= CratesAtFirst; crate++)
        {
            log.Follow(crate, firstWeek: 0, log.OpeningStage());
        }

        var crates = CratesAtFirst;
        for (var week = WeeksBetweenDeliveries; week < Weeks; week += WeeksBetweenDeliveries)
        {
            log.Deliver(week, CratesPerDelivery, ref crates);
        }

        log.Deliver(Weeks - 1, CratesForTheSeason, ref crates);
        return [.. log._scans.OrderBy(scan => scan.UploadedMinute).ThenBy(scan => scan.Crate).ThenBy(scan => scan.Minute)];
    }

    /// <summary>The stage a crate is found in at the stock-take with which the log begins.</summary>
    private Stage OpeningStage() => _random.Below(100) switch
    {
        < 24 => Stage.Clean,
        < 39 => Stage.Filled,
        < 75 => Stage.AtShop,
        < 90 => Stage.ReturnedDirty,
        < 97 => Stage.InWash,
        _ => Stage.InRepair,
    };

    private void Deliver(int week, int delivered, ref int crates)
    {
        for (var last = crates + delivered; crates < last;)
        {
            Follow(++crates, week, Stage.Clean);
        }
    }

    private void Follow(int crate, int firstWeek, Stage stage)
    {
        Record(crate, firstWeek, [stage]);
        var unseenWeeks = 0;
        for (var week = firstWeek + 1; week < Weeks; week++)
        {
            var next = CrateLife.NextWeek(stage, _random);
            if (next == Stage.Lost)
            {
                return;
            }

            if (next != stage)
            {
                Record(crate, week, CrateLife.Way(stage, next));
                unseenWeeks = 0;
            }
            else if (unseenWeeks == LongestUnseenWeeks || _random.Happens(StocktakeInTenThousand))
            {
                Record(crate, week, [stage]);
                unseenWeeks = 0;
            }
            else
            {
                unseenWeeks++;
            }

            if (next == Stage.Scrapped)
            {
                return;
            }

            stage = next;
        }
    }

    /// <summary>Scans a crate in each of these stages, one after the other, within the opening hours of a week.</summary>
    private void Record(int crate, int week, ReadOnlySpan<Stage> stages)
    {
        var minutes = new SortedSet<int>();
        while (minutes.Count < stages.Length)
        {
            minutes.Add((_random.Below(WorkingDays) * MinutesPerDay) + OpensAt + _random.Below(OpenMinutes));
        }

        var passed = 0;
        foreach (var minute in minutes)
        {
            var time = (week * MinutesPerWeek) + minute;
            var uploaded = _random.Happens(LateInTenThousand) ? time + _random.Below(3 * MinutesPerDay) : time;
            var scan = new Scan(crate, time, uploaded, stages[passed++]);
            _scans.Add(scan);
            if (_random.Happens(TwiceInTenThousand))
            {
                _scans.Add(scan with { UploadedMinute = uploaded + 1 });
            }
        }
    }
}
