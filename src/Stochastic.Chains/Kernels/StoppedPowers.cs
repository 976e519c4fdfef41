namespace Stochastic.Chains.Kernels;

/// <summary>
/// What happens within 1, 2, 4, 8, … steps to those on the way: tables [Q | arrived | lost] whose rows sum to one, each from the one before
/// by Q² and arrived + Q · arrived. Non-negative numbers only; rows are divided by their sum, so that the total stays one. Finds the number
/// of steps in which a given share has arrived, however large, by doubling and then halving.
/// </summary>
internal sealed class StoppedPowers : IDisposable
{
    private const int MostPowers = 1023;

    private readonly List<WorkTable> _powers = [];
    private readonly int _states;
    private readonly WorkSharing _sharing;
    private readonly Action<int> _admit;

    /// <summary>Takes the table of one step over, with two columns for those who arrive and those who lose the way.</summary>
    /// <param name="step">The table [Q | arrived | lost].</param>
    /// <param name="states">The number of states on the way.</param>
    /// <param name="sharing">The threads that share the work.</param>
    /// <param name="admit">Called with the number of tables before one more is made; throws when they take too much memory.</param>
    internal StoppedPowers(WorkTable step, int states, WorkSharing sharing, Action<int> admit)
    {
        _powers.Add(step);
        _states = states;
        _sharing = sharing;
        _admit = admit;
        Normalize(step.View);
    }

    /// <summary>The columns of a table.</summary>
    internal static int Columns(int states) => states + 2;

    public void Dispose() => _powers.ForEach(power => power.Dispose());

    /// <summary>
    /// The smallest number of steps in which those starting in a state have arrived as asked, as far as rounding lets one tell; +∞ when they never do.
    /// </summary>
    internal double Quantile(int start, QuantileQuestion question, CancellationToken cancellation)
    {
        while (!question.IsReached(_powers[^1].View[start, _states], OnTheWay(_powers[^1].View, start)))
        {
            cancellation.ThrowIfCancellationRequested();
            if (OnTheWay(_powers[^1].View, start) == 0 || _powers.Count > MostPowers)
            {
                return double.PositiveInfinity;
            }

            _admit(_powers.Count + 1);
            _powers.Add(Square(_powers[^1].View));
        }

        return 1 + StepsBefore(start, question);
    }

    private double OnTheWay(MatrixView power, int state) => VectorLoops.Sum(power.Row(state, 0, _states));

    /// <summary>The largest number of steps in which fewer have arrived than asked.</summary>
    private double StepsBefore(int start, QuantileQuestion question)
    {
        var (steps, arrived) = (0.0, default(CompensatedSum));
        var (current, next) = (new double[_states], new double[_states]);
        current[start] = 1;
        for (var power = _powers.Count - 2; power >= 0; power--)
        {
            var view = _powers[power].View;
            var (more, onTheWay) = (arrived, default(CompensatedSum));
            for (var state = 0; state < _states; state++)
            {
                more.Add(current[state] * view[state, _states]);
                onTheWay.Add(current[state] * OnTheWay(view, state));
            }

            if (question.IsReached(more.Value, onTheWay.Value))
            {
                continue;
            }

            arrived = more;
            steps += Math.ScaleB(1, power);
            next.AsSpan().Clear();
            for (var state = 0; state < _states; state++)
            {
                if (current[state] != 0)
                {
                    VectorLoops.AddScaled(current[state], view.Row(state, 0, _states), next);
                }
            }

            (current, next) = (next, current);
        }

        return steps;
    }

    private WorkTable Square(MatrixView power)
    {
        var square = WorkTable.Rent(_states, Columns(_states));
        for (var state = 0; state < _states; state++)
        {
            var row = square.View.Row(state, 0, Columns(_states));
            row.Clear();
            power.Row(state, _states, 2).CopyTo(row[_states..]);
        }

        MatrixMultiply.Add(power, power, square.View, _states, _states, Columns(_states), InstructionSet.Widest, _sharing);
        Normalize(square.View);
        return square;
    }

    private void Normalize(MatrixView table)
    {
        for (var state = 0; state < _states; state++)
        {
            var row = table.Row(state, 0, Columns(_states));
            VectorLoops.Divide(row, CompensatedSum.Of(row), row);
        }
    }
}
