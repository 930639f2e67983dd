using FilmDesign;
using FilmOptics;
using FilmReports.Charts;
using FilmReports.Drawings;
using FilmReports.Pages;

namespace FilmReports;

/// <summary>A film with its figures.</summary>
/// <param name="Case">The film file.</param>
/// <param name="Appraisal">Its figures.</param>
/// <param name="Map">What other loadings would do, where it was computed.</param>
public sealed record ReportedFilm(FilmCase Case, FilmAppraisal Appraisal, LoadingMap? Map = null);

/// <summary>The report of several films: one against another on the first page, then each in full.</summary>
public static class FilmsReport
{
    /// <summary>All files of the report.</summary>
    /// <param name="films">Two or more.</param>
    /// <param name="request">Which files; null for all, without a date.</param>
    public static IReadOnlyList<ReportFile> Write(IReadOnlyList<ReportedFilm> films, ReportRequest? request = null)
    {
        ArgumentNullException.ThrowIfNull(films);
        ArgumentOutOfRangeException.ThrowIfLessThan(films.Count, 2);
        request ??= ReportRequest.Everything;
        return [.. ReportFiles.Of(request, palette => Text(films, request.Date, palette))];
    }

    private static ReportText Text(IReadOnlyList<ReportedFilm> films, DateOnly? date, Palette palette)
    {
        // Profiles of one zone go into one picture.
        (string Name, ZoneProfile Profile)[] zones = [.. films.Select((film, i) => (FilmLetters.Of(i), film.Appraisal.Zone)).Where(z => z.Zone is not null).Select(z => (z.Item1, z.Zone!))];
        Drawing[] together =
        [
            FilmSpectraChart.Of(films, palette),
            FilmWhitesChart.Of(films, palette),
            .. zones.Length == films.Count ? [ZoneChart.Of(zones, palette)] : Array.Empty<Drawing>(),
        ];
        string title = $"{string.Join(", ", films.Take(films.Count - 1).Select(film => film.Case.Film.Title))} and {films[^1].Case.Film.Title}";
        return new(
            title,
            date,
            [
                .. ComparisonPage.Of(films, together),
                .. films.SelectMany((film, i) => ReportPage.Of(film.Case, film.Appraisal, null, FilmReport.Drawings(film.Case, film.Appraisal, palette, film.Map))
                    .Select(block => Lettered(block, FilmLetters.Of(i)))),
            ],
            together);
    }

    // On one page no two drawings may have one name, and a reader wants to know which film a heading speaks of.
    private static Block Lettered(Block block, string letter) => block switch
    {
        OnePage page => new OnePage([.. page.Blocks.Select(inner => Lettered(inner, letter))]),
        Heading heading => heading with { Text = $"{letter} · {heading.Text}" },
        Figure figure => new Figure(figure.Drawing with { Name = $"{figure.Drawing.Name}-{letter.Replace(' ', '-')}" }),
        _ => block,
    };
}
