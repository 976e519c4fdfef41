using System.Diagnostics.CodeAnalysis;

namespace Stochastic.Chains;

/// <summary>Makes Markov chains. Every chain is validated; an input with faults is refused with all of them listed.</summary>
/// <remarks>
/// Row = from, column = to; rows sum to one within rounding (see <see cref="RowSums"/>). States keep the order in which they are
/// given or first seen. A zero is no transition.
/// </remarks>
public static partial class Chain
{
    /// <summary>Makes a chain from rows written out in code.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="rows">Gives the rows, one for each state.</param>
    /// <returns>The chain, its states in the order in which the rows first name them.</returns>
    /// <exception cref="InvalidChainException">The rows have faults; all are listed.</exception>
    /// <example>
    /// <code>
    /// var pump = Chain.Build&lt;string&gt;(rows => rows
    ///     .Row("new", ("new", 0.90), ("worn", 0.10))
    ///     .Row("worn", ("worn", 0.75), ("failed", 0.25))
    ///     .Row("failed", ("new", 1.0)));
    /// </code>
    /// </example>
    public static Chain<TState> Build<TState>(Action<ChainRows<TState>> rows)
        where TState : notnull => Build(rows, new ChainOptions<TState>());

    /// <summary>Makes a chain from rows written out in code, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="rows">Gives the rows, one for each state.</param>
    /// <param name="options">How labels are compared and what is done with row sums.</param>
    /// <exception cref="InvalidChainException">The rows have faults; all are listed.</exception>
    public static Chain<TState> Build<TState>(Action<ChainRows<TState>> rows, ChainOptions<TState> options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(rows);
        ArgumentNullException.ThrowIfNull(options);
        var assembler = new ChainAssembler<TState>(options);
        var given = new ChainRows<TState>(assembler);
        rows(given);
        given.Close();
        return assembler.Assemble() ?? throw assembler.Faults.ToException();
    }

    /// <summary>Makes a chain from single moves in any order, as they come from a file or a query; its states are those first seen.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="transitions">The moves, each pair of states at most once; read once, in O(transitions).</param>
    /// <remarks>Ten million moves over a million states are ordinary: besides the result about 16 bytes a move are held while reading.</remarks>
    /// <exception cref="InvalidChainException">The moves have faults; all are listed.</exception>
    /// <example>
    /// <code>
    /// var chain = Chain.FromTransitions([
    ///     new Transition&lt;string&gt;("clean", "filled", 1.0),
    ///     new Transition&lt;string&gt;("filled", "clean", 1.0)]);
    /// </code>
    /// </example>
    public static Chain<TState> FromTransitions<TState>(IEnumerable<Transition<TState>> transitions)
        where TState : notnull => FromTransitions(transitions, new ChainOptions<TState>());

    /// <summary>Makes a chain from single moves in any order, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="transitions">The moves, each pair of states at most once; read once.</param>
    /// <param name="options">How labels are compared and what is done with row sums.</param>
    /// <exception cref="InvalidChainException">The moves have faults; all are listed.</exception>
    public static Chain<TState> FromTransitions<TState>(IEnumerable<Transition<TState>> transitions, ChainOptions<TState> options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(options);
        var assembler = Collect(transitions, new ChainAssembler<TState>(options));
        return assembler.Assemble() ?? throw assembler.Faults.ToException();
    }

    /// <summary>Makes a chain from single moves between given states; a label outside the list is a fault.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">All states, each once; they keep this order.</param>
    /// <param name="transitions">The moves, each pair of states at most once; read once.</param>
    /// <exception cref="InvalidChainException">The states or moves have faults; all are listed.</exception>
    public static Chain<TState> FromTransitions<TState>(IEnumerable<TState> states, IEnumerable<Transition<TState>> transitions)
        where TState : notnull => FromTransitions(states, transitions, new ChainOptions<TState>());

    /// <summary>Makes a chain from single moves between given states, with options.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="states">All states, each once; they keep this order.</param>
    /// <param name="transitions">The moves, each pair of states at most once; read once.</param>
    /// <param name="options">How labels are compared and what is done with row sums.</param>
    /// <exception cref="InvalidChainException">The states or moves have faults; all are listed.</exception>
    public static Chain<TState> FromTransitions<TState>(IEnumerable<TState> states, IEnumerable<Transition<TState>> transitions, ChainOptions<TState> options)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(states);
        ArgumentNullException.ThrowIfNull(options);
        var assembler = Collect(transitions, ChainAssembler<TState>.ForStates(states, options));
        return assembler.Assemble() ?? throw assembler.Faults.ToException();
    }

    /// <summary>Makes a chain from single moves in any order, or reports the faults without throwing.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="transitions">The moves, each pair of states at most once; read once.</param>
    /// <param name="chain">The chain, or null when there are faults.</param>
    /// <param name="faults">The faults; empty when there is a chain.</param>
    /// <returns>Whether there is a chain.</returns>
    public static bool TryFromTransitions<TState>(
        IEnumerable<Transition<TState>> transitions, [NotNullWhen(true)] out Chain<TState>? chain, out IReadOnlyList<ChainFault> faults)
        where TState : notnull => TryFromTransitions(transitions, new ChainOptions<TState>(), out chain, out faults);

    /// <summary>Makes a chain from single moves in any order, with options, or reports the faults without throwing.</summary>
    /// <typeparam name="TState">The type of a state.</typeparam>
    /// <param name="transitions">The moves, each pair of states at most once; read once.</param>
    /// <param name="options">How labels are compared and what is done with row sums.</param>
    /// <param name="chain">The chain, or null when there are faults.</param>
    /// <param name="faults">The faults; empty when there is a chain.</param>
    /// <returns>Whether there is a chain.</returns>
    public static bool TryFromTransitions<TState>(
        IEnumerable<Transition<TState>> transitions, ChainOptions<TState> options, [NotNullWhen(true)] out Chain<TState>? chain, out IReadOnlyList<ChainFault> faults)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(options);
        var assembler = Collect(transitions, new ChainAssembler<TState>(options));
        chain = assembler.Assemble();
        faults = assembler.Faults.ToList();
        return chain is not null;
    }

    private static ChainAssembler<TState> Collect<TState>(IEnumerable<Transition<TState>> transitions, ChainAssembler<TState> assembler)
        where TState : notnull
    {
        ArgumentNullException.ThrowIfNull(transitions);
        foreach (var (from, to, probability) in transitions)
        {
            assembler.Add(from, to, probability);
        }

        return assembler;
    }
}
