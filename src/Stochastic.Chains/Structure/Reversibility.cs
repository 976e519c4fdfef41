using System.Diagnostics;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>Whether a chain looks the same when time runs backwards.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>Immutable and safe for concurrent use.</remarks>
/// <example>
/// <code>
/// Reversibility&lt;string&gt; verdict = chain.Reversibility();
/// if (!verdict.IsReversible) { Console.WriteLine($"not reversible, see {verdict.Witness}"); }
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class Reversibility<TState>
    where TState : notnull
{
    private Reversibility(bool isReversible, double largestDeviation, Transition<TState>? witness)
    {
        IsReversible = isReversible;
        LargestDeviation = largestDeviation;
        Witness = witness;
    }

    /// <summary>Gets whether all flows between pairs of states balance within the tolerance.</summary>
    public bool IsReversible { get; }

    /// <summary>Gets the largest relative difference between the flow of a move and that of the move back, from 0 to 1.</summary>
    public double LargestDeviation { get; }

    /// <summary>Gets the move whose flow differs most from that of the move back; null when nothing differs.</summary>
    public Transition<TState>? Witness { get; }

    /// <summary>A short account of the verdict, the same in every culture.</summary>
    public override string ToString() => IsReversible
        ? $"reversible; largest deviation {Text.Short(LargestDeviation)}"
        : $"not reversible: {Text.Quoted(Witness!.Value.From)} to {Text.Quoted(Witness.Value.To)} differs by {Text.Short(LargestDeviation)} from the way back";

    internal static Reversibility<TState> Of(Chain<TState> chain, double tolerance)
    {
        var matrix = chain.Matrix;
        var weights = new ScaledDouble[matrix.Size];
        var largest = 0.0;
        (int From, int To)? witness = null;
        foreach (var group in chain.Structure().RecurrentClasses)
        {
            SpreadWeights(matrix, group.Members[0], weights);
            foreach (var from in group.Members)
            {
                foreach (var (to, probability) in matrix.Row(from))
                {
                    var deviation = RelativeDifference(weights[from] * probability, weights[to] * matrix[to, from]);
                    if (deviation > largest)
                    {
                        largest = deviation;
                        witness = (from, to);
                    }
                }
            }
        }

        var transition = witness is { } move
            ? new Transition<TState>(chain.States[move.From], chain.States[move.To], matrix[move.From, move.To])
            : (Transition<TState>?)null;
        return new Reversibility<TState>(largest <= tolerance, largest, transition);
    }

    /// <summary>
    /// Gives each state of a class the weight that balances the flows along a breadth-first spanning tree. Moves without a way back
    /// are left out; a state reached only by such moves keeps weight zero, and the check of its moves then fails.
    /// </summary>
    internal static void SpreadWeights(TransitionMatrix matrix, int root, ScaledDouble[] weights)
    {
        weights[root] = ScaledDouble.One;
        var waiting = new Queue<int>();
        waiting.Enqueue(root);
        while (waiting.TryDequeue(out var from))
        {
            foreach (var (to, probability) in matrix.Row(from))
            {
                var back = weights[to].IsZero ? matrix[to, from] : 0;
                if (back > 0)
                {
                    weights[to] = weights[from] * probability / back;
                    waiting.Enqueue(to);
                }
            }
        }
    }

    private static double RelativeDifference(ScaledDouble first, ScaledDouble second)
    {
        if (first.IsZero || second.IsZero)
        {
            return first.IsZero && second.IsZero ? 0 : 1;
        }

        var ratio = (first / second).ToDouble();
        return ratio > 1 ? 1 - (1 / ratio) : 1 - ratio;
    }
}
