using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>Chains made from other chains. The old one stays as it is; labels are kept.</summary>
public static class ChainChanges
{
    /// <summary>Makes a chain in which some states are never left once they are entered.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain to start from.</param>
    /// <param name="states">The states to end in.</param>
    /// <returns>A chain with the same moves from all other states; from these only the stay. The unit of time is kept.</returns>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <remarks>
    /// What has arrived by a certain time, without counting anything twice, is then the share that stands in these states. O(transitions).
    /// </remarks>
    /// <example>
    /// <code>double failedWithinAYear = pump.MakeAbsorbing("failed").StartingIn("new").After(52)["failed"];</code>
    /// </example>
    public static Chain<TState> MakeAbsorbing<TState>(this Chain<TState> chain, params IEnumerable<TState> states)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(states);
        var ends = new bool[chain.StateCount];
        foreach (var state in states)
        {
            ends[chain.States.Require(state)] = true;
        }

        return ChangedRows<TState>.Of(chain, (from, moves) =>
        {
            if (ends[from])
            {
                moves.Clear();
                moves[from] = 1;
            }
        });
    }

    /// <summary>Makes a chain with another row for one state.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">A chain that was given per step.</param>
    /// <param name="from">The state whose moves change.</param>
    /// <param name="moves">All its moves with their probabilities, to states of the chain; to itself for a stay.</param>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="InvalidChainException">The row has faults; all are listed.</exception>
    /// <exception cref="InvalidOperationException">The chain was made from rates.</exception>
    /// <example><code>var better = pool.With("at shop", ("at shop", 0.5), ("dirty", 0.495), ("lost", 0.005));</code></example>
    public static Chain<TState> With<TState>(this Chain<TState> chain, TState from, params IEnumerable<(TState To, double Probability)> moves)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(moves);
        RequireSteps(chain);
        var row = chain.States.Require(from);
        var given = moves.Select(move => (Column: chain.States.Require(move.To), move.Probability)).OrderBy(move => move.Column).ToArray();
        var faults = new FaultCollector();
        new RowValidator<TState>(chain.States, RowSums.MustBeOne, faults)
            .Check(row, Array.ConvertAll(given, move => move.Column), Array.ConvertAll(given, move => move.Probability), refused: 0);
        faults.ThrowIfAny();
        return ChangedRows<TState>.Of(chain, (state, changed) =>
        {
            if (state == row)
            {
                changed.Clear();
                foreach (var (column, probability) in given)
                {
                    changed[column] = probability;
                }
            }
        });
    }

    /// <summary>Makes a chain in which one move is likelier and another from the same state less likely.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">A chain that was given per step.</param>
    /// <param name="from">The state whose moves change.</param>
    /// <param name="to">Where the move leads that becomes likelier.</param>
    /// <param name="amount">How much is shifted, above 0 and at most the probability of the move it is taken from.</param>
    /// <param name="takenFrom">Where the move leads that becomes less likely.</param>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="ArgumentException">Both moves lead to the same state.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The amount is not above 0, or more than there is.</exception>
    /// <exception cref="InvalidOperationException">The chain was made from rates.</exception>
    /// <example><code>var halved = pool.Shift("at shop", "dirty", amount: 0.005, takenFrom: "lost");</code></example>
    public static Chain<TState> Shift<TState>(this Chain<TState> chain, TState from, TState to, double amount, TState takenFrom)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        RequireSteps(chain);
        var (row, gaining, losing) = (chain.States.Require(from), chain.States.Require(to), chain.States.Require(takenFrom));
        if (gaining == losing)
        {
            throw new ArgumentException(Messages.ShiftToItself(to), nameof(takenFrom));
        }

        var available = chain.Matrix[row, losing];
        if (!(amount > 0 && amount <= available))
        {
            throw new ArgumentOutOfRangeException(nameof(amount), amount, Messages.ShiftTooMuch(from, takenFrom, amount, available));
        }

        return ChangedRows<TState>.Of(chain, (state, moves) =>
        {
            if (state == row)
            {
                moves[gaining] = Math.Min(1, moves.GetValueOrDefault(gaining) + amount);
                moves[losing] = available - amount;
            }
        });
    }

    /// <summary>Makes a chain that stays where it is with a given probability and moves as before otherwise.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">A chain that was given per step.</param>
    /// <param name="stay">The probability of not moving at all, above 0 and below 1.</param>
    /// <returns>A chain with the same long-run shares and without cycles.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The probability is not above 0 and below 1.</exception>
    /// <exception cref="InvalidOperationException">The chain was made from rates.</exception>
    /// <example><code>var withoutCycles = cycle.Lazy(0.5);</code></example>
    public static Chain<TState> Lazy<TState>(this Chain<TState> chain, double stay)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        RequireSteps(chain);
        if (!(stay > 0 && stay < 1))
        {
            throw new ArgumentOutOfRangeException(nameof(stay), stay, Messages.ProbabilityBetweenZeroAndOne(stay));
        }

        return ChangedRows<TState>.Of(chain, (state, moves) =>
        {
            foreach (var to in moves.Keys.ToArray())
            {
                moves[to] *= 1 - stay;
            }

            moves[state] = moves.GetValueOrDefault(state) + stay;
        });
    }

    /// <summary>
    /// Makes a chain without some states: of the moves of the others only those that do not lead into them, each row divided by what is left of it.
    /// </summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="chain">The chain to start from.</param>
    /// <param name="states">The states to leave out.</param>
    /// <returns>
    /// A chain over the other states; the rows that were divided are listed as rescaled, with their sum. Of a chain made from rates the rates between
    /// the others stay as they are.
    /// </returns>
    /// <exception cref="UnknownStateException">A label is none of the chain's states.</exception>
    /// <exception cref="ChainStructureException">No state is left, or one that is left can only move into those left out.</exception>
    /// <example><code>var whileInUse = pool.Without("lost", "scrapped");</code></example>
    public static Chain<TState> Without<TState>(this Chain<TState> chain, params IEnumerable<TState> states)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(chain);
        ArgumentNullException.ThrowIfNull(states);
        var leftOut = new bool[chain.StateCount];
        foreach (var state in states)
        {
            leftOut[chain.States.Require(state)] = true;
        }

        return ReducedChain<TState>.Without(chain, leftOut);
    }

    private static void RequireSteps<TState>(Chain<TState> chain)
        where TState : notnull
    {
        if (chain.UniformizationRate is not null)
        {
            throw new InvalidOperationException(Messages.ChangeTheRates);
        }
    }
}
