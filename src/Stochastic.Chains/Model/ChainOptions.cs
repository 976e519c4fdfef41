namespace Stochastic.Chains;

/// <summary>How the input of a chain is read. Accepted by every construction.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <example>
/// <code>
/// var options = new ChainOptions&lt;string&gt;
/// {
///     Comparer = StringComparer.OrdinalIgnoreCase,
///     RowSums = RowSums.Rescale(0.005),
/// };
/// </code>
/// </example>
public sealed record ChainOptions<TState>
    where TState : notnull
{
    /// <summary>Gets the comparer that decides whether two labels mean the same state. Default: the type's own equality.</summary>
    /// <exception cref="ArgumentNullException">Set to null.</exception>
    public IEqualityComparer<TState> Comparer
    {
        get;
        init => field = value ?? throw new ArgumentNullException(nameof(value));
    } = EqualityComparer<TState>.Default;

    /// <summary>Gets what is done with a row that does not sum to one. Default: <see cref="RowSums.MustBeOne"/>.</summary>
    /// <exception cref="ArgumentNullException">Set to null.</exception>
    public RowSums RowSums
    {
        get;
        init => field = value ?? throw new ArgumentNullException(nameof(value));
    } = RowSums.MustBeOne;
}
