using System.Globalization;
using Stochastic.Chains;

namespace CratePool;

/// <summary>Shows on one line how far the work has come, and clears it afterwards.</summary>
internal sealed class ConsoleProgress(TextWriter console, bool isShown) : IProgress<SolveProgress>, IDisposable
{
    private string _shown = string.Empty;

    public void Report(SolveProgress value) =>
        Show(value.Fraction > 0 ? string.Create(CultureInfo.InvariantCulture, $"{value.Stage} {value.Fraction * 100:0}%") : value.Stage);

    /// <summary>Shows what is being done, in place of what was shown before.</summary>
    internal void Show(string text)
    {
        if (isShown && text != _shown)
        {
            console.Write("\r" + text.PadRight(_shown.Length));
            _shown = text;
        }
    }

    internal void Clear()
    {
        if (_shown.Length > 0)
        {
            console.Write("\r" + new string(' ', _shown.Length) + "\r");
            _shown = string.Empty;
        }
    }

    public void Dispose() => Clear();
}
