using Stochastic.Chains;

namespace Snippets;

internal static class WhatMattersMost
{
    public static void Times()
    {
        Chain<string> pool = InventedChains.Pool;
        #region times
        // One more crate in a thousand is lost in a week at the shop, and one less comes back dirty.
        ProbabilityChange<string>[] theft = [new("at shop", "lost", 0.001), new("at shop", "dirty", -0.001)];
        StateDerivatives<string> slope = pool.AbsorptionDerivative("lost", theft);

        Console.WriteLine($"Ends up lost, from clean: {pool.Absorption().Probability("clean", "lost"):P1}, and {slope["clean"]:P1} more with more theft");
        #endregion
    }

    public static void LongRun()
    {
        #region long-run
        Chain<Stage> pump = InventedChains.Pump;
        StateDerivatives<Stage> slope = pump.StationaryDerivative(new(Stage.New, Stage.Worn, 1), new(Stage.New, Stage.New, -1));

        Console.WriteLine($"Each point more wear costs {slope[Stage.Failed] * 0.01:P2} of the time");
        #endregion
    }
}
