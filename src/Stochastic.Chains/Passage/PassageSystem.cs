using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>
/// Some states with their rates, each with a holding time of one step, of which the first are targets that are reached from all of them:
/// finds the steps from each to each target.
/// </summary>
internal sealed class PassageSystem : IDisposable
{
    private readonly WorkTable _rates;
    private readonly int _states;
    private readonly int _targets;
    private readonly SolveOptions _options;

    internal PassageSystem(int states, int targets, SolveOptions options)
    {
        _states = states;
        _targets = targets;
        _options = options;
        options.RequireMemory(states, MemoryFor(states, targets));
        _rates = WorkTable.Rent(states, states + 1);
    }

    /// <summary>The rates, a row for each state; the diagonal is zero and the holding time follows the rates.</summary>
    internal MatrixView Rates => _rates.View;

    /// <summary>How many roundings the error of a time amounts to at most.</summary>
    internal double Roundings { get; private set; }

    /// <summary>Whether some products lay outside the range of a double.</summary>
    internal bool IsWide { get; private set; }

    /// <summary>Gives the working memory back.</summary>
    public void Dispose() => _rates.Dispose();

    /// <summary>The rates of the given states of a chain among each other.</summary>
    internal static PassageSystem Among(TransitionMatrix matrix, int[] states, int targets, SolveOptions options)
    {
        var system = new PassageSystem(states.Length, targets, options);
        RateTable.Among(matrix, states).CopyTo(system.Rates);
        for (var k = 0; k < states.Length; k++)
        {
            system.Rates[k, k] = 0;
            system.Rates[k, states.Length] = 1;
        }

        return system;
    }

    /// <summary>Writes the steps from each state (row) to each target (column), zero to itself.</summary>
    /// <param name="steps">Receives them, states x targets.</param>
    /// <param name="instructions">The vectors to use.</param>
    /// <param name="refuse">Makes the refusal of a time from a state to a target that no double holds, given its power of two; null where none is needed.</param>
    internal void Solve(MatrixView steps, InstructionSet instructions, Func<int, int, long, Exception?> refuse)
    {
        IsWide = !FirstPassageReduction.Find(
            Rates, _states, _targets, steps, _options.Parallelism, instructions, _options.Report("first passage"), _options.CancellationToken);
        Roundings = IsWide ? FirstPassageBound.RoundingsOfGeneral(_states, _targets) : FirstPassageBound.Roundings(_states, _targets);
        if (IsWide)
        {
            SolveWide(steps, refuse);
        }
    }

    /// <summary>Adds what a state waits on its way back: one step and the steps back from where it moves to.</summary>
    internal double[] Returns(MatrixView steps)
    {
        var returns = new double[_targets];
        Array.Fill(returns, 1);
        ProductDiagonal.Add(Rates, steps, returns);
        return returns;
    }

    /// <summary>The sum of the rates of a state.</summary>
    internal double Outflow(int state) => PassageElimination.Sum(Rates.Row(state, 0, _states));

    /// <summary>
    /// The largest relative difference of the two sides of outflow · steps = 1 + flow-weighted steps of the next states, over the pairs asked for.
    /// </summary>
    internal double Residual(MatrixView steps, InstructionSet instructions, Func<int, int, bool> isAsked)
    {
        using var inflows = WorkTable.Rent(_states, _targets);
        for (var row = 0; row < _states; row++)
        {
            inflows.View.Row(row, 0, _targets).Fill(1);
        }

        var sharing = new WorkSharing(_options.Parallelism, _options.CancellationToken);
        MatrixMultiply.Add(Rates, steps, inflows.View, _states, _states, _targets, instructions, sharing);
        var largest = 0.0;
        for (var from = 0; from < _states; from++)
        {
            var outflow = Outflow(from);
            for (var to = 0; to < _targets; to++)
            {
                if (from != to && isAsked(from, to))
                {
                    largest = Math.Max(largest, Math.Abs((inflows.View[from, to] / (outflow * steps[from, to])) - 1));
                }
            }
        }

        return largest;
    }

    private static long MemoryFor(int states, int targets) =>
        sizeof(double) * (((long)states * WorkTable.PreferredStride(states + 1)) + FirstPassageReduction.MemoryOf(states, targets) + ((long)states * targets));

    private void SolveWide(MatrixView steps, Func<int, int, long, Exception?> refuse)
    {
        const int wideBytes = 16;
        _options.RequireMemory(_states, wideBytes * ((2L * _states * (_states + 1)) + ((long)_states * _targets)));
        var rates = new ScaledDouble[_states * (_states + 1)];
        for (var row = 0; row < _states; row++)
        {
            for (var column = 0; column <= _states; column++)
            {
                rates[(row * (_states + 1)) + column] = Rates[row, column];
            }
        }

        var times = new ScaledDouble[_states * _targets];
        new GeneralFirstPassage<ScaledDouble>(times, _targets, _options.Report("first passage, wide range"), _options.CancellationToken).Find(rates, _states);
        for (var from = 0; from < _states; from++)
        {
            for (var to = 0; to < _targets; to++)
            {
                var time = times[(from * _targets) + to];
                steps[from, to] = time.ToDouble();
                if (from != to && !double.IsNormal(steps[from, to]))
                {
                    // Zero where nobody asks: an infinity would spoil sums in which its weight is zero.
                    steps[from, to] = refuse(from, to, time.Exponent) is { } refusal ? throw refusal : 0;
                }
            }
        }
    }
}
