namespace Stochastic.Chains;

/// <summary>A prior opinion about the rows of a chain: each row follows a Dirichlet distribution of its own.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>Immutable and safe for concurrent use. Weights count like observations.</remarks>
/// <example>
/// <code>
/// // What is known from another pool about crates at a shop is worth 20 observations.
/// var prior = DirichletPrior.Jeffreys&lt;string&gt;().WithRow("at shop", ("at shop", 9.9), ("dirty", 9.9), ("lost", 0.2));
/// </code>
/// </example>
public sealed class DirichletPrior<TState>
    where TState : notnull
{
    internal DirichletPrior(double weight, IReadOnlyList<(TState From, IReadOnlyList<(TState To, double Weight)> Moves)> rows)
    {
        Weight = weight;
        Rows = rows;
    }

    /// <summary>Gets the weight of each possible move in rows without an opinion of their own.</summary>
    public double Weight { get; }

    internal IReadOnlyList<(TState From, IReadOnlyList<(TState To, double Weight)> Moves)> Rows { get; }

    /// <summary>Makes a prior with an opinion of its own about one row; one given before for that row is replaced.</summary>
    /// <param name="from">The state the moves start in.</param>
    /// <param name="moves">The possible moves, each with its weight, above 0 and finite. Moves that are not named are impossible.</param>
    /// <returns>A new prior.</returns>
    /// <exception cref="ArgumentOutOfRangeException">A weight is not above 0 and finite.</exception>
    public DirichletPrior<TState> WithRow(TState from, params IEnumerable<(TState To, double Weight)> moves)
    {
        ArgumentNullException.ThrowIfNull(from);
        ArgumentNullException.ThrowIfNull(moves);
        var row = moves.ToList();
        foreach (var (_, weight) in row)
        {
            DirichletPrior.RequireWeight(weight);
        }

        return new DirichletPrior<TState>(Weight, [.. Rows.Where(other => !EqualityComparer<TState>.Default.Equals(other.From, from)), (from, row)]);
    }
}
