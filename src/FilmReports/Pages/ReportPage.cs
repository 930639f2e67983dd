using System.Globalization;
using FilmDesign;
using FilmOptics;
using FilmReports.Charts;
using FilmReports.Drawings;
using FilmReports.Safety;

namespace FilmReports.Pages;

/// <summary>The report of one film: a page with the answer and the two pictures that explain it, then tables, warnings and cautions.</summary>
internal static class ReportPage
{
    /// <summary>Everything a report says of a film.</summary>
    /// <param name="filmCase">The film file.</param>
    /// <param name="appraisal">Its figures.</param>
    /// <param name="formulation">The search behind it, or null.</param>
    /// <param name="drawings">Its charts.</param>
    public static IReadOnlyList<Block> Of(FilmCase filmCase, FilmAppraisal appraisal, Formulation? formulation, IReadOnlyList<Drawing> drawings)
    {
        var figures = drawings.ToDictionary(drawing => drawing.Name, StringComparer.Ordinal);
        string[] warnings = [.. appraisal.Warnings, .. ChartNames.Replaced(filmCase.Film)];
        return
        [
            new OnePage(
            [
                new Heading(1, filmCase.Film.Title),
                new Paragraph($"Model: {appraisal.Output.Model}{Effort(appraisal.Output)}. Observer: {filmCase.Observer.Name}. Shares are per source photon, lumens and power per source watt.", ParagraphRole.Made),
                new Paragraph(Findings.Answer(filmCase, appraisal, formulation), ParagraphRole.Found),
                new Answers([.. Findings.Key(filmCase, appraisal)]),
                new Figure(figures["spectrum"]),
                new Figure(figures["photon-fates"]),
            ]),
            .. Colour(appraisal, figures),
            .. Photons(filmCase, appraisal),
            .. Recipe(filmCase, appraisal, figures),
            .. Input(filmCase),
            new Heading(2, "Warnings"),
            warnings.Length > 0 ? new Sentences(warnings) : new Paragraph("None."),
            .. Caution(filmCase, appraisal),
        ];
    }

    private static string Effort(FilmOutput output) =>
        output.Tracing is { } tracing ? $", {Digits.Count(tracing.Photons)} photons traced, seed {tracing.Seed.ToString(CultureInfo.InvariantCulture)}"
        : output.Accuracy is { } accuracy ? $", estimated error {Digits.Significant(accuracy.EstimateShare, 2)}"
        : "";

    private static IEnumerable<Block> Colour(FilmAppraisal appraisal, Dictionary<string, Drawing> figures)
    {
        yield return new Heading(2, "Colour");
        yield return Table.Of("White and primaries", ["colour", "x", "y", "u′", "v′", "CCT / K", "Duv"], ReportTables.Colours(appraisal));
        yield return new Figure(figures["chromaticity-1931"]);
        yield return new Figure(figures["chromaticity-1976"]);
        foreach (string name in (string[])["colour-over-angle", "halo"])
        {
            if (figures.TryGetValue(name, out var drawing))
                yield return new Figure(drawing);
        }

        if (appraisal.Gamut is not { } gamut)
            yield break;
        yield return Table.Of(
            "Panel against standards. Coverage: what of the standard's area the panel reaches. Area ratio: the panel's area over the standard's, reached or not.",
            ["standard", "coverage, xy", "coverage, u′v′", "area ratio, xy", "area ratio, u′v′"],
            ReportTables.Gamut(gamut));
    }

    private static IEnumerable<Block> Photons(FilmCase filmCase, FilmAppraisal appraisal) =>
    [
        new Heading(2, "Photons"),
        Table.Of(
            "Photon budget: each line from its own flux or absorption, none a remainder",
            appraisal.Output.Tracing is null ? ["fate of a source photon", "share"] : ["fate of a source photon", "share", "standard error"],
            ReportTables.Budget(filmCase, appraisal.Output),
            TableKind.WithSum),
        Table.Of(
            "Light leaving above by last emitter, after re-absorption",
            ["band", "source photons absorbed", "excitations", "photons out", "peak / nm", "FWHM / nm"],
            ReportTables.Bands(filmCase, appraisal)),
        Table.Of("Efficiencies", ["efficiency", "value", "meaning"], ReportTables.Efficiencies(appraisal), TableKind.Words),
    ];

    private static IEnumerable<Block> Recipe(FilmCase filmCase, FilmAppraisal appraisal, Dictionary<string, Drawing> figures) =>
    [
        new Heading(2, "Recipe"),
        Table.Of("Dots with their ligand in the cured layer", ["lot and layer", "mg/mL", "wt%", "vol%", "g/m²"], ReportTables.Recipe(filmCase.Film)),
        Table.Of(
            "Layers, bottom to top. Optical density: decadic, dots and host, along the normal at the source's peak",
            ["layer", "thickness / µm", "coat weight / g/m²", "optical density", "refractive index"],
            ReportTables.Layers(filmCase.Film, appraisal)),
        .. figures.TryGetValue("loading-map", out var map) ? [new Figure(map)] : Array.Empty<Block>(),
        new Figure(figures["lots"]),
    ];

    private static IEnumerable<Block> Input(FilmCase filmCase) =>
    [
        new Heading(2, "Input"),
        Table.Of("Backlight, cavity, panel and target", ["input", "value"], InputTables.Surroundings(filmCase), TableKind.Words),
        Table.Of(
            "Layers; absorption, scattering and anisotropy at the source's peak",
            ["layer", "thickness / µm", "index", "host absorption / mm⁻¹", "scattering / mm⁻¹", "anisotropy g", "host density / g/mL"],
            InputTables.Layers(filmCase.Film)),
        Table.Of(
            "Lots",
            ["lot", "emission peak / nm", "quantum yield", "yield in film", "absorbance factor", "shift / nm", "density / g/mL"],
            InputTables.Lots(filmCase.Film)),
    ];

    private static IEnumerable<Block> Caution(FilmCase filmCase, FilmAppraisal appraisal) =>
    [
        new Heading(2, "Cautions"),
        Table.Of(
            "Blue light: power in 415–455 nm of that in 400–500 nm, and power weighted with B(λ) of IEC 62471 per lumen",
            ["light", "415–455 nm of blue", "hazard / mW/lm"],
            ReportTables.BlueLights(filmCase, appraisal)),
        Table.Of(
            $"Restricted metals per dot layer. {RestrictedSubstances.LimitText}",
            ["layer", "Cd / mg/kg", "Cd / µg/mm²", "Pb / mg/kg", "Pb / µg/mm²"],
            ReportTables.Metals(filmCase.Film)),
        new Sentences([.. Cautions.Statements(filmCase.Film)]),
    ];
}
