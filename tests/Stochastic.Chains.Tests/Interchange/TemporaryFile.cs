using System.Text;

namespace Stochastic.Chains.Tests.Interchange;

/// <summary>A file that is there for the length of a using statement.</summary>
internal sealed class TemporaryFile : IDisposable
{
    internal TemporaryFile(string text, Encoding encoding) => File.WriteAllText(Path, text, encoding);

    internal string Path { get; } = System.IO.Path.Combine(System.IO.Path.GetTempPath(), $"crates-{Guid.NewGuid():N}.csv");

    public void Dispose() => File.Delete(Path);
}
