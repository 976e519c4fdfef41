namespace Stochastic.Chains.Tests.Support;

internal readonly record struct PublishedTransition(int From, int To, Rational Probability);

/// <summary>
/// A published input as a chain: exact off-diagonals and exact self-loops. For a chain in continuous time the probabilities are those of
/// the uniformized chain, and <see cref="UniformizationRate"/> turns them back into moves per unit of time.
/// </summary>
internal sealed class PublishedChain
{
    private PublishedChain(
        int stateCount,
        PublishedTransition[] offDiagonals,
        PublishedTransition[] selfLoops,
        Rational? uniformizationRate)
    {
        StateCount = stateCount;
        OffDiagonals = offDiagonals;
        SelfLoops = selfLoops;
        UniformizationRate = uniformizationRate;
    }

    public int StateCount { get; }

    public IReadOnlyList<PublishedTransition> OffDiagonals { get; }

    public IReadOnlyList<PublishedTransition> SelfLoops { get; }

    /// <summary>Null for a chain in discrete time.</summary>
    public Rational? UniformizationRate { get; }

    /// <summary>Moves per unit of time, for a chain in continuous time.</summary>
    public IEnumerable<(int From, int To, Rational Rate)> Rates => UniformizationRate is { } rate
        ? OffDiagonals.Select(move => (move.From, move.To, move.Probability * rate))
        : throw new InvalidOperationException("This chain runs in discrete time.");

    /// <summary>All transitions as the nearest doubles, ordered by row and column.</summary>
    public IEnumerable<(int From, int To, double Probability)> Transitions => OffDiagonals.Concat(SelfLoops)
        .OrderBy(move => move.From).ThenBy(move => move.To)
        .Select(move => (move.From, move.To, move.Probability.ToDouble()));

    /// <summary>Every entry given, the diagonal included.</summary>
    public static PublishedChain FromEntries(int stateCount, IEnumerable<(int From, int To, Rational Probability)> entries)
    {
        var all = entries.Where(entry => entry.Probability.Sign > 0)
            .Select(entry => new PublishedTransition(entry.From, entry.To, entry.Probability))
            .ToArray();
        return new(stateCount, [.. all.Where(move => move.From != move.To)], [.. all.Where(move => move.From == move.To)], null);
    }

    public static PublishedChain FromRows(IReadOnlyList<IReadOnlyList<Rational>> rows) =>
        FromEntries(rows.Count, rows.SelectMany((row, from) => row.Select((probability, to) => (from, to, probability))));

    /// <summary>Off-diagonals given; the diagonal is one minus their sum, and a self-loop where that is positive.</summary>
    public static PublishedChain FromOffDiagonals(int stateCount, IEnumerable<(int From, int To, Rational Probability)> offDiagonals) =>
        WithRemainders(stateCount, offDiagonals, null);

    /// <summary>Rates given; probabilities are rates over the uniformization rate, at least every state's total rate.</summary>
    public static PublishedChain FromRates(
        int stateCount,
        IEnumerable<(int From, int To, Rational Rate)> rates,
        Rational uniformizationRate) =>
        WithRemainders(stateCount, rates.Select(move => (move.From, move.To, move.Rate / uniformizationRate)), uniformizationRate);

    /// <summary>Whole-number or fractional weights given; every row is divided by its sum.</summary>
    public static PublishedChain FromWeights(IReadOnlyList<IReadOnlyList<Rational>> weights) =>
        FromRows([.. weights.Select(row => row.Select(weight => weight / Rational.Sum(row)).ToArray())]);

    /// <summary>Simple walk on a graph: a uniform choice among the neighbours.</summary>
    public static PublishedChain FromNeighbours(IReadOnlyList<IReadOnlyList<int>> neighbours) => FromEntries(
        neighbours.Count,
        neighbours.SelectMany((list, from) => list.Select(to => (from, to, new Rational(1, list.Count)))));

    public ExactChain ToExact() => new(
        StateCount,
        OffDiagonals.Select(move => (move.From, move.To, move.Probability)),
        SelfLoops.Select(loop => loop.From));

    public double[,] ToMatrix()
    {
        var matrix = new double[StateCount, StateCount];
        foreach (var (from, to, probability) in Transitions)
        {
            matrix[from, to] = probability;
        }

        return matrix;
    }

    /// <summary>The same chain, restarted uniformly with the given probability at every step.</summary>
    public PublishedChain WithRestart(Rational restart)
    {
        var rows = Enumerable.Range(0, StateCount)
            .Select(_ => Enumerable.Repeat(restart / StateCount, StateCount).ToArray())
            .ToArray();
        foreach (var (from, to, probability) in OffDiagonals.Concat(SelfLoops))
        {
            rows[from][to] += (1 - restart) * probability;
        }

        return FromRows(rows);
    }

    private static PublishedChain WithRemainders(
        int stateCount,
        IEnumerable<(int From, int To, Rational Probability)> offDiagonals,
        Rational? uniformizationRate)
    {
        var moves = offDiagonals.Where(move => move.Probability.Sign > 0)
            .Select(move => new PublishedTransition(move.From, move.To, move.Probability))
            .ToArray();
        var outflow = moves.ToLookup(move => move.From, move => move.Probability);
        var loops = Enumerable.Range(0, stateCount)
            .Select(state => new PublishedTransition(state, state, 1 - Rational.Sum(outflow[state])))
            .Where(loop => loop.Probability.Sign > 0);
        return new(stateCount, moves, [.. loops], uniformizationRate);
    }
}
