namespace CratePoolLog;

/// <summary>The stages of a crate's life. Lost is never scanned: a lost crate just stops appearing.</summary>
internal enum Stage
{
    Clean,
    Filled,
    AtShop,
    ReturnedDirty,
    InWash,
    InRepair,
    Lost,
    Scrapped,
}
