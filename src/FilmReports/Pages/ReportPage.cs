using FilmDesign;
using FilmOptics;
using FilmReports.Charts;
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
        page.Paragraph($"Model: {appraisal.Output.Model}{Effort(appraisal.Output)}. Observer: {filmCase.Observer.Name}. Shares are per source photon, lumens and power per source watt.", "made");
        page.Paragraph(Findings.Answer(filmCase, appraisal, formulation), "found");
        page.Answers(Findings.Key(filmCase, appraisal));
        page.Figure(figures["spectrum"]);
        Colour(page, appraisal, figures);
        Photons(page, filmCase, appraisal, figures);
        Recipe(page, filmCase, appraisal, figures);
        Input(page, filmCase);
        page.Heading(2, "Warnings");
        string[] warnings = [.. appraisal.Warnings, .. ChartNames.Replaced(filmCase.Film)];
        if (warnings.Length > 0)
            page.List(warnings);
        else
            page.Paragraph("None.");
        Caution(page, filmCase, appraisal);
        return page.Finish();
    }

    private static string Effort(FilmOutput output) =>
        output.Tracing is { } tracing ? $", {Digits.Count(tracing.Photons)} photons traced, seed {tracing.Seed.ToString(System.Globalization.CultureInfo.InvariantCulture)}"
        : output.Accuracy is { } accuracy ? $", estimated error {Digits.Significant(accuracy.EstimateShare, 2)}"
        : "";

    private static void Colour(PageWriter page, FilmAppraisal appraisal, Dictionary<string, Drawing> figures)
    {
        page.Heading(2, "Colour");
        page.Table("White and primaries", ["colour", "x", "y", "u′", "v′", "CCT / K", "Duv"], ReportTables.Colours(appraisal));
        page.Figure(figures["chromaticity-1931"]);
        page.Figure(figures["chromaticity-1976"]);
        if (appraisal.Gamut is not { } gamut)
            return;
        page.Table(
            "Panel against standards. Coverage: what of the standard's area the panel reaches. Area ratio: the panel's area over the standard's, reached or not.",
            ["standard", "coverage, xy", "coverage, u′v′", "area ratio, xy", "area ratio, u′v′"],
            ReportTables.Gamut(gamut));
    }

    private static void Photons(PageWriter page, FilmCase filmCase, FilmAppraisal appraisal, Dictionary<string, Drawing> figures)
    {
        page.Heading(2, "Photons");
        page.Figure(figures["photon-fates"]);
        page.Table(
            "Photon budget: each line from its own flux or absorption, none a remainder",
            appraisal.Output.Tracing is null ? ["fate of a source photon", "share"] : ["fate of a source photon", "share", "standard error"],
            ReportTables.Budget(filmCase, appraisal.Output),
            TableKind.WithSum);
        page.Table(
            "Light leaving above by last emitter, after re-absorption",
            ["band", "source photons absorbed", "excitations", "photons out", "peak / nm", "FWHM / nm"],
            ReportTables.Bands(filmCase, appraisal));
        page.Table("Efficiencies", ["efficiency", "value", "meaning"], ReportTables.Efficiencies(appraisal), TableKind.Words);
    }

    private static void Recipe(PageWriter page, FilmCase filmCase, FilmAppraisal appraisal, Dictionary<string, Drawing> figures)
    {
        page.Heading(2, "Recipe");
        page.Table("Dots with their ligand in the cured layer", ["lot and layer", "mg/mL", "wt%", "vol%", "g/m²"], ReportTables.Recipe(filmCase.Film));
        page.Table(
            "Layers, bottom to top. Optical density: decadic, dots and host, along the normal at the source's peak",
            ["layer", "thickness / µm", "coat weight / g/m²", "optical density", "refractive index"],
            ReportTables.Layers(filmCase.Film, appraisal));
        page.Figure(figures["lots"]);
    }

    private static void Input(PageWriter page, FilmCase filmCase)
    {
        page.Heading(2, "Input");
        page.Table("Backlight, cavity, panel and target", ["input", "value"], InputTables.Surroundings(filmCase), TableKind.Words);
        page.Table(
            "Layers; absorption, scattering and anisotropy at the source's peak",
            ["layer", "thickness / µm", "index", "host absorption / mm⁻¹", "scattering / mm⁻¹", "anisotropy g", "host density / g/mL"],
            InputTables.Layers(filmCase.Film));
        page.Table(
            "Lots",
            ["lot", "emission peak / nm", "quantum yield", "yield in film", "absorbance factor", "shift / nm", "density / g/mL"],
            InputTables.Lots(filmCase.Film));
    }

    private static void Caution(PageWriter page, FilmCase filmCase, FilmAppraisal appraisal)
    {
        page.Heading(2, "Cautions");
        page.Table(
            "Blue light: power in 415–455 nm of that in 400–500 nm, and power weighted with B(λ) of IEC 62471 per lumen",
            ["light", "415–455 nm of blue", "hazard / mW/lm"],
            ReportTables.BlueLights(filmCase, appraisal));
        page.Table(
            $"Restricted metals per dot layer. {RestrictedSubstances.LimitText}",
            ["layer", "Cd / mg/kg", "Cd / µg/mm²", "Pb / mg/kg", "Pb / µg/mm²"],
            ReportTables.Metals(filmCase.Film));
        page.List(Cautions.Statements(filmCase.Film));
    }
}
