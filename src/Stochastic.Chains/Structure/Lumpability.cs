using System.Diagnostics;
using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;
using Stochastic.Chains.Structure;

namespace Stochastic.Chains;

/// <summary>Whether states can be taken together, and what stands in the way.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <typeparam name="TGroup">The type of a group.</typeparam>
/// <remarks>Immutable and safe for concurrent use.</remarks>
/// <example>
/// <code>
/// var verdict = pool.Lumpability(state => state is "lost" or "scrapped" ? "gone" : state);
/// Console.WriteLine(verdict);
/// </code>
/// </example>
[DebuggerDisplay("{ToString(),nq}")]
public sealed class Lumpability<TState, TGroup>
    where TState : notnull
    where TGroup : notnull
{
    private readonly Chain<TState> _chain;
    private readonly int[] _groupOf;
    private readonly double[][] _into;
    private readonly string _account;

    private Lumpability(Chain<TState> chain, int[] groupOf, IReadOnlyList<TGroup> groups, double[][] into, double tolerance)
    {
        _chain = chain;
        _groupOf = groupOf;
        _into = into;
        Groups = groups;
        (LargestDifference, _account) = Compare();
        IsLumpable = LargestDifference <= tolerance;
    }

    /// <summary>Gets the groups, in the order in which they are first met.</summary>
    public IReadOnlyList<TGroup> Groups { get; }

    /// <summary>Gets whether all states of each group move into each group with the same probability, within the tolerance.</summary>
    public bool IsLumpable { get; }

    /// <summary>Gets the largest difference between two states of a group in the probability of moving into a group, as a part of the larger one.</summary>
    public double LargestDifference { get; }

    /// <summary>Makes the chain of the groups. Each move has the mean probability over the states of its group.</summary>
    /// <exception cref="ChainStructureException">They cannot be taken together; the message names two states and the difference.</exception>
    public Chain<TGroup> ToChain()
    {
        if (!IsLumpable)
        {
            throw new ChainStructureException(_account, []);
        }

        var moves = new TripletList();
        for (var from = 0; from < Groups.Count; from++)
        {
            int[] members = [.. Enumerable.Range(0, _groupOf.Length).Where(state => _groupOf[state] == from)];
            for (var to = 0; to < Groups.Count; to++)
            {
                var probability = CompensatedSum.Of(Array.ConvertAll(members, member => _into[to][member])) / members.Length;
                if (probability > 0)
                {
                    moves.Add(from, to, Math.Min(1, probability));
                }
            }
        }

        return new Chain<TGroup>(
            StateSpace.Of(Groups), TransitionMatrix.FromCompressedRows(moves.ToCompressedRows(Groups.Count)), [], _chain.UniformizationRate);
    }

    /// <summary>The verdict in a sentence, the same in every culture.</summary>
    public override string ToString() => IsLumpable
        ? $"lumpable into {Text.Count(Groups.Count, "group", "groups")}; largest difference {Text.Short(LargestDifference)}"
        : _account;

    internal static Lumpability<TState, TGroup> Of(Chain<TState> chain, Func<TState, TGroup> groupOf, double tolerance)
    {
        var (numbers, groups) = Grouping.Of(chain.States.Select(groupOf));
        var sums = groups.Select(_ => new CompensatedSum[chain.StateCount]).ToArray();
        for (var state = 0; state < chain.StateCount; state++)
        {
            foreach (var (to, probability) in chain.Matrix.Row(state))
            {
                sums[numbers[to]][state].Add(probability);
            }
        }

        return new Lumpability<TState, TGroup>(chain, numbers, groups, Array.ConvertAll(sums, row => Array.ConvertAll(row, sum => sum.Value)), tolerance);
    }

    private (double Difference, string Account) Compare()
    {
        var (largest, account) = (0.0, string.Empty);
        var least = new int[Groups.Count];
        var most = new int[Groups.Count];
        for (var into = 0; into < Groups.Count; into++)
        {
            least.AsSpan().Fill(-1);
            for (var state = 0; state < _groupOf.Length; state++)
            {
                var group = _groupOf[state];
                if (least[group] < 0)
                {
                    (least[group], most[group]) = (state, state);
                }

                least[group] = _into[into][state] < _into[into][least[group]] ? state : least[group];
                most[group] = _into[into][state] > _into[into][most[group]] ? state : most[group];
            }

            for (var group = 0; group < Groups.Count; group++)
            {
                var (low, high) = (_into[into][least[group]], _into[into][most[group]]);
                if (high > low && (high - low) / high > largest)
                {
                    largest = (high - low) / high;
                    account = Messages.NotLumpable(_chain.States[most[group]], high, _chain.States[least[group]], low, Groups[group], Groups[into]);
                }
            }
        }

        return (largest, account);
    }
}
