namespace Stochastic.Chains.Tests.Estimation;

/// <summary>Counts random logs a second way, from the definition: ask every item for its state at every boundary.</summary>
public sealed class PeriodCountingOracleTests
{
    private const int HoursInLog = 400;
    private const int PeriodHours = 7;

    private static readonly DateTimeOffset Start = new(2001, 1, 1, 0, 0, 0, TimeSpan.Zero);

    [Theory]
    [InlineData(1, null, false)]
    [InlineData(2, 40, false)]
    [InlineData(3, 40, true)]
    [InlineData(4, 3, true)]
    public void Counts_follow_from_the_state_at_every_boundary(int seed, int? silentHours, bool countsReturns)
    {
        var seeded = new Random(seed);
        for (var trial = 0; trial < 100; trial++)
        {
            var end = seeded.Next(HoursInLog / 2, HoursInLog);
            var items = Enumerable.Range(0, 6).ToDictionary(item => item, _ => RandomHistory(seeded, end));
            var events = items.SelectMany(item => item.Value.Select(seen => new LogEvent<int, int>(item.Key, Start.AddHours(seen.Key), seen.Value))).ToArray();
            seeded.Shuffle(events);
            var options = new LogOptions<int>
            {
                States = [0, 1, 2, 9],
                Period = LogPeriod.Every(TimeSpan.FromHours(PeriodHours), TimeZoneInfo.Utc),
                LogEnd = Start.AddHours(end),
                Silence = silentHours is { } hours ? new SilenceRule<int>(TimeSpan.FromHours(hours), 9) { CountsReturns = countsReturns } : null,
                FinalStates = [2],
            };

            var counts = TransitionCounts.FromEvents(events, options);

            var expected = TransitionCounts.FromPaths<int>([0, 1, 2, 9], items.Values.Select(history => StatesAtBoundaries(history, end, silentHours, countsReturns)));
            counts.ToArray().Should().BeEquivalentTo(expected.ToArray(), $"seed {seed}, trial {trial}");
            var log = counts.Log!;
            (log.OpenItems + log.SilentItems + log.FinishedItems).Should().Be(6);
            log.Moves.Should().Be(counts.TotalCount);
        }
    }

    private static SortedDictionary<int, int> RandomHistory(Random seeded, int end)
    {
        var history = new SortedDictionary<int, int> { [seeded.Next(end + 1)] = 0 };
        for (var k = seeded.Next(12); k > 0; k--)
        {
            history[seeded.Next(end + 1)] = seeded.Next(3);
        }

        return history;
    }

    private static IEnumerable<int> StatesAtBoundaries(SortedDictionary<int, int> history, int end, int? silentHours, bool countsReturns)
    {
        var last = history.Keys.Max();
        for (var boundary = 0; boundary <= end; boundary += PeriodHours)
        {
            var seen = history.Keys.Where(hour => hour <= boundary).DefaultIfEmpty(-1).Max();
            if (seen < 0)
            {
                continue;
            }

            var isFinal = history[seen] is 2 or 9;
            var comesBack = seen != last;
            var rule = silentHours is not null && !isFinal && (!comesBack || countsReturns);
            var wasSeenAtBoundaryBefore = seen <= boundary - PeriodHours;
            var isSilent = rule && boundary - seen > silentHours && wasSeenAtBoundaryBefore;
            if (isSilent)
            {
                yield return 9;
                if (!comesBack)
                {
                    yield break;
                }

                continue;
            }

            var isLastPeriodOfItem = !comesBack && wasSeenAtBoundaryBefore;
            if (isLastPeriodOfItem && !(rule && WillBeSilent(seen, end, silentHours!.Value)))
            {
                yield break;
            }

            yield return history[seen];
        }
    }

    /// <summary>Whether some boundary of the log finds the item silent: only then is the wait for it counted.</summary>
    private static bool WillBeSilent(int seen, int end, int silentHours)
    {
        for (var boundary = 0; boundary <= end; boundary += PeriodHours)
        {
            if (boundary - seen > silentHours && seen <= boundary - PeriodHours)
            {
                return true;
            }
        }

        return false;
    }
}
