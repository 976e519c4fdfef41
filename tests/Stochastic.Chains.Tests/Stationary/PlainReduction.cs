namespace Stochastic.Chains.Tests.Stationary;

/// <summary>A method as a user would write it, from the public members alone: state reduction, the last state first, in plain loops.</summary>
internal sealed class PlainReduction : IStationaryMethod
{
    public string Name => "plain reduction";

    public StationaryVector Solve(StationaryProblem problem)
    {
        var rates = new double[problem.StateCount, problem.StateCount];
        for (var from = 0; from < problem.StateCount; from++)
        {
            foreach (var (to, probability) in problem.MovesFrom(from))
            {
                rates[from, to] = probability;
            }
        }

        for (var state = problem.StateCount - 1; state > 0; state--)
        {
            TakeOut(rates, state);
        }

        var shares = new double[problem.StateCount];
        shares[0] = 1;
        for (var state = 1; state < shares.Length; state++)
        {
            for (var from = 0; from < state; from++)
            {
                shares[state] += shares[from] * rates[from, state];
            }
        }

        return new StationaryVector(shares) { HasConverged = true, Reason = "Written by hand." };
    }

    /// <summary>Leaves the ratio of each move into the state to the state's outflow in place of the move.</summary>
    private static void TakeOut(double[,] rates, int state)
    {
        var outflow = 0.0;
        for (var to = 0; to < state; to++)
        {
            outflow += rates[state, to];
        }

        for (var from = 0; from < state; from++)
        {
            rates[from, state] /= outflow;
            for (var to = 0; rates[from, state] > 0 && to < state; to++)
            {
                rates[from, to] += rates[from, state] * rates[state, to];
            }
        }
    }
}
