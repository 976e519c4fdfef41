namespace Stochastic.Chains.Stationary;

/// <summary>The method taken when none is given.</summary>
/// <remarks>
/// <list type="table">
/// <listheader><term>Recurrent class</term><description>Method</description></listheader>
/// <item><term>one state</term><description>none: the structure answers</description></item>
/// <item><term>up to 5,000 states whose table fits into the memory limit</term><description><see cref="EliminationMethod"/></description></item>
/// <item><term>larger</term><description><see cref="AggregationMethod"/>, which finds groups of strongly coupled states and solves between and inside them in turn</description></item>
/// </list>
/// </remarks>
internal static class StationaryChoice
{
    internal const int LargestDirect = 5_000;

    internal static (IStationaryMethod Method, string Reason) For(StationaryProblem problem)
    {
        var bytes = sizeof(double) * (long)problem.StateCount * problem.StateCount;
        return problem.StateCount <= LargestDirect && bytes <= problem.Options.MemoryLimit
            ? (new EliminationMethod(), "Chosen because the class is small enough for a direct solve.")
            : (new AggregationMethod(), "Chosen because the class is too large for a direct solve.");
    }
}
