using Stochastic.Chains;

namespace CratePool.Pictures;

/// <summary>Draws the two pictures of a pool.</summary>
internal static class PoolPictures
{
    private const int Weeks = 26;

    /// <summary>Writes the pictures into the output folder, which is made if need be.</summary>
    /// <returns>Their paths.</returns>
    internal static IReadOnlyList<string> Draw(Pool pool, CancellationToken cancellation)
    {
        var (life, refilled, stages) = pool.Chains;
        Directory.CreateDirectory(pool.Options.OutputFolder);
        var diagram = Path.Combine(pool.Options.OutputFolder, "state-diagram.png");
        StateDiagram.Save(life, stages, diagram);
        cancellation.ThrowIfCancellationRequested();
        if (refilled?.Structure().RecurrentClasses.Count != 1)
        {
            return [diagram];
        }

        var options = new SolveOptions { CancellationToken = cancellation };
        var start = refilled.StartingIn(pool.StockOver(refilled.States));
        var forecast = Path.Combine(pool.Options.OutputFolder, "forecast.png");
        ForecastPicture.Save(
            [.. Enumerable.Range(0, Weeks + 1).Select(week => start.After(week, options))], refilled.Stationary(options), stages, forecast);
        return [diagram, forecast];
    }
}
