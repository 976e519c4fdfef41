using ScottPlot;
using Stochastic.Chains.Benchmarks.Growth;

namespace Stochastic.Chains.Benchmarks.Report;

/// <summary>Time against size, both axes logarithmic: full chains by states, sparse chains by transitions.</summary>
internal static class GrowthPicture
{
    private const int Width = 1200;
    private const int Height = 520;

    internal static void Save(IEnumerable<GrowthRow> rows, string path)
    {
        List<IGrouping<string, GrowthRow>> panels = [.. rows.GroupBy(row => row.Measure)];
        var plots = PictureStyle.SideBySide(panels.Count);
        plots.Layout = new ScottPlot.MultiplotLayouts.Grid(1, panels.Count);
        foreach (var (panel, number) in panels.Select((panel, number) => (panel, number)))
        {
            Draw(plots.GetPlot(number), panel);
        }

        PictureStyle.Save(plots, path, Width, Height);
    }

    private static void Draw(Plot plot, IGrouping<string, GrowthRow> panel)
    {
        PictureStyle.Dress(plot, $"time against {panel.Key}", panel.Key, "milliseconds");
        var palette = new ScottPlot.Palettes.ColorblindFriendly();
        foreach (var (curve, number) in panel.GroupBy(row => row.Question).Select((curve, number) => (curve, number)))
        {
            double[] sizes = [.. curve.Select(row => Math.Log10(row.Size))];
            double[] times = [.. curve.Select(row => Math.Log10(row.Milliseconds))];
            var line = plot.Add.Scatter(sizes, times, palette.GetColor(number));
            (line.LineWidth, line.MarkerSize, line.LegendText) = (2.5f, 6, curve.Key);
        }

        var legend = plot.ShowLegend(Alignment.UpperLeft);
        (legend.FontName, legend.FontSize) = (PictureStyle.Font, 12);
        plot.Axes.Bottom.TickGenerator = PictureStyle.Powers([2, 3, 4, 5, 6]);
        plot.Axes.Left.TickGenerator = PictureStyle.Powers([-3, -2, -1, 0, 1, 2, 3, 4]);
        plot.Axes.AutoScale();
        plot.Axes.SetLimitsY(plot.Axes.GetLimits().Bottom, plot.Axes.GetLimits().Top + 2.5);
    }
}
