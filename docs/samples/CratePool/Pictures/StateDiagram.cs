using ScottPlot;
using Stochastic.Chains;

namespace CratePool.Pictures;

/// <summary>
/// Draws a chain as stages and arrows: the stages of use round an ellipse in the order of a crate's life, the ends of life in a
/// column beside it.
/// </summary>
internal static class StateDiagram
{
    private const int Width = 1440;
    private const int Height = 1000;
    private const int MostStages = 12;
    private const double Thin = 0.01;
    private const double FigureSize = 17;
    private static readonly Coordinates Middle = new(590, 490);

    /// <summary>Writes the picture.</summary>
    /// <param name="chain">The weekly moves.</param>
    /// <param name="stages">The stages in the order of a crate's life.</param>
    /// <param name="path">The file to write.</param>
    internal static void Save(Chain<string> chain, StageOrder stages, string path)
    {
        using var board = new Board(Width, Height);
        var nodes = PlaceNodes(chain, stages);
        var arrows = Arrows(chain, nodes);
        foreach (var arrow in arrows)
        {
            arrow.Draw(board, arrow.Probability < Thin);
        }

        foreach (var node in nodes)
        {
            node.Draw(board);
        }

        var places = new LabelPlaces(nodes, arrows);
        foreach (var arrow in arrows.Where(arrow => arrow.Probability >= Thin && arrow.Line.Count > 1).Reverse())
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

    private static List<StageNode> PlaceNodes(Chain<string> chain, StageOrder stages)
    {
        var shown = stages.InUse.Take(MostStages).ToList();
        var (radiusX, radiusY) = (Middle.X - StageNode.RadiusX - 50, (Height / 2) - StageNode.RadiusY - 110);
        var nodes = shown.Select((stage, number) =>
        {
            var angle = (Math.PI * 2 / 3) - (2 * Math.PI * number / shown.Count);
            return new StageNode(
                stage,
                new Coordinates(Middle.X + (radiusX * Math.Cos(angle)), Middle.Y + (radiusY * Math.Sin(angle))),
                StageColors.OfStage(number),
                chain[stage, stage]);
        }).ToList();
        nodes.AddRange(stages.Ends.Select((stage, number) => new StageNode(
            stage,
            new Coordinates(Width - StageNode.RadiusX - 30, Middle.Y + (260 * (((stages.Ends.Count - 1) / 2.0) - number))),
            StageColors.OfEnd(number),
            1)));
        return nodes;
    }

    private static List<Arrow> Arrows(Chain<string> chain, List<StageNode> nodes)
    {
        var byStage = nodes.ToDictionary(node => node.Stage);
        return
        [
            .. chain.Transitions
                .Where(move => move.From != move.To && byStage.ContainsKey(move.From) && byStage.ContainsKey(move.To))
                .OrderBy(move => move.Probability)
                .Select(move => new Arrow(byStage[move.From], byStage[move.To], move.Probability)),
        ];
    }
}
