using Stochastic.Chains;

namespace CratePool;

/// <summary>The stages in the order of a crate's life, for tables and pictures.</summary>
/// <param name="InUse">The stages of use, each followed by the likeliest next one that is not listed yet.</param>
/// <param name="Ends">The stages that end a life.</param>
internal sealed record StageOrder(IReadOnlyList<string> InUse, IReadOnlyList<string> Ends)
{
    /// <summary>All stages, the ends last.</summary>
    internal IEnumerable<string> All => InUse.Concat(Ends);

    /// <summary>Follows the likeliest moves from the stage a new crate starts in.</summary>
    internal static StageOrder Of(Chain<string> chain, string first, IReadOnlyList<string> ends)
    {
        var open = chain.States.Except(ends).ToList();
        var inUse = new List<string>(open.Count);
        for (var stage = first; ; stage = open.MaxBy(next => chain[inUse[^1], next])!)
        {
            inUse.Add(stage);
            open.Remove(stage);
            if (open.Count == 0)
            {
                return new StageOrder(inUse, ends);
            }
        }
    }
}
