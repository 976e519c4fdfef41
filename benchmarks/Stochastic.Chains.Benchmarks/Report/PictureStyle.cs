using System.Text;
using ScottPlot;
using ScottPlot.TickGenerators;
using SkiaSharp;

namespace Stochastic.Chains.Benchmarks.Report;

/// <summary>What the pictures have in common. Their typeface lies beside the program, since a bare server often has none.</summary>
internal static class PictureStyle
{
    private const string Family = "DejaVu Sans";

    /// <summary>What a browser takes; letters of the second are as wide as those of the first.</summary>
    private const string Families = "DejaVu Sans, Verdana, sans-serif";

    private const float LabelSize = 13;

    private static readonly Lazy<string> Loaded = new(Load);

    internal static Color Ink { get; } = Color.FromHex("#2B2B2B");

    internal static Color Strong { get; } = Color.FromHex("#14507A");

    internal static Color Claim { get; } = Color.FromHex("#C46A10");

    internal static Color Faint { get; } = Color.FromHex("#C9C9C9");

    internal static string Font => Loaded.Value;

    /// <summary>Powers of ten along an axis of logarithms.</summary>
    internal static NumericManual Powers(IReadOnlyList<int> exponents) => Powers(exponents, exponent => exponent);

    /// <summary>Powers of ten along an axis that runs another way.</summary>
    internal static NumericManual Powers(IReadOnlyList<int> exponents, Func<int, double> place) =>
        new([.. exponents.Select(place)], [.. exponents.Select(PowerOfTen)]);

    internal static void Dress(Plot plot, string title, string bottom, string left)
    {
        plot.Font.Set(Font);
        plot.Title(title, LabelSize + 2);
        plot.XLabel(bottom, LabelSize);
        plot.YLabel(left, LabelSize);
        plot.Axes.Title.Label.Bold = false;
        plot.Axes.Bottom.Label.Bold = false;
        plot.Axes.Left.Label.Bold = false;
        plot.Axes.Bottom.TickLabelStyle.FontSize = LabelSize;
        plot.Axes.Left.TickLabelStyle.FontSize = LabelSize;
        plot.Axes.Right.IsVisible = false;
        plot.Axes.Top.IsVisible = false;
        plot.Axes.Color(Ink);
        plot.Grid.MajorLineColor = Color.FromHex("#ECECEC");
        plot.FigureBackground.Color = Colors.White;
    }

    internal static void Write(Plot plot, string text, double x, double y, Color color, Alignment alignment)
    {
        var label = plot.Add.Text(text, x, y);
        (label.LabelFontName, label.LabelFontSize, label.LabelFontColor, label.LabelAlignment) = (Font, LabelSize, color, alignment);
    }

    /// <summary>So many empty plots.</summary>
    internal static Multiplot SideBySide(int count)
    {
        var plots = new Multiplot();
        while (plots.Count() < count)
        {
            plots.AddPlot();
        }

        return plots;
    }

    /// <summary>Plots side by side in one drawing.</summary>
    internal static void Save(Multiplot plots, string path, int width, int height)
    {
        using var drawing = new MemoryStream();
        using (var canvas = SKSvgCanvas.Create(new SKRect(0, 0, width, height), drawing))
        {
            plots.Render(canvas, new PixelRect(0, width, height, 0));
        }

        var text = Encoding.UTF8.GetString(drawing.ToArray()).Replace($"\"{Family}\"", $"\"{Families}\"", StringComparison.Ordinal);
        File.WriteAllText(path, text.TrimEnd() + "\n");
        Console.WriteLine($"Wrote {path}.");
    }

    private static string PowerOfTen(int exponent)
    {
        const string digits = "⁰¹²³⁴⁵⁶⁷⁸⁹";
        var text = string.Concat(Math.Abs(exponent).ToString(System.Globalization.CultureInfo.InvariantCulture).Select(digit => digits[digit - '0']));
        return exponent switch { 0 => "1", < 0 => $"10⁻{text}", _ => $"10{text}" };
    }

    private static string Load()
    {
        Fonts.AddFontFile(Family, Path.Combine(AppContext.BaseDirectory, "Font", "DejaVuSans.ttf"));
        return Family;
    }
}
