using System.Globalization;

namespace FilmOptics.Tests.PhotonTracing;

/// <summary>Rows of the CSV files beside the tests; each row names its source.</summary>
internal static class ReferenceRows
{
    public static IEnumerable<string[]> Of(string file) =>
        File.ReadLines(Path.Combine(AppContext.BaseDirectory, file)).Skip(1).Select(line => line.Split(','));

    public static double Number(string text) => double.Parse(text, CultureInfo.InvariantCulture);
}
