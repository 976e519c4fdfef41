using Stochastic.Chains.Benchmarks.Accuracy;
using Stochastic.Chains.Benchmarks.Growth;
using Stochastic.Chains.Benchmarks.Measuring;
using Stochastic.Chains.Benchmarks.Ratios;

namespace Stochastic.Chains.Benchmarks.Report;

/// <summary>Writes tables and pictures from what was measured. Nothing in them is typed by hand.</summary>
internal static class ReportRun
{
    internal static int Write()
    {
        var ratios = ResultFile<Ratio>.Read(RatioRun.FileName);
        var accuracy = ResultFile<Measured>.Read(AccuracyRun.FileName);
        var growth = ResultFile<GrowthRow>.Read(GrowthRun.FileName);
        Save("ratios.md", RatioPage.Of(ratios));
        Save("accuracy.md", AccuracyPage.Of(accuracy));
        Save("growth.md", GrowthPage.Of(growth));
        Save("table-targets.md", RatioPage.Targets(ratios.Rows));
        Save("table-shares.md", AccuracyPage.Table(accuracy.Rows, Inquiries.Shares));
        Save("table-growth.md", GrowthPage.Table(growth.Rows));
        Save("table-machine.md", MachineTable.Of(ratios.Machine));
        Save("ratios.csv", CommaSeparated.Of(ratios.Rows));
        Save("accuracy.csv", CommaSeparated.Of(accuracy.Rows));
        Save("growth.csv", CommaSeparated.Of(growth.Rows));
        CouplingPicture.Save(accuracy.Rows, ResultFolder.File("error-against-coupling.svg"));
        GrowthPicture.Save(growth.Rows, ResultFolder.File("growth.svg"));
        return 0;
    }

    private static void Save(string name, string text)
    {
        var path = ResultFolder.File(name);
        File.WriteAllText(path, text.TrimEnd('\n') + "\n");
        Console.WriteLine($"Wrote {path}.");
    }
}
