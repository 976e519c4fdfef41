using Stochastic.Chains.Internal;

namespace Stochastic.Chains;

/// <summary>Takes the rows of a chain one by one, inside <see cref="Chain.Build{TState}(Action{ChainRows{TState}})"/>.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <example>
/// <code>
/// var pump = Chain.Build&lt;string&gt;(rows => rows
///     .Row("new", ("new", 0.90), ("worn", 0.10))
///     .Row("worn", ("new", 1.0)));
/// </code>
/// </example>
public sealed class ChainRows<TState>
    where TState : notnull
{
    private readonly ChainAssembler<TState> _assembler;
    private readonly HashSet<int> _given = [];
    private int _calls;
    private bool _isClosed;

    internal ChainRows(ChainAssembler<TState> assembler) => _assembler = assembler;

    /// <summary>Gives all moves out of one state.</summary>
    /// <param name="from">The state the moves start in; each state has one row.</param>
    /// <param name="moves">Where the next step leads, with its probability; to <paramref name="from"/> itself for a stay.</param>
    /// <returns>These rows, to go on with.</returns>
    /// <exception cref="InvalidOperationException">The chain has been built already.</exception>
    public ChainRows<TState> Row(TState from, params ReadOnlySpan<(TState To, double Probability)> moves)
    {
        if (_isClosed)
        {
            throw new InvalidOperationException(Messages.RowAfterBuild);
        }

        var position = _calls++;
        if (from is null)
        {
            _assembler.Faults.Add(ChainFaultKind.NullState, [from], position, Messages.NullRow(position));
            return this;
        }

        if (!_given.Add(_assembler.FindOrAdd(from)))
        {
            _assembler.Faults.Add(ChainFaultKind.DuplicateState, [from], position, Messages.DuplicateRow(from));
        }

        foreach (var (to, probability) in moves)
        {
            _assembler.Add(from, to, probability);
        }

        return this;
    }

    /// <summary>Takes no more rows: the states now belong to an immutable chain.</summary>
    internal void Close() => _isClosed = true;
}
