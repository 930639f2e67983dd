using System.Globalization;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>The light of several films in one field, told apart by dash and letter.</summary>
internal static class FilmSpectraChart
{
    public static Drawing Of(IReadOnlyList<ReportedFilm> films, Palette palette)
    {
        var (fromNm, toNm) = LightMarks.Range(films.Select(film => film.Appraisal.Power));
        double highest = films.Max(film => film.Appraisal.Power.Peak), step = Plot.NiceStep(highest, 5);
        var frame = new ChartFrame(
            new(
                "spectra",
                "Light leaving above each film",
                string.Join(' ', films.Select((film, i) => string.Create(
                    CultureInfo.InvariantCulture, $"{FilmLetters.Of(i)}, {film.Case.Film.Title}: {film.Appraisal.FilmLumensPerSourceWatt:0.0} lm per source watt.")))),
            new("wavelength / nm", fromNm, toNm, 20),
            new("power per nm and source watt / nm⁻¹", 0, Math.Ceiling(highest * 1.1 / step) * step, step),
            palette,
            height: 230);
        Lines.Draw(
            frame.Plot,
            [
                .. films.Select((film, i) => new NamedLine(
                    FilmLetters.Of(i),
                    [.. Enumerable.Range(fromNm, toNm - fromNm + 1).Select(nm => ((double)nm, film.Appraisal.Power[nm]))],
                    Lines.StrokeOf(i, palette))),
            ],
            palette);
        return frame.Finish();
    }
}
