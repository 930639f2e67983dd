using FilmReports.Charts;
using FilmReports.Drawings;

namespace FilmReports.Pages;

/// <summary>Several films one against another, on one page.</summary>
internal static class ComparisonPage
{
    /// <summary>The page.</summary>
    /// <param name="films">Two or more.</param>
    /// <param name="drawings">Charts that hold all of them; the first two go on the first page.</param>
    public static IEnumerable<Block> Of(IReadOnlyList<ReportedFilm> films, IReadOnlyList<Drawing> drawings) =>
    [
        Summary(films, [.. drawings.Take(2)]),
        .. drawings.Skip(2).Select(drawing => new Figure(drawing)),
    ];

    private static OnePage Summary(IReadOnlyList<ReportedFilm> films, IReadOnlyList<Drawing> drawings) => new(
    [
        new Heading(1, $"{Digits.Count(films.Count)} films side by side"),
        new Paragraph("Shares are per source photon, lumens and power per source watt.", ParagraphRole.Made),
        Table.Of("What is compared", ["film", "title", "finding"], films.Select((film, i) => (IReadOnlyList<string>)
            [FilmLetters.Of(i), film.Case.Film.Title, Findings.Answer(film.Case, film.Appraisal, null)]), TableKind.Words),
        Table.Of("Light", ["film", "panel, lm/W", "film, lm/W", "blue leakage, photons", "energy efficiency", "down-conversion"], films.Select(Light)),
        .. Gamut(films),
        Table.Of("Dots in the cured layers", ["film", "loadings"], films.Select((film, i) => (IReadOnlyList<string>)
            [FilmLetters.Of(i), string.Join("; ", film.Case.Film.Layers.SelectMany(layer => layer.Dots).Select(dots => $"{dots.Lot.Name} {Digits.Significant(dots.LoadingMgPerMl, 4)}\u2009mg/mL"))]), TableKind.Words),
        .. drawings.Select(drawing => new Figure(drawing)),
    ]);

    private static IReadOnlyList<string> Light(ReportedFilm film, int index)
    {
        var (appraisal, efficiency) = (film.Appraisal, film.Appraisal.Efficiency);
        return
        [
            FilmLetters.Of(index), Digits.Fixed(appraisal.Panel?.LumensPerSourceWatt, 1), Digits.Fixed(appraisal.FilmLumensPerSourceWatt, 1),
            Digits.Percent(efficiency.BlueLeakagePhotonShare), Digits.Percent(efficiency.EnergyShare), Digits.Percent(efficiency.DownConversionShare),
        ];
    }

    // One column for each standard that any film is compared with.
    private static IEnumerable<Block> Gamut(IReadOnlyList<ReportedFilm> films)
    {
        string[] names = [.. films.SelectMany(film => film.Appraisal.Gamut ?? []).Select(g => g.Name).Distinct(StringComparer.Ordinal)];
        if (names.Length == 0)
            yield break;
        yield return Table.Of("Coverage by the panel, in xy / in u′v′", ["film", .. names], films.Select((film, i) => (IReadOnlyList<string>)
        [
            FilmLetters.Of(i),
            .. names.Select(name => film.Appraisal.Gamut?.FirstOrDefault(g => g.Name == name) is { } found
                ? $"{Digits.Percent(found.CoverageXy)} / {Digits.Percent(found.CoverageUv)}"
                : Digits.Unknown),
        ]));
    }
}
