namespace FilmReports;

/// <summary>What a report is made into.</summary>
/// <param name="Forms">Which kinds of file.</param>
/// <param name="Date">The date it bears; null for none. No clock is read.</param>
public sealed record ReportRequest(IReadOnlyCollection<ReportForm> Forms, DateOnly? Date)
{
    /// <summary>Every kind of file, without a date.</summary>
    public static ReportRequest Everything { get; } = new(Enum.GetValues<ReportForm>(), Date: null);
}

/// <summary>A kind of file of a report.</summary>
public enum ReportForm
{
    /// <summary>A page for screens.</summary>
    Html,

    /// <summary>Pages for paper.</summary>
    Pdf,

    /// <summary>Each chart in pixels.</summary>
    Png,

    /// <summary>Each chart in lines and text.</summary>
    Svg,
}
