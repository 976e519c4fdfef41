using ScottPlot;
using Stochastic.Chains;

namespace CratePool.Pictures;

/// <summary>Draws a chain as stages and arrows.</summary>
internal static class StateDiagram
{
    private const int Width = 1440;
    private const int Height = 1000;
    private const int MostStages = 12;
    private const double Thin = 0.01;
    private const double FigureSize = 17;

    /// <summary>Writes the picture.</summary>
    /// <param name="chain">The weekly moves.</param>
    /// <param name="stages">The stages in the order of a crate's life.</param>
    /// <param name="path">The file to write.</param>
    internal static void Save(Chain<string> chain, StageOrder stages, string path)
    {
        using var board = new Board(Width, Height);
        var shown = stages with { InUse = [.. stages.InUse.Take(MostStages)] };
        var layout = StageLayout.Of(chain, shown, new CoordinateRect(40, Width - 30, 80, Height - 85));
        foreach (var arrow in layout.Arrows)
        {
            arrow.Draw(board, arrow.Probability < Thin);
        }

        foreach (var node in layout.Nodes)
        {
            node.Draw(board);
        }

        var places = new LabelPlaces(layout);
        foreach (var arrow in layout.Arrows.Where(arrow => arrow.Probability >= Thin && arrow.Line.Count > 1).Reverse())
        {
            var figure = Percent.Short(arrow.Probability);
            board.TextOnPatch(figure, places.Find(arrow, board.Measure(figure, FigureSize)), FigureSize, arrow.From.Color);
        }

        board.Text("Where a crate goes within one week", new Coordinates(40, Height - 36), 28, StageColors.Ink, Alignment.MiddleLeft);
        board.Text(Caption(stages), new Coordinates(40, 34), 16, StageColors.Faint, Alignment.MiddleLeft);
        board.Save(path);
    }

    private static string Caption(StageOrder stages)
    {
        var dropped = Math.Max(0, stages.InUse.Count - MostStages);
        var text = "Figure and width of an arrow: the part of the crates in a stage that makes this move in a week. Dotted: below 1%.";
        return dropped == 0 ? text : $"{text} Not drawn: {dropped} rarer stages.";
    }
}
