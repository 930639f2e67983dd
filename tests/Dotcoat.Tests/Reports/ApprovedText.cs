using System.Globalization;
using System.Text.RegularExpressions;

namespace Dotcoat.Tests.Reports;

/// <summary>Compares text with an approved one: words must be the same, numbers may differ by one unit of the last digit shown, or by 1e-9 of their size.</summary>
/// <remarks>Sums over vector lanes come out differently in the last bits on another processor, and a bit can turn a rounded digit.</remarks>
internal static partial class ApprovedText
{
    private const double RoundingShare = 1e-9;

    /// <summary>The first difference in words; null where there is none.</summary>
    public static string? Difference(string approved, string found)
    {
        var (a, b) = (Pieces(approved), Pieces(found));
        for (int i = 0; i < Math.Min(a.Length, b.Length); i++)
        {
            if (!Same(a[i], b[i]))
                return $"'{Around(a, i)}' is approved, '{Around(b, i)}' was found";
        }

        return a.Length == b.Length ? null : $"{a.Length} pieces of text and numbers are approved, {b.Length} were found";
    }

    private static bool Same(string approved, string found)
    {
        if (approved == found)
            return true;
        if (!Value(approved, out double a) || !Value(found, out double b))
            return false;
        return Math.Abs(a - b) <= Math.Max(LastDigit(approved), RoundingShare * Math.Abs(a)) * (1 + 1e-6);
    }

    private static bool Value(string piece, out double value) =>
        double.TryParse(piece.Replace('−', '-'), NumberStyles.Float, CultureInfo.InvariantCulture, out value);

    // One unit of the last digit written.
    private static double LastDigit(string number)
    {
        string[] parts = number.Split('E', 'e');
        int point = parts[0].IndexOf('.', StringComparison.Ordinal);
        int decimals = point < 0 ? 0 : parts[0].Length - 1 - point;
        int power = parts.Length > 1 ? int.Parse(parts[1], CultureInfo.InvariantCulture) : 0;
        // A whole number is a count, a wavelength or a version: it does not waver.
        return point < 0 && power == 0 ? 0 : Math.Pow(10, power - decimals);
    }

    private static string[] Pieces(string text) => Number().Split(text);

    private static string Around(string[] pieces, int i) => string.Concat(pieces[Math.Max(0, i - 2)..Math.Min(pieces.Length, i + 3)]);

    [GeneratedRegex(@"(?<number>[-−]?\d+(\.\d+)?([eE][-+]?\d+)?)", RegexOptions.ExplicitCapture, 5000)]
    private static partial Regex Number();
}
