using ScottPlot;
using Stochastic.Chains;

namespace CratePool.Pictures;

/// <summary>
/// Places the stages: those of use clockwise round an ellipse, the ends of life in a column to its right. The ellipse is turned
/// until no arrow runs behind a stage, or as few as can be.
/// </summary>
internal sealed class StageLayout
{
    private const int Turns = 72;
    private const double EndDistance = 230;

    private StageLayout(IReadOnlyList<StageNode> nodes, IReadOnlyList<Arrow> arrows) => (Nodes, Arrows) = (nodes, arrows);

    internal IReadOnlyList<StageNode> Nodes { get; }

    /// <summary>The moves from stage to stage, the likeliest last.</summary>
    internal IReadOnlyList<Arrow> Arrows { get; }

    /// <summary>Finds the places on a sheet.</summary>
    internal static StageLayout Of(Chain<string> chain, StageOrder stages, CoordinateRect sheet) =>
        Enumerable.Range(0, Turns)
            .Select(turn => Turned(chain, stages, sheet, (Math.PI * 2 / 3) + (2 * Math.PI * turn / Turns)))
            .MinBy(layout => layout.Hidden)!;

    /// <summary>How many points of arrows lie behind stages that the arrow does not belong to.</summary>
    private int Hidden => Arrows.Sum(arrow => Nodes
        .Where(node => node != arrow.From && node != arrow.To)
        .Sum(node => arrow.Line.Count(node.Covers)));

    private static StageLayout Turned(Chain<string> chain, StageOrder stages, CoordinateRect sheet, double firstAngle)
    {
        var column = stages.Ends.Count > 0 ? (2 * StageNode.RadiusX) + 60 : 0;
        var middle = new Coordinates((sheet.Left + sheet.Right - column) / 2, sheet.VerticalCenter);
        var radiusX = ((sheet.Width - column) / 2) - StageNode.RadiusX;
        var radiusY = (sheet.Height / 2) - StageNode.RadiusY;
        var nodes = stages.InUse.Select((stage, number) =>
        {
            var angle = firstAngle - (2 * Math.PI * number / stages.InUse.Count);
            var center = new Coordinates(middle.X + (radiusX * Math.Cos(angle)), middle.Y + (radiusY * Math.Sin(angle)));
            return new StageNode(stage, center, StageColors.OfStage(number), chain[stage, stage]);
        }).ToList();
        nodes.AddRange(stages.Ends.Select((stage, number) =>
        {
            var center = new Coordinates(sheet.Right - StageNode.RadiusX, middle.Y + (EndDistance * (((stages.Ends.Count - 1) / 2.0) - number)));
            return new StageNode(stage, center, StageColors.OfEnd(number), 1);
        }));
        return new StageLayout(nodes, ArrowsBetween(nodes, chain));
    }

    private static List<Arrow> ArrowsBetween(List<StageNode> nodes, Chain<string> chain)
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
