using ScottPlot;

namespace CratePool.Pictures;

/// <summary>A white sheet measured in pixels, origin at the lower left, to draw lines, shapes and text on.</summary>
internal sealed class Board : IDisposable
{
    private readonly Plot _plot = new();
    private readonly Paint _paint = Paint.NewDisposablePaint();
    private readonly int _width;
    private readonly int _height;

    internal Board(int width, int height)
    {
        (_width, _height) = (width, height);
        _plot.HideAxesAndGrid();
        _plot.Layout.Frameless();
        _plot.Axes.SetLimits(0, width, 0, height);
    }

    internal void Line(IEnumerable<Coordinates> points, Color color, double width, bool dashed)
    {
        var line = _plot.Add.ScatterLine(points.ToArray(), color);
        line.LineWidth = (float)width;
        line.LinePattern = dashed ? LinePattern.Dotted : LinePattern.Solid;
    }

    internal void Shape(Coordinates[] corners, Color color)
    {
        var shape = _plot.Add.Polygon(corners);
        shape.FillColor = color;
        shape.LineWidth = 0;
    }

    internal void Ellipse(Coordinates center, double radiusX, double radiusY, Color border, Color fill)
    {
        var ellipse = _plot.Add.Ellipse(center, radiusX, radiusY);
        ellipse.LineColor = border;
        ellipse.LineWidth = 3;
        ellipse.FillColor = fill;
    }

    internal void Text(string text, Coordinates place, double size, Color color, Alignment alignment)
    {
        var label = _plot.Add.Text(text, place);
        label.LabelFontName = PictureFont.Name;
        label.LabelFontSize = (float)size;
        label.LabelFontColor = color;
        label.LabelAlignment = alignment;
        label.LabelPadding = 0;
    }

    /// <summary>A text in the middle of a white patch, so that a line behind it does not cross it out.</summary>
    internal void TextOnPatch(string text, CoordinateRect patch, double size, Color color)
    {
        Shape([patch.TopLeft, patch.TopRight, patch.BottomRight, patch.BottomLeft], Colors.White.WithAlpha(0.85));
        Text(text, patch.Center, size, color, Alignment.MiddleCenter);
    }

    internal PixelSize Measure(string text, double size) =>
        new LabelStyle { FontName = PictureFont.Name, FontSize = (float)size }.Measure(text, _paint).Size;

    internal void Save(string path) => _plot.SavePng(path, _width, _height);

    public void Dispose()
    {
        _paint.Dispose();
        _plot.Dispose();
    }
}
