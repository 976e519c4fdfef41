namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// The oracle: answers about a chain in exact rational arithmetic. Off-diagonals are the data and are taken as exact; the diagonal is
/// one minus their sum where it is needed at all. Self-loops exist exactly where they were given, and only structure and step work read
/// them. An answer that does not exist is null (an infinite mean time).
/// </summary>
internal sealed partial class ExactChain
{
    private readonly ExactRow[] _rows;
    private readonly bool[] _selfLoops;

    public ExactChain(int stateCount, IEnumerable<(int From, int To, Rational Probability)> offDiagonals, IEnumerable<int> selfLoops)
    {
        var moves = new List<(int To, Rational Probability)>[stateCount];
        for (var state = 0; state < stateCount; state++)
        {
            moves[state] = [];
        }

        foreach (var (from, to, probability) in offDiagonals)
        {
            if (from == to || probability.Sign <= 0)
            {
                throw new ArgumentException($"({from}, {to}, {probability}) is not a positive off-diagonal.", nameof(offDiagonals));
            }

            moves[from].Add((to, probability));
        }

        _rows = Array.ConvertAll(moves, row => new ExactRow(row));
        _selfLoops = new bool[stateCount];
        foreach (var state in selfLoops)
        {
            _selfLoops[state] = true;
        }

        Structure = new ReferenceStructure(
            [.. _rows.Select((row, state) => row.Moves.Select(move => move.To).Concat(_selfLoops[state] ? [state] : []).ToArray())]);
    }

    public int StateCount => _rows.Length;

    public ReferenceStructure Structure { get; }

    /// <summary>Every double is taken as exact; a positive diagonal is a self-loop, whatever its size.</summary>
    public static ExactChain FromMatrix(double[,] matrix) =>
        FromTransitions(
            matrix.GetLength(0),
            from i in Enumerable.Range(0, matrix.GetLength(0))
            from j in Enumerable.Range(0, matrix.GetLength(1))
            where matrix[i, j] != 0
            select (i, j, matrix[i, j]));

    /// <summary>A transition from a state to itself is a self-loop; its size is not read.</summary>
    public static ExactChain FromTransitions(int stateCount, IEnumerable<(int From, int To, double Probability)> transitions)
    {
        var all = transitions.ToArray();
        return new(
            stateCount,
            all.Where(move => move.From != move.To).Select(move => (move.From, move.To, Rational.FromDouble(move.Probability))),
            all.Where(move => move.From == move.To).Select(move => move.From));
    }

    public ExactRow Row(int state) => _rows[state];

    public bool HasSelfLoop(int state) => _selfLoops[state];

    /// <summary>The self-loop as step work takes it: max(0, 1 - sum of off-diagonals) where one was given, else 0.</summary>
    public Rational SelfLoop(int state) => _selfLoops[state]
        ? Rational.Max(0, new Rational(_rows[state].Scale - _rows[state].Outflow, _rows[state].Scale))
        : 0;
}
