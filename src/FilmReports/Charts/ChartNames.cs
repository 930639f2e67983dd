using System.Globalization;
using FilmOptics;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>Names of lots and layers as charts can write them.</summary>
/// <remarks>
/// The shipped font has Latin, Greek and Cyrillic letters. A name in another script stands in full on the page, whose reader's own fonts show it;
/// in charts, where it would vanish, its number in the film file takes its place.
/// </remarks>
internal static class ChartNames
{
    /// <summary>The name of a lot, or "lot 2".</summary>
    public static string OfLot(Film film, int index) => Writable(film.Lots[index].Name) ?? $"lot {Number(index)}";

    /// <summary>The name of a layer, or "layer 1".</summary>
    public static string OfLayer(Film film, int index) => Writable(film.Layers[index].Name) ?? $"layer {Number(index)}";

    /// <summary>What the page says of names that charts replace.</summary>
    public static IEnumerable<string> Replaced(Film film) =>
        film.Lots.Select((lot, i) => (lot.Name, Shown: OfLot(film, i)))
            .Concat(film.Layers.Select((layer, i) => (layer.Name, Shown: OfLayer(film, i))))
            .Where(pair => pair.Name != pair.Shown)
            .Select(pair => $"In the charts, {pair.Shown} stands for {pair.Name}, whose characters their font lacks.");

    private static string? Writable(string name) => InterFont.CanWrite(name, TextWeight.Regular) && InterFont.CanWrite(name, TextWeight.SemiBold) ? name : null;

    private static string Number(int index) => (index + 1).ToString(CultureInfo.InvariantCulture);
}
