using System.Globalization;

namespace Stochastic.Chains.Tests.Samples;

/// <summary>
/// The crate pool once more, by the plainest means: weeks walked one by one, chances as decimal fractions, equations solved by
/// Gaussian elimination with 28 digits. Shares no code with the library.
/// </summary>
internal sealed class NaivePool
{
    private static readonly string[] Stages = ["clean", "filled", "at shop", "returned dirty", "in wash", "in repair", "lost", "scrapped"];
    private static readonly TimeSpan Week = TimeSpan.FromDays(7);
    private static readonly DateTimeOffset SomeMonday = new(2024, 1, 1, 0, 0, 0, TimeSpan.Zero);

    private readonly decimal[,] _moves = new decimal[Stages.Length, Stages.Length];
    private readonly decimal[] _stock = new decimal[Stages.Length];

    internal NaivePool(string path)
    {
        var rows = File.ReadLines(path).Skip(1).Select(line => line.Split(',')).ToList();
        var scans = rows
            .Select(cells => (Crate: cells[0], Time: DateTimeOffset.Parse(cells[1], CultureInfo.InvariantCulture), Stage: Array.IndexOf(Stages, cells[2])))
            .Distinct()
            .ToList();
        (Rows, Repeated) = (rows.Count, rows.Count - scans.Count);
        var end = scans.Max(scan => scan.Time);
        foreach (var crate in scans.GroupBy(scan => scan.Crate))
        {
            Crates++;
            Follow([.. crate.OrderBy(scan => scan.Time).Select(scan => (scan.Time, scan.Stage))], end);
        }
    }

    internal static IReadOnlyList<string> InUse => Stages[..6];

    internal static IReadOnlyList<string> All => Stages;

    internal long Rows { get; }

    internal long Repeated { get; }

    internal long Crates { get; }

    internal long Lost { get; private set; }

    internal long Unobserved { get; private set; }

    internal decimal Moves => _moves.Cast<decimal>().Sum();

    internal decimal CratesInUse => _stock.Sum();

    internal decimal Stock(string stage) => _stock[Array.IndexOf(Stages, stage)];

    internal decimal MovesFrom(string stage) => Enumerable.Range(0, Stages.Length).Sum(to => _moves[Array.IndexOf(Stages, stage), to]);

    /// <summary>The weekly chances; lost and scrapped stay so, or lead to clean.</summary>
    internal decimal[,] Chances(bool isRefilled)
    {
        var chances = new decimal[Stages.Length, Stages.Length];
        for (var from = 0; from < Stages.Length; from++)
        {
            for (var to = 0; to < Stages.Length; to++)
            {
                var isEnd = from >= InUse.Count;
                chances[from, to] = isEnd ? (to == (isRefilled ? 0 : from) ? 1 : 0) : _moves[from, to] / MovesFrom(Stages[from]);
            }
        }

        return chances;
    }

    /// <summary>The shares after some weeks, from today's stock.</summary>
    internal decimal[] After(int weeks, bool isRefilled)
    {
        var chances = Chances(isRefilled);
        var shares = Array.ConvertAll(_stock, crates => crates / CratesInUse);
        for (var week = 0; week < weeks; week++)
        {
            shares = [.. Enumerable.Range(0, Stages.Length).Select(to => Enumerable.Range(0, Stages.Length).Sum(from => shares[from] * chances[from, to]))];
        }

        return shares;
    }

    /// <summary>The long-run shares of the refilled pool: balance of every stage but one, and a sum of one.</summary>
    internal decimal[] LongRun()
    {
        var chances = Chances(isRefilled: true);
        var (matrix, right) = (new decimal[Stages.Length, Stages.Length], new decimal[Stages.Length]);
        for (var row = 0; row < Stages.Length; row++)
        {
            for (var column = 0; column < Stages.Length; column++)
            {
                matrix[row, column] = row == 0 ? 1 : chances[column, row] - (row == column ? 1 : 0);
            }
        }

        right[0] = 1;
        return Solve(matrix, right);
    }

    /// <summary>For each stage the expected sum, until the target is entered, of what each week pays and of what entering pays.</summary>
    internal decimal[] UntilTarget(bool isRefilled, IReadOnlyList<string> target, decimal perWeek, Func<string, decimal> onEntry)
    {
        var chances = Chances(isRefilled);
        var (matrix, right) = (new decimal[Stages.Length, Stages.Length], new decimal[Stages.Length]);
        for (var row = 0; row < Stages.Length; row++)
        {
            var isThere = target.Contains(Stages[row]);
            right[row] = isThere ? onEntry(Stages[row]) : perWeek;
            for (var column = 0; column < Stages.Length; column++)
            {
                matrix[row, column] = (row == column ? 1 : 0) - (isThere ? 0 : chances[row, column]);
            }
        }

        return Solve(matrix, right);
    }

    private static DateTimeOffset MondayFrom(DateTimeOffset time) => SomeMonday + (Week * Math.Ceiling((time - SomeMonday) / Week));

    private static decimal[] Solve(decimal[,] matrix, decimal[] right)
    {
        var n = right.Length;
        for (var pivot = 0; pivot < n; pivot++)
        {
            var best = Enumerable.Range(pivot, n - pivot).MaxBy(row => Math.Abs(matrix[row, pivot]));
            (right[pivot], right[best]) = (right[best], right[pivot]);
            for (var column = 0; column < n; column++)
            {
                (matrix[pivot, column], matrix[best, column]) = (matrix[best, column], matrix[pivot, column]);
            }

            for (var row = 0; row < n; row++)
            {
                if (row != pivot)
                {
                    var factor = matrix[row, pivot] / matrix[pivot, pivot];
                    right[row] -= factor * right[pivot];
                    for (var column = pivot; column < n; column++)
                    {
                        matrix[row, column] -= factor * matrix[pivot, column];
                    }
                }
            }
        }

        return [.. right.Select((value, row) => value / matrix[row, row])];
    }

    private void Follow(List<(DateTimeOffset Time, int Stage)> scans, DateTimeOffset end)
    {
        var (lastTime, lastStage) = scans[^1];
        var goesLostOn = DateTimeOffset.MaxValue;
        if (Stages[lastStage] != "scrapped")
        {
            var silentOn = MondayFrom(lastTime + (8 * Week) + TimeSpan.FromTicks(1));
            if (silentOn <= end)
            {
                goesLostOn = silentOn;
                Lost++;
            }
            else
            {
                _stock[lastStage]++;
            }
        }

        var before = -1;
        var lastMonday = goesLostOn <= end ? goesLostOn : MondayFrom(lastTime);
        for (var monday = MondayFrom(scans[0].Time); monday <= end && monday <= lastMonday; monday += Week)
        {
            var stage = monday == goesLostOn ? Array.IndexOf(Stages, "lost") : scans.Last(scan => scan.Time <= monday).Stage;
            if (before >= 0)
            {
                _moves[before, stage]++;
                Unobserved += monday != goesLostOn && !scans.Any(scan => scan.Time <= monday && scan.Time > monday - Week) ? 1 : 0;
            }

            before = stage;
        }
    }
}
