using Stochastic.Chains.Kernels;
using Stochastic.Chains.Passage;

namespace Stochastic.Chains.LongRun;

/// <summary>
/// The probability of ending in a periodic class in step with each of its cyclic classes. Offset g means: after n steps, for n large enough, the
/// chain is in cyclic class g + n, counted round the period.
/// </summary>
/// <remarks>
/// States that are left for good are taken together with the number of steps so far, modulo the period; the exits of this larger system are the
/// offsets, and one more for everything that ends elsewhere. Here a stay is a move, as it takes a step.
/// </remarks>
internal static class PhasedEndings<TState>
    where TState : notnull
{
    private const double UnitRoundoff = 1.1102230246251565e-16;

    /// <summary>The probabilities from each state (a row for each, a column for each offset), and a bound on their relative error.</summary>
    internal static (double[] Values, double RelativeErrorBound) Of(LongRunParts<TState> parts, int end)
    {
        var chain = parts.Chain;
        var period = parts.Classes[end].Period;
        var phases = Phases(chain.States, parts.Classes[end]);
        var values = new double[chain.StateCount * period];
        foreach (var member in parts.Classes[end].Members)
        {
            values[(member * period) + phases[member]] = 1;
        }

        var transient = chain.Structure().TransientPositions;
        return transient.Length == 0 ? (values, 0) : (values, Solve(parts, end, phases, transient, values));
    }

    /// <summary>The cyclic class of each state of a recurrent class, by its number.</summary>
    internal static int[] Phases(StateSpace<TState> states, CommunicatingClass<TState> group)
    {
        var phases = new int[states.Count];
        for (var phase = 0; phase < group.CyclicClasses.Count; phase++)
        {
            foreach (var state in group.CyclicClasses[phase])
            {
                phases[states.IndexOf(state)] = phase;
            }
        }

        return phases;
    }

    private static double Solve(LongRunParts<TState> parts, int end, int[] phases, int[] transient, double[] values)
    {
        var period = parts.Classes[end].Period;
        var matrix = StepMatrix.Of(parts.Chain);
        var members = transient.Length * period;
        parts.Options.RequireMemory(members, sizeof(double) * (long)members * (members + period + 1L));
        var phased = Phased(parts, end, phases, transient, matrix);
        int[] exitOf = [.. Enumerable.Repeat(-1, members), .. Enumerable.Range(0, period + 1)];
        using var system = new ExitSystem<(TState, int)>(phased, [.. Enumerable.Range(0, members)], period + 1, exitOf, parts.Options);
        var bound = 0.0;
        for (var offset = 0; offset < period; offset++)
        {
            var solution = system.ExitProbabilities(offset);
            bound = Math.Max(bound, solution.RelativeErrorBound);
            for (var k = 0; k < transient.Length; k++)
            {
                values[(transient[k] * period) + offset] = solution.Values[k * period];
            }
        }

        // Stays and merged exits are rounded data; each answer is a quotient of two sums of products of one rate of each member.
        var ofData = 2.0 * members * (matrix.StayRoundings + matrix.LargestOutdegree) * UnitRoundoff * SubtractionFreeBound.SecondOrder;
        return ofData < 0.01 ? bound + (ofData * SubtractionFreeBound.SecondOrder) : double.PositiveInfinity;
    }

    private static Chain<(TState State, int Phase)> Phased(LongRunParts<TState> parts, int end, int[] phases, int[] transient, StepMatrix matrix)
    {
        var chain = parts.Chain;
        var period = parts.Classes[end].Period;
        var members = transient.Length * period;
        var place = new int[chain.StateCount];
        for (var k = 0; k < transient.Length; k++)
        {
            place[transient[k]] = k;
        }

        var moves = new TripletList();
        for (var row = 0; row < members; row++)
        {
            var (k, time) = Math.DivRem(row, period);
            var next = (time + 1) % period;
            var exits = new double[period + 1];
            foreach (var (to, probability) in chain.Matrix.Row(transient[k]))
            {
                if (to == transient[k])
                {
                    Add(moves, row, (k * period) + next, matrix.Stay(to));
                }
                else if (parts.ClassOf[to] < 0)
                {
                    Add(moves, row, (place[to] * period) + next, probability);
                }
                else
                {
                    exits[parts.ClassOf[to] == end ? (phases[to] - next + period) % period : period] += probability;
                }
            }

            for (var exit = 0; exit < exits.Length; exit++)
            {
                Add(moves, row, members + exit, exits[exit]);
            }
        }

        var count = members + period + 1;
        for (var exit = members; exit < count; exit++)
        {
            moves.Add(exit, exit, 1);
        }

        var labels = Enumerable.Range(0, count).Select(row => row < members
            ? (chain.States[transient[row / period]], row % period)
            : (chain.States[0], members - row - 1));
        return new Chain<(TState, int)>(StateSpace.Of(labels), TransitionMatrix.FromCompressedRows(moves.ToCompressedRows(count)), [], null);
    }

    private static void Add(TripletList moves, int row, int column, double probability)
    {
        if (probability > 0)
        {
            moves.Add(row, column, probability);
        }
    }
}
