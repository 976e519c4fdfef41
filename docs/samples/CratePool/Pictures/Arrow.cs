using ScottPlot;

namespace CratePool.Pictures;

/// <summary>The bowed way of a move from one stage to another: it bows to its own left, so that there and back stay apart.</summary>
internal sealed class Arrow
{
    private const int Pieces = 80;
    private const double Bow = 0.13;
    private const double HeadLength = 15;

    internal Arrow(StageNode from, StageNode to, double probability)
    {
        (From, To, Probability) = (from, to, probability);
        var (dx, dy) = (to.Center.X - from.Center.X, to.Center.Y - from.Center.Y);
        var control = new Coordinates(((from.Center.X + to.Center.X) / 2) - (Bow * dy), ((from.Center.Y + to.Center.Y) / 2) + (Bow * dx));
        Line = [.. Enumerable.Range(0, Pieces + 1).Select(piece => At(from.Center, control, to.Center, (double)piece / Pieces))
            .Where(point => !from.Covers(point) && !to.Covers(point))];
    }

    internal StageNode From { get; }

    internal StageNode To { get; }

    internal double Probability { get; }

    /// <summary>The visible points, from the edge of one node to the edge of the other.</summary>
    internal IReadOnlyList<Coordinates> Line { get; }

    internal double Width => 1.5 + (9 * Math.Sqrt(Probability));

    internal void Draw(Board board, bool isThin)
    {
        if (Line.Count < 2)
        {
            return;
        }

        var color = isThin ? From.Color.WithAlpha(0.45) : From.Color.WithAlpha(0.8);
        var width = isThin ? 1.5 : Width;
        var reach = HeadLength + width;
        var tip = Line[^1];
        var shaft = Line.Where(point => point.Distance(tip) > reach * 0.8).ToArray();
        var back = shaft.Length > 0 ? shaft[^1] : Line[0];
        var length = back.Distance(tip);
        var (ux, uy) = ((tip.X - back.X) / length, (tip.Y - back.Y) / length);
        var half = 4 + (width * 0.8);
        board.Line(shaft, color, width, isThin);
        board.Shape(
            [
                tip,
                new Coordinates(tip.X - (ux * reach) - (uy * half), tip.Y - (uy * reach) + (ux * half)),
                new Coordinates(tip.X - (ux * reach) + (uy * half), tip.Y - (uy * reach) - (ux * half)),
            ],
            color);
    }

    private static Coordinates At(Coordinates from, Coordinates control, Coordinates to, double t)
    {
        var (a, b, c) = ((1 - t) * (1 - t), 2 * t * (1 - t), t * t);
        return new Coordinates((a * from.X) + (b * control.X) + (c * to.X), (a * from.Y) + (b * control.Y) + (c * to.Y));
    }
}
