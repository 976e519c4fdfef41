using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>
/// The states outside a target set by what the structure says of reaching it: certainly, possibly, or never.
/// O(states + transitions).
/// </summary>
/// <param name="IsTarget">The targets themselves.</param>
/// <param name="IsCertain">States from which the target is reached with probability one.</param>
/// <param name="IsPossible">States from which the target may or may not be reached.</param>
internal sealed record TargetSplit(bool[] IsTarget, bool[] IsCertain, bool[] IsPossible)
{
    internal static TargetSplit Of(TransitionMatrix matrix, int[] targets)
    {
        var isTarget = new bool[matrix.Size];
        foreach (var target in targets)
        {
            isTarget[target] = true;
        }

        var backwards = matrix.OnGraph<SparseGraph, ReversedGraph>(default);
        var reaches = new Reachability(targets, isTarget).Run(backwards);
        var never = Enumerable.Range(0, matrix.Size).Where(state => !reaches[state]);
        var maySlip = new Reachability(never, isTarget).Run(backwards);
        var isCertain = new bool[matrix.Size];
        var isPossible = new bool[matrix.Size];
        for (var state = 0; state < matrix.Size; state++)
        {
            isCertain[state] = !isTarget[state] && reaches[state] && !maySlip[state];
            isPossible[state] = !isTarget[state] && reaches[state] && maySlip[state];
        }

        return new TargetSplit(isTarget, isCertain, isPossible);
    }
}
