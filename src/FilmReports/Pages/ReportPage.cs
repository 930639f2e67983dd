using FilmDesign;
using FilmOptics;
using FilmReports.Drawings;
using FilmReports.Safety;

namespace FilmReports.Pages;

/// <summary>The page of one film: the answer first, then pictures, tables, warnings and cautions.</summary>
internal static class ReportPage
{
    public static string Write(FilmCase filmCase, FilmAppraisal appraisal, Formulation? formulation, IReadOnlyList<Drawing> drawings)
    {
        var figures = drawings.ToDictionary(drawing => drawing.Name, StringComparer.Ordinal);
        using var page = new PageWriter(filmCase.Film.Title);
        page.Heading(1, filmCase.Film.Title);
        page.Paragraph($"Model: {appraisal.Output.Model}. Observer: {filmCase.Observer.Name}. Shares are per source photon or per source watt.", "made");
        page.Paragraph(Findings.Answer(filmCase, appraisal, formulation), "found");
        page.Answers(Findings.Key(filmCase, appraisal));

        page.Figure(figures["spectrum"]);
        page.Heading(2, "Colour and gamut");
        page.Table("White and primaries", ["colour", "x", "y", "u′", "v′", "CCT / K", "Duv"], ReportTables.Colours(appraisal));
        if (appraisal.Gamut is { } gamut)
        {
            page.Table(
                "Panel against standards: coverage is what of the standard is reached, area ratio is how large the panel's triangle is beside it",
                ["standard", "coverage, xy", "coverage, u′v′", "area ratio, xy", "area ratio, u′v′"],
                gamut.Select(g => (IReadOnlyList<string>)[g.Name, Digits.Percent(g.CoverageXy), Digits.Percent(g.CoverageUv), Digits.Percent(g.AreaRatioXy), Digits.Percent(g.AreaRatioUv)]));
        }

        page.Figure(figures["chromaticity-1931"]);
        page.Figure(figures["chromaticity-1976"]);

        page.Heading(2, "Where every photon goes");
        page.Figure(figures["photon-fates"]);
        page.Table("Photon budget", ["fate of a source photon", "share"], ReportTables.Budget(filmCase, appraisal.Output.Budget));
        page.Table("Per lot", ["lot", "source photons absorbed", "excitations, all generations", "photons out", "peak / nm", "FWHM / nm"], ReportTables.Lots(filmCase, appraisal));
        page.Table("Efficiencies", ["efficiency", "value", "meaning"], ReportTables.Efficiencies(appraisal));

        page.Heading(2, "Recipe");
        page.Table("Loadings, of the cured layer; dots with their ligand", ["lot and layer", "mg/mL", "wt%", "vol%", "g/m²"], ReportTables.Recipe(filmCase.Film));
        page.Table("Layers, bottom to top", ["layer", "thickness / µm", "coat weight / g/m²", "optical density at the source's peak", "index"], ReportTables.Layers(filmCase.Film, appraisal));
        page.Figure(figures["lots"]);

        page.Heading(2, "Input");
        page.Table("Backlight, cavity, panel and target", ["input", "value"], ReportTables.Input(filmCase));
        page.Table("Lots", ["lot", "quantum yield", "yield in film", "absorbance factor", "shift / nm"], ReportTables.LotInputs(filmCase.Film));

        page.Heading(2, "Warnings");
        if (appraisal.Warnings.Count > 0)
            page.List(appraisal.Warnings);
        else
            page.Paragraph("None.");
        page.Heading(2, "Cautions");
        page.List(Cautions.For(filmCase, appraisal));
        return page.Finish();
    }
}
