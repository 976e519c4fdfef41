using System.Globalization;

namespace CratePool;

/// <summary>Shares in percent, the same in every culture.</summary>
internal static class Percent
{
    /// <summary>Two digits that matter: 46%, 4.6%, 0.46%.</summary>
    internal static string Short(double share)
    {
        var percent = share * 100;
        var format = percent switch
        {
            0 or >= 9.95 => "0",
            >= 0.995 => "0.0",
            _ => "0.00",
        };
        return percent.ToString(format, CultureInfo.InvariantCulture) + "%";
    }

    /// <summary>One decimal, for columns: 46.3%. Neither nothing nor everything where it is only close to it.</summary>
    internal static string Column(double share) => share switch
    {
        > 0 and < 0.0005 => "<0.1%",
        < 1 and >= 0.9995 => ">99.9%",
        _ => (share * 100).ToString("0.0", CultureInfo.InvariantCulture) + "%",
    };
}
