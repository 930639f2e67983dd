using System.Globalization;

namespace FilmReports.Pages;

/// <summary>Numbers as people read them: true minus, an en dash for what is not known.</summary>
internal static class Digits
{
    public const string Unknown = "–";

    /// <summary>With a fixed number of decimals.</summary>
    public static string Fixed(double? value, int decimals) =>
        value is { } v ? Signed(v.ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture)) : Unknown;

    /// <summary>With up to so many significant digits.</summary>
    public static string Significant(double? value, int digits) =>
        value is { } v ? Signed(v.ToString("G" + digits.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture)) : Unknown;

    /// <summary>A share as a percentage.</summary>
    public static string Percent(double? share, int decimals = 2) => share is { } s ? $"{Fixed(s * 100, decimals)}\u2009%" : Unknown;

    private static string Signed(string text) => text.Replace('-', '\u2212');
}
