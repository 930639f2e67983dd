using System.Globalization;
using FilmOptics;

namespace FilmReports.Pages;

/// <summary>Numbers as people read them: true minus, thin space before a unit, an en dash for what is not known.</summary>
internal static class Digits
{
    public const string Unknown = "–";

    /// <summary>With a fixed number of decimals.</summary>
    public static string Fixed(double? value, int decimals) =>
        value is { } v ? WithMinus(v.ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture)) : Unknown;

    /// <summary>With a fixed number of decimals and a sign always.</summary>
    public static string Signed(double? value, int decimals) => value is { } v && !double.IsNegative(v) ? $"+{Fixed(v, decimals)}" : Fixed(value, decimals);

    /// <summary>With up to so many significant digits; very small and very large numbers as a power of ten.</summary>
    public static string Significant(double? value, int digits)
    {
        if (value is not { } v)
            return Unknown;
        string scientific = v.ToString("E" + (digits - 1).ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        string[] parts = scientific.Split('E');
        int power = int.Parse(parts[1], CultureInfo.InvariantCulture);
        if (v == 0 || power is >= -4 and < 6)
            return WithMinus(double.Parse(scientific, CultureInfo.InvariantCulture).ToString("0.##########", CultureInfo.InvariantCulture));
        string mantissa = double.Parse(parts[0], CultureInfo.InvariantCulture).ToString("0.##########", CultureInfo.InvariantCulture);
        return WithMinus($"{mantissa}\u2009×\u200910{Superscript(power)}");
    }

    /// <summary>A count, its thousands apart by thin spaces.</summary>
    public static string Count(long value) => value.ToString("#,0", CultureInfo.InvariantCulture).Replace(',', '\u2009');

    /// <summary>A share as a percentage.</summary>
    public static string Percent(double? share, int decimals = 1) => share is { } s ? $"{Fixed(s * 100, decimals)}\u2009%" : Unknown;

    /// <summary>Decimals of a share that a result's error supports: the last one is of the error's size. 4 for a model that states none.</summary>
    public static int ShareDecimals(FilmOutput output)
    {
        double? error = output.Tracing is { } tracing ? tracing.LargestBudgetErrorShare : output.Accuracy?.EstimateShare;
        return error is > 0 and < 1 ? Math.Clamp((int)Math.Ceiling(-Math.Log10(error.Value)), 2, 5) : 4;
    }

    private static string Superscript(int power) => string.Concat(
        power.ToString(CultureInfo.InvariantCulture).Select(c => c == '-' ? '⁻' : "⁰¹²³⁴⁵⁶⁷⁸⁹"[c - '0']));

    private static string WithMinus(string text) => text.Replace('-', '\u2212');
}
