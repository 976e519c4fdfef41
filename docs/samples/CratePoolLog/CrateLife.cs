namespace CratePoolLog;

/// <summary>The invented rules by which a crate lives: where it is at the end of a week, given where it was a week before.</summary>
internal static class CrateLife
{
    /// <summary>Cases out of 10,000; row = stage at the end of a week, column = stage at the end of the next one.</summary>
    private static readonly int[][] Weekly =
    [
        //  clean filled at shop dirty  wash repair lost scrapped
        [3_800, 4_610, 1_585,     0,     0,     0,    5,     0], // clean
        [    0, 2_300, 7_270,   415,     0,     0,   15,     0], // filled
        [  120,     0, 6_160, 3_180,   390,   110,   40,     0], // at shop
        [2_250,   180,     0, 2_900, 4_130,   510,   20,    10], // returned dirty
        [7_135,   650,     0,     0, 1_350,   860,    5,     0], // in wash
        [2_950,     0,     0,     0, 1_000, 5_700,    0,   350], // in repair
    ];

    private static readonly Dictionary<(Stage From, Stage To), Stage[]> Ways = new()
    {
        [(Stage.Clean, Stage.AtShop)] = [Stage.Filled],
        [(Stage.Filled, Stage.ReturnedDirty)] = [Stage.AtShop],
        [(Stage.AtShop, Stage.InWash)] = [Stage.ReturnedDirty],
        [(Stage.AtShop, Stage.InRepair)] = [Stage.ReturnedDirty],
        [(Stage.AtShop, Stage.Clean)] = [Stage.ReturnedDirty, Stage.InWash],
        [(Stage.ReturnedDirty, Stage.Clean)] = [Stage.InWash],
        [(Stage.ReturnedDirty, Stage.Filled)] = [Stage.InWash, Stage.Clean],
        [(Stage.ReturnedDirty, Stage.Scrapped)] = [Stage.InRepair],
        [(Stage.InWash, Stage.Filled)] = [Stage.Clean],
        [(Stage.InRepair, Stage.Clean)] = [Stage.InWash],
    };

    /// <summary>Draws the stage a week later.</summary>
    internal static Stage NextWeek(Stage stage, SplitMix64 random)
    {
        var draw = random.Below(10_000);
        var next = 0;
        foreach (var cases in Weekly[(int)stage])
        {
            if (draw < cases)
            {
                break;
            }

            draw -= cases;
            next++;
        }

        return (Stage)next;
    }

    /// <summary>The stages that a crate passes through and is scanned in on its way, its new stage last.</summary>
    internal static Stage[] Way(Stage from, Stage to) => Ways.TryGetValue((from, to), out var between) ? [.. between, to] : [to];
}
