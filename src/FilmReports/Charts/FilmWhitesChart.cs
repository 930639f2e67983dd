using System.Globalization;
using Colorimetry;
using FilmOptics;
using FilmReports.Drawings;
using FilmReports.Pages;

namespace FilmReports.Charts;

/// <summary>The whites of several films, where each is judged, with the tolerances of their targets.</summary>
internal static class FilmWhitesChart
{
    public static Drawing Of(IReadOnlyList<ReportedFilm> films, Palette palette)
    {
        ScatterPoint[] whites = [.. films.Select((film, i) => Point(White(film), FilmLetters.Of(i)))];
        ScatterWindow[] tolerances = [.. films.Select(film => film.Case.Target).OfType<WhiteTarget>().DistinctBy(t => (t.WhiteX, t.WhiteY, t.ToleranceXy)).Select(Tolerance)];
        // Equal scales across and up, wide enough for every white and every tolerance.
        (double X, double Y)[] held = [.. whites.Select(w => (w.X, w.Y)), .. tolerances.SelectMany(t => t.Outline)];
        double span = Math.Max(Math.Max(Span(held.Select(h => h.X)), Span(held.Select(h => h.Y))) * 1.3, 0.002), height = 230, width = 520;
        double across = Middle(held.Select(h => h.X)), up = Middle(held.Select(h => h.Y)), step = Plot.NiceStep(span, 4);
        var frame = new ChartFrame(
            new(
                "whites",
                "Whites, CIE 1931 xy",
                string.Join(' ', whites.Select(w => string.Create(CultureInfo.InvariantCulture, $"{w.Name}: x {w.X:0.0000}, y {w.Y:0.0000}."))),
                "outline: tolerance; stroke through a dot: outside it"),
            new("x", across - (span / 2 * width / height), across + (span / 2 * width / height), step),
            new("y", up - (span / 2), up + (span / 2), step),
            palette,
            width,
            height);
        frame.Plot.Inside(ChromaticityChart.PlanckianLine(new(frame.Plot, ChromaticityDiagram.Xy1931), palette));
        Scatter.Draw(frame.Plot, whites, tolerances, palette);
        return frame.Finish();
    }

    /// <summary>White where the film is judged: at its target, or at the panel if there is one.</summary>
    internal static Chromaticity White(ReportedFilm film) =>
        (Findings.IsAtPanel(film.Case, film.Appraisal) ? film.Appraisal.Panel!.White : film.Appraisal.FilmWhite).Chromaticity;

    private static ScatterPoint Point(Chromaticity white, string name) => new(white.X, white.Y, name);

    private static ScatterWindow Tolerance(WhiteTarget target) => new(
        "target",
        [
            .. Enumerable.Range(0, 72).Select(i => i * Math.PI / 36)
                .Select(angle => (target.WhiteX + (target.ToleranceXy * Math.Cos(angle)), target.WhiteY + (target.ToleranceXy * Math.Sin(angle)))),
        ]);

    private static double Span(IEnumerable<double> values) => values.Max() - values.Min();

    private static double Middle(IEnumerable<double> values) => (values.Max() + values.Min()) / 2;
}
