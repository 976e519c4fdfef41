using System.Globalization;
using Stochastic.Chains;

namespace CratePool.Report;

/// <summary>How sure the numbers are: proved for the computation, named for the rest.</summary>
internal static class CertaintySection
{
    internal static void Write(TextWriter output, Pool pool, Evidence evidence)
    {
        output.Heading("How sure the numbers are");
        output.Paragraph(
            "Numerically: every answer comes with a certificate. This is how far its unrounded figures can be from what the weekly moves of the log imply exactly.");
        foreach (var (answer, certificate) in evidence.Certificates)
        {
            output.WriteLine($"    {answer}: {InWords(certificate)}");
        }

        output.WriteLine();
        output.Paragraph(
            $"Statistically: the figures rest on {Prose.Count(pool.Counts.TotalCount, "weekly move", "weekly moves")}. As a forecast they are much less " +
            "sure. A certificate says nothing about whether the weeks to come are like the weeks of the log, nor how well few moves show a rare one; " +
            "the table at the top shows how many moves each row rests on.");
        if (pool.Options.LostAfterWeeks > 0)
        {
            var unknown = Prose.Count(pool.Options.LostAfterWeeks, "week", "weeks");
            var known = Prose.Count((long)Math.Ceiling((pool.Log.LogEnd - pool.Log.FirstTime) / TimeSpan.FromDays(7)), "week", "weeks");
            output.Paragraph(
                $"A crate counts as \"{pool.Options.LostStage}\" after {unknown} without a scan, and the log covers {known}. Crates lost in its last {unknown} are " +
                "not known to be, so the losses are rather more than the figures say, and the crates in use rather fewer.");
        }

        output.Paragraph(
            "These figures support a decision; they replace neither a stock-take nor the judgement of the people responsible. Where money or safety " +
            "hangs on them, have them checked first, and keep to the rules that apply to you.");
    }

    private static string InWords(Certificate certificate) => (certificate.IsProof, certificate) switch
    {
        (true, { Basis: ErrorBasis.Structure }) => "exact, it follows from which moves are possible at all.",
        (true, { RelativeErrorBound: < 1 }) => $"proved, no figure is off by more than {Parts(certificate.RelativeErrorBound)} of itself.",
        (true, { AbsoluteErrorBound: < 1 }) => $"proved, no figure is off by more than {Parts(certificate.AbsoluteErrorBound)}.",
        _ => string.Create(CultureInfo.InvariantCulture, $"not proved; put back into its equations it leaves {certificate.Residual:0.0E+0}."),
    };

    /// <summary>A bound in words: one part in a power of ten, rounded to the safe side.</summary>
    private static string Parts(double bound) =>
        bound <= 0 ? "0" : string.Create(CultureInfo.InvariantCulture, $"one part in 10^{Math.Floor(-Math.Log10(bound)):0}");
}
