using ScottPlot;

namespace CratePool.Pictures;

/// <summary>A stage on the sheet: an ellipse with its name and the part that stays.</summary>
internal sealed record StageNode(string Stage, Coordinates Center, Color Color, double Stays)
{
    internal const double RadiusX = 98;
    internal const double RadiusY = 44;
    private const double Gap = 5;
    private const double NameSize = 20;
    private const double LongestName = (2 * RadiusX) - 22;

    internal bool Covers(Coordinates point)
    {
        var (x, y) = ((point.X - Center.X) / (RadiusX + Gap), (point.Y - Center.Y) / (RadiusY + Gap));
        return (x * x) + (y * y) < 1;
    }

    internal CoordinateRect Box => new(Center.X - RadiusX, Center.X + RadiusX, Center.Y - RadiusY, Center.Y + RadiusY);

    internal void Draw(Board board)
    {
        board.Ellipse(Center, RadiusX, RadiusY, Color, Color.MixedWith(Colors.White, 0.88));
        var size = Math.Min(NameSize, NameSize * LongestName / board.Measure(Stage, NameSize).Width);
        board.Text(Stage, new Coordinates(Center.X, Center.Y + 11), size, StageColors.Ink, Alignment.MiddleCenter);
        board.Text(Stays == 1 ? "end" : $"stays {Percent.Short(Stays)}", new Coordinates(Center.X, Center.Y - 15), 15, Color, Alignment.MiddleCenter);
    }
}
