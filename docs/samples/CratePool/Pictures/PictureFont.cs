using ScottPlot;

namespace CratePool.Pictures;

/// <summary>The typeface of the pictures. It lies beside the program, since a bare server often has none.</summary>
internal static class PictureFont
{
    private static readonly Lazy<string> Loaded = new(Load);

    internal static string Name => Loaded.Value;

    private static string Load()
    {
        const string family = "CratePool DejaVu Sans";
        Fonts.AddFontFile(family, Path.Combine(AppContext.BaseDirectory, "Pictures", "Font", "DejaVuSans.ttf"));
        return family;
    }
}
