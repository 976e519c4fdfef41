namespace Stochastic.Chains.Interchange;

/// <summary>Takes the quotes off a field by the rules of RFC 4180, section 2.</summary>
internal static class CsvField
{
    private const char Quote = '"';
    private const string DoubledQuote = "\"\"";

    /// <summary>Whether the quotes of a field are in order: none, or one at each end and only doubled ones between.</summary>
    internal static bool IsWellFormed(ReadOnlySpan<char> field)
    {
        var trimmed = field.Trim();
        if (!trimmed.Contains(Quote))
        {
            return true;
        }

        if (trimmed.Length < 2 || trimmed[0] != Quote || trimmed[^1] != Quote)
        {
            return false;
        }

        var inner = trimmed[1..^1];
        for (var at = inner.IndexOf(Quote); at >= 0; at = inner.IndexOf(Quote))
        {
            if (at + 1 == inner.Length || inner[at + 1] != Quote)
            {
                return false;
            }

            inner = inner[(at + 2)..];
        }

        return true;
    }

    /// <summary>The text of a well-formed field: blanks around it are taken off, those within quotes are kept.</summary>
    internal static ReadOnlySpan<char> Text(ReadOnlySpan<char> field)
    {
        var trimmed = field.Trim();
        if (trimmed.IsEmpty || trimmed[0] != Quote)
        {
            return trimmed;
        }

        var inner = trimmed[1..^1];
        return inner.Contains(Quote) ? inner.ToString().Replace(DoubledQuote, "\"", StringComparison.Ordinal) : inner;
    }
}
