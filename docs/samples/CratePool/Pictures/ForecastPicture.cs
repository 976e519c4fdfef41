using ScottPlot;
using ScottPlot.TickGenerators;
using Stochastic.Chains;

namespace CratePool.Pictures;

/// <summary>Draws the share of each stage week by week, and the level it settles at.</summary>
internal static class ForecastPicture
{
    private const int Width = 1440;
    private const int Height = 860;
    private const float LabelSize = 17;
    private const int LevelStep = 5;
    private const int LinesOfText = 26;
    private const int MostLines = 22;
    private const int LongestName = 28;

    /// <summary>Writes the picture; of very many stages those with the largest shares.</summary>
    /// <param name="weeks">The shares today and after each week.</param>
    /// <param name="longRun">The shares that the pool settles at.</param>
    /// <param name="stages">The stages, in the order of their colors.</param>
    /// <param name="path">The file to write.</param>
    internal static void Save(IReadOnlyList<Distribution<string>> weeks, Distribution<string> longRun, StageOrder stages, string path)
    {
        using var plot = new Plot();
        var last = weeks.Count - 1;
        var top = stages.All.Max(stage => Math.Max(longRun[stage], weeks.Max(week => week[stage]))) * 108;
        var lines = stages.All
            .Select((stage, number) => (Stage: stage, Color: ColorOf(stages, number), Level: longRun[stage] * 100))
            .OrderByDescending(line => line.Level)
            .Take(MostLines)
            .ToList();
        Frame(plot, stages, last, top);
        foreach (var (stage, color, level) in lines)
        {
            var longRunLine = plot.Add.Line(0, level, last, level);
            (longRunLine.LineColor, longRunLine.LineWidth, longRunLine.LinePattern) = (color.WithAlpha(0.55), 1.5f, LinePattern.Dotted);
            double[] xs = [.. Enumerable.Range(0, weeks.Count).Select(week => (double)week)];
            var line = plot.Add.ScatterLine(xs, [.. weeks.Select(week => week[stage] * 100)], color);
            line.LineWidth = 3;
        }

        LabelLines(plot, last, top, lines);
        plot.SavePng(path, Width, Height);
    }

    private static Color ColorOf(StageOrder stages, int number) =>
        number < stages.InUse.Count ? StageColors.OfStage(number) : StageColors.OfEnd(number - stages.InUse.Count);

    private static void Frame(Plot plot, StageOrder stages, int last, double top)
    {
        plot.Font.Set(PictureFont.Name);
        plot.Title("Share of the pool in each stage" + (stages.Ends.Count > 0 ? $" when {string.Join(" and ", stages.Ends)} crates are replaced" : string.Empty), 24);
        plot.XLabel("weeks from now", LabelSize);
        plot.YLabel("share of the pool in %", LabelSize);
        foreach (var label in new[] { plot.Axes.Title.Label, plot.Axes.Bottom.Label, plot.Axes.Left.Label })
        {
            label.Bold = false;
            label.ForeColor = StageColors.Ink;
        }

        double[] ticks = [.. Enumerable.Range(0, last + 1).Where(week => week % 13 == 0 || week == 4).Select(week => (double)week)];
        plot.Axes.Bottom.TickGenerator = new NumericManual(ticks, [.. ticks.Select(week => week == 0 ? "today" : $"{week:0}")]);
        plot.Axes.Bottom.TickLabelStyle.FontSize = LabelSize;
        plot.Axes.Left.TickLabelStyle.FontSize = LabelSize;
        double[] levels = [.. Enumerable.Range(0, ((int)top / LevelStep) + 1).Select(level => (double)(level * LevelStep))];
        plot.Axes.Left.TickGenerator = new NumericManual(levels, [.. levels.Select(level => $"{level:0}")]);
        plot.Axes.Right.IsVisible = false;
        plot.Axes.Top.IsVisible = false;
        plot.Axes.Color(StageColors.Ink);
        plot.Grid.MajorLineColor = StageColors.Rule;
        plot.Axes.SetLimits(0, last * 1.42, -1.5, top);
        plot.Layout.Fixed(new PixelPadding(90, 20, 80, 70));
    }

    /// <summary>Writes the stages beside the ends of their lines, pushed apart where they would lie on each other.</summary>
    private static void LabelLines(Plot plot, int last, double top, List<(string Stage, Color Color, double Level)> lines)
    {
        var margin = plot.Add.Rectangle(last * 1.005, last * 2, -10, top * 2);
        (margin.FillColor, margin.LineWidth) = (Colors.White, 0);
        var ascending = lines.OrderBy(line => line.Level).ToList();
        var places = PushApart([.. ascending.Select(line => line.Level)], top * 0.91, top / LinesOfText);
        foreach (var ((stage, color, level), place) in ascending.Zip(places))
        {
            var pointer = plot.Add.Line(last, level, last * 1.03, place);
            (pointer.LineColor, pointer.LineWidth) = (color, 1);
            Write(plot, $"{Shorten(stage)}: {Percent.Short(level / 100)}", last * 1.035, place, color);
        }

        Write(plot, "in the long run", last * 1.035, top * 0.97, StageColors.Faint);
    }

    /// <summary>Places at least a distance apart and none above the top, as near to the levels as a push up and one down leave them.</summary>
    private static double[] PushApart(double[] levels, double top, double distance)
    {
        var places = levels.ToArray();
        for (var k = 1; k < places.Length; k++)
        {
            places[k] = Math.Max(places[k], places[k - 1] + distance);
        }

        for (var k = places.Length - 1; k >= 0; k--)
        {
            places[k] = Math.Min(places[k], k == places.Length - 1 ? top : places[k + 1] - distance);
        }

        return places;
    }

    private static void Write(Plot plot, string text, double x, double y, Color color)
    {
        var label = plot.Add.Text(text, x, y);
        (label.LabelFontName, label.LabelFontSize, label.LabelFontColor) = (PictureFont.Name, LabelSize, color);
        label.LabelAlignment = Alignment.MiddleLeft;
    }

    private static string Shorten(string stage) => stage.Length <= LongestName ? stage : string.Concat(stage.AsSpan(0, LongestName - 1), "…");
}
