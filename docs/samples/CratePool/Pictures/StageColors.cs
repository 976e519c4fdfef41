using ScottPlot;

namespace CratePool.Pictures;

/// <summary>One color for each stage, the same in every picture; all dark enough to be read as text on white.</summary>
internal static class StageColors
{
    internal static readonly Color Ink = Color.FromHex("#26323B");
    internal static readonly Color Faint = Color.FromHex("#66737C");
    internal static readonly Color Rule = Color.FromHex("#E3E7EA");

    private static readonly Color[] Colors =
    [
        Color.FromHex("#1D7A8C"), Color.FromHex("#B8610B"), Color.FromHex("#5B4B9A"), Color.FromHex("#7A5230"), Color.FromHex("#2C66C4"),
        Color.FromHex("#A8327A"), Color.FromHex("#3F7D2C"), Color.FromHex("#8C7A00"), Color.FromHex("#00747A"), Color.FromHex("#9A4A4A"),
    ];

    private static readonly Color[] Ends = [Color.FromHex("#B3261E"), Color.FromHex("#4A4F54"), Color.FromHex("#7D1D4F")];

    internal static Color OfStage(int number) => Colors[number % Colors.Length];

    internal static Color OfEnd(int number) => Ends[number % Ends.Length];
}
