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
    internal static TargetSplit Of<TState>(Chain<TState> chain, int[] targets)
        where TState : notnull
    {
        var isTarget = new bool[chain.StateCount];
        foreach (var target in targets)
        {
            isTarget[target] = true;
        }

        // Where every state can be reached from every other, so can the targets; the structure is known already or found fast.
        return chain.Structure().IsIrreducible
            ? new TargetSplit(isTarget, Array.ConvertAll(isTarget, target => !target), new bool[isTarget.Length])
            : Search(chain.Matrix, isTarget, targets, isTarget);
    }

    /// <summary>The same for targets that count only while some other states have not been entered; those are never left.</summary>
    internal static TargetSplit Before(TransitionMatrix matrix, int[] targets, int[] others)
    {
        var (isTarget, isStopped) = (new bool[matrix.Size], new bool[matrix.Size]);
        foreach (var target in targets)
        {
            isTarget[target] = isStopped[target] = true;
        }

        foreach (var other in others)
        {
            isStopped[other] = true;
        }

        return Search(matrix, isTarget, targets, isStopped);
    }

    private static TargetSplit Search(TransitionMatrix matrix, bool[] isTarget, int[] targets, bool[] isStopped)
    {
        var backwards = matrix.OnGraph<SparseGraph, ReversedGraph>(default);
        var reaches = new Reachability(targets, isStopped).Run(backwards);
        var never = Enumerable.Range(0, matrix.Size).Where(state => !reaches[state]);
        var maySlip = new Reachability(never, isStopped).Run(backwards);
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
