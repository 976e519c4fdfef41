using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;
using Stochastic.Chains.Passage;

namespace Stochastic.Chains;

/// <summary>Chains made from other chains by solving for something first.</summary>
public static class ChainReduction
{
    /// <summary>Makes the chain as it looks when time runs backwards, standing in its long-run shares.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">A chain whose states can all be reached from each other.</param>
    /// <returns>A chain that moves from i to j with probability π_j · p_ji / π_i. The unit of time is kept.</returns>
    /// <exception cref="ChainStructureException">Some state cannot be reached from some other.</exception>
    /// <exception cref="NumericalRangeException">A probability of the new chain is smaller than a double can hold.</exception>
    /// <example><code>var whereFrom = pump.Reverse().Row("failed");</code></example>
    public static Chain<TState> Reverse<TState>(this Chain<TState> chain)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        if (!chain.Structure().IsIrreducible)
        {
            throw new ChainStructureException(Messages.NotReversed, chain.Structure().Classes.Select(group => (object)group.States[0]));
        }

        var shares = chain.Stationary();
        var moves = new TripletList();
        for (var from = 0; from < chain.StateCount; from++)
        {
            foreach (var (to, probability) in chain.Matrix.Row(from))
            {
                var backwards = from == to ? probability : probability * (shares.Values[from] / shares.Values[to]);
                moves.Add(to, from, double.IsNormal(backwards) ? Math.Min(1, backwards) : throw OutOfRange(chain.States[to], chain.States[from]));
            }
        }

        return new Chain<TState>(
            chain.States, TransitionMatrix.FromCompressedRows(moves.ToCompressedRows(chain.StateCount)), [], chain.UniformizationRate);
    }

    /// <summary>
    /// Makes the chain that is seen when one looks only while it is in some states: the stochastic complement (Meyer 1989), or censored chain.
    /// </summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain to look at.</param>
    /// <param name="states">The states in which it is looked at, at least one.</param>
    /// <returns>
    /// A chain over these states, in the order of the old one: a step leads to the next of them that is entered, whatever lies between. Of a chain made
    /// from rates the time outside does not count, and the unit of time is kept.
    /// </returns>
    /// <exception cref="ArgumentException">No states are given.</exception>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="ChainStructureException">The chain may leave these states for ever.</exception>
    /// <exception cref="MemoryLimitException">Too many states are left out for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">A probability of coming back is smaller than a double can hold.</exception>
    /// <remarks>
    /// State reduction without subtraction: O(r² (r + k)) for r states left out and k looked at. Its long-run shares are those of the chain, divided by their
    /// sum.
    /// </remarks>
    /// <example><code>var atWork = pump.Censor("new", "worn");</code></example>
    public static Chain<TState> Censor<TState>(this Chain<TState> chain, params IEnumerable<TState> states)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(states);
        int[] kept = [.. states.Select(chain.States.Require).Distinct().Order()];
        if (kept.Length == 0)
        {
            throw new ArgumentException(Messages.NoTargets, nameof(states));
        }

        RequireReturn(chain, kept);
        int[] others = [.. Enumerable.Range(0, chain.StateCount).Except(kept)];
        var position = ReducedChain<TState>.PositionsOf(kept, chain.StateCount);
        var rows = kept.Select(_ => new double[kept.Length]).ToArray();
        AddDirectMoves(chain, kept, position, rows);
        if (others.Length > 0)
        {
            AddDetours(chain, kept, others, position, rows);
        }

        var moves = new TripletList();
        for (var row = 0; row < rows.Length; row++)
        {
            for (var column = 0; column < rows.Length; column++)
            {
                if (rows[row][column] > 0)
                {
                    moves.Add(row, column, Math.Min(1, rows[row][column]));
                }
            }
        }

        return ReducedChain<TState>.Over(chain, kept, moves, []);
    }

    private static void RequireReturn<TState>(Chain<TState> chain, int[] kept)
        where TState : notnull
    {
        var isKept = ReducedChain<TState>.PositionsOf(kept, chain.StateCount);
        var reached = chain.Matrix.OnGraph<bool[], Reachability>(new Reachability(kept));
        var away = chain.Structure().RecurrentClasses.FirstOrDefault(group => reached[group.Members[0]] && group.Members.All(member => isKept[member] < 0));
        if (away is not null)
        {
            throw new ChainStructureException(Messages.MayNeverReturn(away.States[0]), [away.States[0]]);
        }
    }

    private static void AddDirectMoves<TState>(Chain<TState> chain, int[] kept, int[] position, double[][] rows)
        where TState : notnull
    {
        for (var row = 0; row < kept.Length; row++)
        {
            foreach (var (to, probability) in chain.Matrix.Row(kept[row]))
            {
                rows[row][position[to] < 0 ? row : position[to]] += position[to] < 0 ? 0 : probability;
            }
        }
    }

    /// <summary>Adds the moves into other states, each times where the way back from there leads.</summary>
    private static void AddDetours<TState>(Chain<TState> chain, int[] kept, int[] others, int[] position, double[][] rows)
        where TState : notnull
    {
        var isBack = new Reachability(kept).Run(chain.Matrix.OnGraph<SparseGraph, ReversedGraph>(default));
        int[] back = [.. others.Where(state => isBack[state])];
        using var system = new ExitSystem<TState>(chain, back, kept.Length, position, new SolveOptions());
        var place = ReducedChain<TState>.PositionsOf(back, chain.StateCount);
        for (var column = 0; column < kept.Length; column++)
        {
            var returns = system.ExitProbabilities(column).Values;
            for (var row = 0; row < kept.Length; row++)
            {
                foreach (var (to, probability) in chain.Matrix.Row(kept[row]))
                {
                    rows[row][column] += place[to] < 0 ? 0 : probability * returns[place[to]];
                }
            }
        }
    }

    private static NumericalRangeException OutOfRange(object from, object to) => new(Messages.ConditionalTooSmall(from, to), Text.Label(from));
}
