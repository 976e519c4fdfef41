using Stochastic.Chains;

namespace Snippets;

internal static class Structure
{
    public static void Classes()
    {
        var pool = InventedChains.Pool;
        #region classes
        ChainStructure<string> structure = pool.Structure();

        Console.WriteLine(structure);
        foreach (CommunicatingClass<string> group in structure.Classes)
        {
            Console.WriteLine(group);
        }

        Console.WriteLine($"Ends: {string.Join(", ", structure.AbsorbingStates)}");
        #endregion
    }

    public static void Period()
    {
        #region period
        // A van that returns to its depot after each customer; invented.
        Chain<string> van = Chain.Build<string>(rows => rows
            .Row("depot", ("north", 0.5), ("south", 0.5))
            .Row("north", ("depot", 1.0))
            .Row("south", ("depot", 1.0)));

        ChainStructure<string> structure = van.Structure();
        Console.WriteLine($"Aperiodic: {structure.IsAperiodic}, period {structure.Period}");
        Console.WriteLine(string.Join(" | ", structure.Classes[0].CyclicClasses.Select(phase => string.Join(", ", phase))));
        #endregion
    }

    public static void Reach()
    {
        var pool = InventedChains.Pool;
        #region reach
        ChainStructure<string> structure = pool.Structure();

        Console.WriteLine(structure.CanReach("dirty", "scrapped"));
        Console.WriteLine(structure.CanReach("scrapped", "dirty"));
        Console.WriteLine(string.Join(", ", structure.ReachableFrom("in repair")));
        #endregion
    }

    public static void Backwards()
    {
        var pump = InventedChains.Pump;
        var plant = InventedChains.Plant;
        #region backwards
        Console.WriteLine($"Pump: {pump.Reversibility()}");
        Console.WriteLine($"Plant: {plant.Reversibility().IsReversible}");
        #endregion
    }
}
