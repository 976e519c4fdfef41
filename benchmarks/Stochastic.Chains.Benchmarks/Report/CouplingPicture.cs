using ScottPlot;
using Stochastic.Chains.Benchmarks.Accuracy;

namespace Stochastic.Chains.Benchmarks.Report;

/// <summary>
/// Error of the long-run shares against coupling, a panel for each method: what it was, and what the certificate claimed. The errors of the
/// other methods are in the background.
/// </summary>
internal static class CouplingPicture
{
    private const int Width = 1200;
    private const int Height = 780;
    private const int Columns = 3;
    private const double Lowest = -17;
    private const double Highest = 3;
    private const double NoAnswer = 1.6;

    private static readonly string[] Order =
        ["state reduction", "aggregation-disaggregation", "linear system (LU)", "eigenvector (QR iteration)", "power method", "Gauss-Seidel method"];

    internal static void Save(IEnumerable<Measured> rows, string path)
    {
        var methods = rows.Where(row => row is { Question: Inquiries.Shares, Family: AccuracyFamily.NearlyDecomposable })
            .GroupBy(row => row.Method)
            .Where(method => Order.Contains(method.Key))
            .OrderBy(method => Array.IndexOf(Order, method.Key))
            .ToDictionary(method => method.Key, method => method.ToList());
        var plots = PictureStyle.SideBySide(methods.Count);
        plots.Layout = new ScottPlot.MultiplotLayouts.Grid((methods.Count + Columns - 1) / Columns, Columns);
        foreach (var ((name, own), number) in methods.Select((method, number) => (method, number)))
        {
            Draw(plots.GetPlot(number), name, own, methods.Where(other => other.Key != name).Select(other => other.Value), number == 0);
        }

        PictureStyle.Save(plots, path, Width, Height);
    }

    private static void Draw(Plot plot, string name, List<Measured> own, IEnumerable<List<Measured>> others, bool isFirst)
    {
        PictureStyle.Dress(plot, name, "moves between groups, probability", "relative error of the worst share");
        foreach (var other in others)
        {
            Line(plot, other, row => row.Error, PictureStyle.Faint, 1, LinePattern.Solid);
        }

        Line(plot, own, row => row.BoundKind == BoundKind.Relative ? row.Bound : double.PositiveInfinity, PictureStyle.Claim, 2.5f, LinePattern.Dashed);
        Line(plot, own, row => row.Error, PictureStyle.Strong, 3, LinePattern.Solid);
        foreach (var row in own.Where(row => row.Answered < row.Chains))
        {
            var cross = plot.Add.Marker(Place(row), NoAnswer, MarkerShape.Eks, 9, PictureStyle.Ink);
            cross.MarkerLineWidth = 1.5f;
        }

        if (own.Exists(row => row.Answered < row.Chains))
        {
            PictureStyle.Write(plot, "× no answer", Place(own[0]), 2.5, PictureStyle.Ink, Alignment.MiddleLeft);
        }

        if (isFirst)
        {
            PictureStyle.Write(plot, "━ true error, by exact arithmetic", Place(own[0]), -1.5, PictureStyle.Strong, Alignment.MiddleLeft);
            PictureStyle.Write(plot, "╍ bound the certificate claims, if any", Place(own[0]), -3, PictureStyle.Claim, Alignment.MiddleLeft);
            PictureStyle.Write(plot, "━ true errors of the other methods", Place(own[0]), -4.5, Color.FromHex("#8A8A8A"), Alignment.MiddleLeft);
        }

        plot.Axes.Bottom.TickGenerator = PictureStyle.Powers([-3, -6, -9, -12, -15], exponent => -exponent);
        plot.Axes.Left.TickGenerator = PictureStyle.Powers([-16, -12, -8, -4, 0]);
        plot.Axes.SetLimits(1.5, 15.5, Lowest, Highest);
        plot.Layout.Fixed(new PixelPadding(70, 25, 60, 40));
    }

    private static double Place(Measured row) => -Math.Log10(row.Coupling);

    /// <summary>A line of the logarithms, with a gap where there is nothing.</summary>
    private static void Line(Plot plot, IReadOnlyList<Measured> rows, Func<Measured, double> amount, Color color, float width, LinePattern pattern)
    {
        List<(double X, double Y)> run = [];
        foreach (var row in rows.Append(null))
        {
            if (row is not null && double.IsFinite(amount(row)))
            {
                run.Add((Place(row), Math.Clamp(Math.Log10(amount(row)), Lowest, Highest)));
            }
            else if (run.Count > 0)
            {
                double[] couplings = [.. run.Select(point => point.X)];
                double[] amounts = [.. run.Select(point => point.Y)];
                var line = plot.Add.Scatter(couplings, amounts, color);
                (line.LineWidth, line.LinePattern, line.MarkerSize) = (width, pattern, width > 2.5f ? 7 : 0);
                run.Clear();
            }
        }
    }
}
