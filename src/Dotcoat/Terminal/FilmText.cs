using FilmDesign;
using FilmOptics;
using FilmReports.Safety;

namespace Dotcoat.Terminal;

/// <summary>A film's figures for the terminal: the answer, then tables, then warnings and cautions.</summary>
internal static class FilmText
{
    /// <summary>What simulate prints.</summary>
    public static string Simulated(FilmCase filmCase, FilmAppraisal appraisal)
    {
        var text = new TerminalText();
        text.Paragraph(Whites.Answer(filmCase, appraisal));
        return Rest(text, filmCase, appraisal);
    }

    /// <summary>What formulate prints.</summary>
    public static string Formulated(Formulation formulation)
    {
        var text = new TerminalText();
        text.Paragraph(Outcome(formulation));
        text.Gap().Table(
            ["recipe", "layer", "mg/mL"],
            [.. formulation.Loadings.Select(l => new[] { l.LotName, l.LayerName, Figure.Fixed(l.LoadingMgPerMl, 4) })]);
        text.Gap().Paragraph(Whites.Answer(formulation.FilmCase, formulation.Appraisal));
        return Rest(text, formulation.FilmCase, formulation.Appraisal);
    }

    /// <summary>Whether a formulation reached its target, and if not, why and what to do.</summary>
    public static string Outcome(Formulation formulation)
    {
        string tolerance = Figure.Digits(formulation.FilmCase.Target!.ToleranceXy, 3);
        return formulation.Reached
            ? $"White is on target: {Figure.Fixed(formulation.WhiteErrorXy, 5)} in xy from it (tolerance {tolerance})."
            : $"{formulation.Limit} That is {Figure.Fixed(formulation.WhiteErrorXy, 4)} in xy from the target (tolerance {tolerance}).";
    }

    /// <summary>A film's figures as every door of the program shows them.</summary>
    public static IEnumerable<FigureTable> Tables(FilmCase filmCase, FilmAppraisal appraisal)
    {
        yield return new("colours", ["colour", "x", "y", "u′", "v′", "CCT K", "Duv", "lm/W"], [.. Whites.Rows(appraisal)]);
        yield return new("fates", ["where each source photon goes", "share"], [.. Fates(filmCase, appraisal.Output.Budget)]);
        yield return new("efficiency", ["efficiency", "share"], [.. Efficiencies(appraisal.Efficiency)]);
        yield return new(
            "bands",
            ["light above by last emitter", "photons", "peak nm", "FWHM nm"],
            [.. appraisal.Bands.Select(b => new[] { b.Name, Figure.Fixed(b.Photons, 4), Figure.Fixed(b.PeakNm, 1), Figure.Fixed(b.FwhmNm, 1) })]);
        yield return new(
            "layers",
            ["layer", "thickness µm", "coat g/m²", "optical density"],
            [.. appraisal.Layers.Select(l => new[] { l.Name, Figure.Fixed(l.ThicknessUm, 1), Figure.Fixed(l.CoatWeightGPerM2, 1), Figure.Fixed(l.OpticalDensity, 3) })]);
        if (appraisal.Output.Angles is { } angles)
        {
            yield return new(
                "angles",
                ["bare film, exit angle °", "luminance", "u′", "v′"],
                [.. AngularColour.Of(angles, filmCase.Observer).Select(a => new[] { Figure.Fixed(a.AngleDeg, 0), Figure.Fixed(a.RelativeLuminance, 3), Figure.Fixed(a.Chromaticity?.UPrime, 4), Figure.Fixed(a.Chromaticity?.VPrime, 4) })]);
        }

        if (appraisal.Haze is { } haze)
        {
            yield return new(
                "haze",
                [$"haze meter at {haze.WavelengthNm} nm, bare film", "share", "standard error"],
                [
                    ["total transmittance", Figure.Fixed(haze.TotalTransmittanceShare, 4), Figure.Digits(haze.TotalTransmittanceErrorShare, 1)],
                    ["haze", Figure.Fixed(haze.HazeShare, 4), Figure.Digits(haze.HazeErrorShare, 1)],
                ]);
        }

        if (appraisal is { Zone: { } zone, Spread: { } spread })
        {
            yield return new(
                "spread",
                ["light strays, from a point", "50 % within mm", "90 % within mm"],
                [.. spread.Select(s => new[] { s.Name, Figure.Digits(s.Radius50Mm, 3), Figure.Digits(s.Radius90Mm, 3) })]);
            yield return new(
                "zone",
                [$"one lit zone of {Figure.Digits(zone.ZoneMm, 4)} mm, mm from its centre", "luminance", "u′", "v′"],
                [.. zone.Points.Where((_, i) => i % 8 == 0).Select(p => new[] { Figure.Fixed(p.DistanceMm, 2), Figure.Digits(p.LuminanceShare, 3), Figure.Fixed(p.Chromaticity?.UPrime, 4), Figure.Fixed(p.Chromaticity?.VPrime, 4) })]);
        }

        if (appraisal.Edge is { } edge)
        {
            yield return new(
                "edge",
                ["near the cut edge, mm from it", "photons above per source photon", "u′", "v′"],
                [.. edge.Bands.Where((_, i) => i % 5 == 0).Select(band => new[] { Figure.Fixed(band.DistanceMm, 2), Figure.Fixed(band.Photons, 4), Figure.Fixed(band.Chromaticity?.UPrime, 4), Figure.Fixed(band.Chromaticity?.VPrime, 4) })]);
            yield return new("edge-loss", ["lost at the cut", $"as much as {Figure.Digits(edge.LostWidthMm, 3)} mm of backlight along it emit"], []);
        }

        if (appraisal.Gamut is { Count: > 0 } gamut)
        {
            yield return new(
                "gamut",
                ["panel against", "coverage xy", "coverage u′v′", "area ratio xy", "area ratio u′v′"],
                [.. gamut.Select(g => new[] { g.Name, Figure.Fixed(g.CoverageXy, 4), Figure.Fixed(g.CoverageUv, 4), Figure.Fixed(g.AreaRatioXy, 4), Figure.Fixed(g.AreaRatioUv, 4) })]);
        }
    }

    private static string Rest(TerminalText text, FilmCase filmCase, FilmAppraisal appraisal)
    {
        text.Paragraph($"Film: {filmCase.Film.Title}. Model: {appraisal.Output.Model}. Observer: {filmCase.Observer.Name}.");
        foreach (var table in Tables(filmCase, appraisal))
            text.Gap().Table(table.Header, table.Rows);
        return text.Sentences("Warnings", appraisal.Warnings).Sentences("Cautions", Cautions.For(filmCase, appraisal)).ToString();
    }

    private static IEnumerable<string[]> Fates(FilmCase filmCase, PhotonBudget budget)
    {
        yield return ["leaves above unconverted", Figure.Fixed(budget.Unconverted, 4)];
        yield return ["leaves above converted", Figure.Fixed(budget.Converted, 4)];
        yield return ["lost below", Figure.Fixed(budget.LostBelow, 4)];
        yield return ["lost above", Figure.Fixed(budget.LostAbove, 4)];
        yield return ["lost in the host", Figure.Fixed(budget.LostInHost, 4)];
        yield return ["lost at the edges", Figure.Fixed(budget.LostAtEdges, 4)];
        for (int i = 0; i < filmCase.Film.Lots.Count; i++)
            yield return [$"lost in {filmCase.Film.Lots[i].Name}", Figure.Fixed(budget.LostInLots[i], 4)];
        yield return ["sum", Figure.Fixed(budget.Sum, 4)];
    }

    private static IEnumerable<string[]> Efficiencies(FilmEfficiency efficiency)
    {
        yield return ["blue leakage, photons", Figure.Fixed(efficiency.BlueLeakagePhotonShare, 4)];
        yield return ["blue leakage, power", Figure.Fixed(efficiency.BlueLeakagePowerShare, 4)];
        yield return ["external photon efficiency", Figure.Fixed(efficiency.ExternalPhotonShare, 4)];
        yield return ["down-conversion efficiency", Figure.Fixed(efficiency.DownConversionShare, 4)];
        yield return ["energy efficiency", Figure.Fixed(efficiency.EnergyShare, 4)];
    }
}

/// <summary>A table of figures.</summary>
/// <param name="Name">Which table, for those who pick one.</param>
/// <param name="Header">Headings.</param>
/// <param name="Rows">Cells, as many as headings.</param>
internal sealed record FigureTable(string Name, IReadOnlyList<string> Header, IReadOnlyList<IReadOnlyList<string>> Rows);
