namespace Stochastic.Chains.Tests.Samples;

/// <summary>The invented scan log of the crate pool sample.</summary>
public sealed class CratePoolLogTests
{
    [Fact]
    public void The_generator_writes_the_shipped_log_byte_for_byte()
    {
        var path = Path.GetTempFileName();
        try
        {
            CratePoolLog.Program.Write(path);
            File.ReadAllBytes(path).AsSpan().SequenceEqual(File.ReadAllBytes(Path.Combine(AppContext.BaseDirectory, "crate-pool-scans.csv"))).Should().BeTrue();
        }
        finally
        {
            File.Delete(path);
        }
    }
}
