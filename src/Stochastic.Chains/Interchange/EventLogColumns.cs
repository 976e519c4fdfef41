namespace Stochastic.Chains;

/// <summary>Which columns of a CSV event log hold what, and how they are written.</summary>
/// <remarks>The first row is the header. Names are compared exactly, blanks around them aside; the order of the columns is free and others are ignored.</remarks>
/// <example>
/// <code>
/// var columns = new EventLogColumns
/// {
///     Item = "crate", Time = "scanned_at", State = "stage",
///     TimeZone = TimeZoneInfo.FindSystemTimeZoneById("Europe/Berlin"),
/// };
/// </code>
/// </example>
public sealed record EventLogColumns
{
    /// <summary>Gets the name of the column that identifies the item.</summary>
    /// <exception cref="ArgumentException">Set to null or to nothing but blanks.</exception>
    public required string Item
    {
        get;
        init => field = Name(value);
    }

    /// <summary>Gets the name of the column that holds the time.</summary>
    /// <exception cref="ArgumentException">Set to null or to nothing but blanks.</exception>
    public required string Time
    {
        get;
        init => field = Name(value);
    }

    /// <summary>Gets the name of the column that holds the state.</summary>
    /// <exception cref="ArgumentException">Set to null or to nothing but blanks.</exception>
    public required string State
    {
        get;
        init => field = Name(value);
    }

    /// <summary>Gets the character between two fields. Default: a comma. A tab, or a printable ASCII character other than the quote.</summary>
    public char Separator { get; init; } = ',';

    /// <summary>
    /// Gets the formats in which times are written, as .NET custom date and time formats, read in the invariant culture; the first that fits
    /// is taken. Default: none given, ISO 8601 such as <c>2024-05-06T14:30:00+02:00</c>, <c>2024-05-06 14:30</c> or <c>2024-05-06</c>,
    /// fractions of a second and <c>Z</c> allowed.
    /// </summary>
    /// <exception cref="ArgumentNullException">Set to null.</exception>
    public IReadOnlyList<string> TimeFormats
    {
        get;
        init => field = value ?? throw new ArgumentNullException(nameof(value));
    } = [];

    /// <summary>Gets the time zone of times written without an offset. Default: none given, such times are refused.</summary>
    public TimeZoneInfo? TimeZone { get; init; }

    /// <summary>
    /// Gets how a time without an offset is read that comes twice, when clocks are set back. Default: <see cref="AmbiguousTimes.Refuse"/>. A time
    /// that never comes, when clocks are set forward, is always refused.
    /// </summary>
    public AmbiguousTimes AmbiguousTimes { get; init; } = AmbiguousTimes.Refuse;

    private static string Name(string value)
    {
        ArgumentException.ThrowIfNullOrWhiteSpace(value);
        return value.Trim();
    }
}
