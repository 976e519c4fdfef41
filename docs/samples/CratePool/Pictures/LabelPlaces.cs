using ScottPlot;

namespace CratePool.Pictures;

/// <summary>Finds a free place along each arrow for its figure.</summary>
internal sealed class LabelPlaces(StageLayout layout)
{
    private const double Taken = 1000;
    private const double Crossed = 4;
    private const double OffCenter = 12;
    private const double Margin = 11;

    private readonly List<CoordinateRect> _taken = [];

    /// <summary>The best patch of a given size on an arrow: clear of nodes and other figures first, then of other arrows, then central.</summary>
    internal CoordinateRect Find(Arrow arrow, PixelSize size)
    {
        var best = Enumerable.Range(3, 15)
            .Select(twentieth => twentieth / 20.0)
            .Select(part => (Patch: PatchAt(arrow.Line[(int)(part * (arrow.Line.Count - 1))], size), Part: part))
            .MinBy(place => Cost(place.Patch, arrow) + (OffCenter * Math.Abs(place.Part - 0.5)))
            .Patch;
        _taken.Add(best);
        return best;
    }

    private double Cost(CoordinateRect patch, Arrow own) =>
        (Taken * _taken.Concat(layout.Nodes.Select(node => node.Box)).Count(box => Overlap(box, Widened(patch)))) +
        (Crossed * layout.Arrows.Where(arrow => arrow != own).Sum(arrow => arrow.Line.Count(patch.Contains)));

    private static CoordinateRect PatchAt(Coordinates center, PixelSize size) =>
        new(center.X - (size.Width / 2) - 3, center.X + (size.Width / 2) + 3, center.Y - (size.Height / 2) - 1, center.Y + (size.Height / 2) + 1);

    private static CoordinateRect Widened(CoordinateRect patch) =>
        new(patch.Left - Margin, patch.Right + Margin, patch.Bottom - Margin, patch.Top + Margin);

    private static bool Overlap(CoordinateRect a, CoordinateRect b) => a.Left < b.Right && b.Left < a.Right && a.Bottom < b.Top && b.Bottom < a.Top;
}
