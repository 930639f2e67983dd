using System.Globalization;

namespace FilmReports.Charts;

/// <summary>Letters that stand for films side by side.</summary>
internal static class FilmLetters
{
    /// <summary>A, B, C and so on; after Z, film 27.</summary>
    public static string Of(int index) => index < 26 ? ((char)('A' + index)).ToString() : string.Create(CultureInfo.InvariantCulture, $"film {index + 1}");
}
