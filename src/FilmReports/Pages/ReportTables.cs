using Colorimetry;
using FilmOptics;
using FilmReports.Safety;

namespace FilmReports.Pages;

/// <summary>Rows of the tables of results.</summary>
internal static class ReportTables
{
    public static IEnumerable<IReadOnlyList<string>> Colours(FilmAppraisal appraisal)
    {
        int decimals = Math.Min(4, Digits.ShareDecimals(appraisal.Output));
        if (appraisal.Panel is { } panel)
        {
            yield return White("panel white", panel.White, decimals);
            yield return [.. Coordinates("panel red", panel.Red, decimals), "", ""];
            yield return [.. Coordinates("panel green", panel.Green, decimals), "", ""];
            yield return [.. Coordinates("panel blue", panel.Blue, decimals), "", ""];
        }

        yield return White("film white", appraisal.FilmWhite, decimals);
    }

    public static IEnumerable<IReadOnlyList<string>> Gamut(IEnumerable<GamutComparison> gamut) => gamut.Select(g => (IReadOnlyList<string>)
        [g.Name, Digits.Percent(g.CoverageXy), Digits.Percent(g.CoverageUv), Digits.Percent(g.AreaRatioXy), Digits.Percent(g.AreaRatioUv)]);

    /// <summary>Every line of the budget and their sum, with standard errors where the model has them.</summary>
    public static IEnumerable<IReadOnlyList<string>> Budget(FilmCase filmCase, FilmOutput output)
    {
        int decimals = Digits.ShareDecimals(output);
        var errors = output.Tracing is { } tracing ? Lines(filmCase.Film, tracing.StandardError).Select(line => (double?)line.Share).Append(null) : null;
        var lines = Lines(filmCase.Film, output.Budget).Append(("sum", output.Budget.Sum));
        return errors is null
            ? lines.Select(line => (IReadOnlyList<string>)[line.Item1, Digits.Fixed(line.Item2, decimals)])
            : lines.Zip(errors, (line, error) => (IReadOnlyList<string>)[line.Item1, Digits.Fixed(line.Item2, decimals), error is { } e ? Digits.Significant(e, 2) : ""]);
    }

    public static IEnumerable<IReadOnlyList<string>> Bands(FilmCase filmCase, FilmAppraisal appraisal)
    {
        var budget = appraisal.Output.Budget;
        int decimals = Digits.ShareDecimals(appraisal.Output);
        for (int i = 0; i < appraisal.Bands.Count; i++)
        {
            var band = appraisal.Bands[i];
            yield return
            [
                band.Name,
                i == 0 ? "" : Digits.Fixed(budget.SourceAbsorbedBy[i - 1], decimals),
                i == 0 ? "" : Digits.Fixed(budget.Excitations[i - 1], decimals),
                Digits.Fixed(band.Photons, decimals), Digits.Fixed(band.PeakNm, 1), Digits.Fixed(band.FwhmNm, 1),
            ];
        }
    }

    public static IEnumerable<IReadOnlyList<string>> Efficiencies(FilmAppraisal appraisal)
    {
        var efficiency = appraisal.Efficiency;
        int decimals = Math.Clamp(Digits.ShareDecimals(appraisal.Output) - 2, 0, 2);
        yield return ["blue leakage, photons", Digits.Percent(efficiency.BlueLeakagePhotonShare, decimals), "source photons that leave above unconverted"];
        yield return ["blue leakage, power", Digits.Percent(efficiency.BlueLeakagePowerShare, decimals), "source power that leaves above unconverted"];
        yield return ["source absorption by dots", Digits.Percent(appraisal.Output.Budget.SourceAbsorbedBy.Sum(), decimals), "source photons absorbed by any dot"];
        yield return ["external photon efficiency", Digits.Percent(efficiency.ExternalPhotonShare, decimals), "converted photons leaving above per source photon"];
        yield return ["down-conversion efficiency", Digits.Percent(efficiency.DownConversionShare, decimals), "converted photons leaving above per source photon absorbed by dots"];
        yield return ["energy efficiency", Digits.Percent(efficiency.EnergyShare, decimals), "power leaving above per source power"];
    }

    public static IEnumerable<IReadOnlyList<string>> Recipe(Film film)
    {
        foreach (var layer in film.Layers)
        {
            var wtPercents = Loadings.WtPercents(layer);
            for (int i = 0; i < layer.Dots.Count; i++)
            {
                var dots = layer.Dots[i];
                double? volPercent = dots.Lot.DensityGPerMl is { } density ? Loadings.VolumeShareFromMgPerMl(dots.LoadingMgPerMl, density) * 100 : null;
                yield return
                [
                    $"{dots.Lot.Name} in {layer.Name}", Digits.Fixed(dots.LoadingMgPerMl, 3), Digits.Fixed(wtPercents[i], 3),
                    Digits.Fixed(volPercent, 3), Digits.Fixed(dots.LoadingMgPerMl * layer.ThicknessMm, 3),
                ];
            }
        }
    }

    public static IEnumerable<IReadOnlyList<string>> Layers(Film film, FilmAppraisal appraisal) =>
        film.Layers.Zip(appraisal.Layers, (layer, figures) => (IReadOnlyList<string>)
        [
            figures.Name, Digits.Fixed(figures.ThicknessUm, 1), Digits.Fixed(figures.CoatWeightGPerM2, 1),
            Digits.Fixed(figures.OpticalDensity, 3), Digits.Fixed(layer.RefractiveIndex, 3),
        ]);

    public static IEnumerable<IReadOnlyList<string>> BlueLights(FilmCase filmCase, FilmAppraisal appraisal) =>
        BlueLight.Of(filmCase, appraisal).Select(light => (IReadOnlyList<string>)
            [light.Light, Digits.Percent(light.ShortBlueShare), Digits.Fixed(light.HazardWattPerLumen * 1000, 2)]);

    public static IEnumerable<IReadOnlyList<string>> Metals(Film film) => RestrictedSubstances.Of(film).Select(layer => (IReadOnlyList<string>)
    [
        layer.LayerName,
        Digits.Fixed(layer.CadmiumMgPerKg, 0), Digits.Fixed(layer.CadmiumUgPerMm2, 4),
        Digits.Fixed(layer.LeadMgPerKg, 0), Digits.Fixed(layer.LeadUgPerMm2, 4),
    ]);

    private static IEnumerable<(string Name, double Share)> Lines(Film film, PhotonBudget budget) =>
    [
        ("leaves above unconverted", budget.Unconverted),
        ("leaves above converted", budget.Converted),
        ("lost below: absorbed by the reflector", budget.LostBelow),
        ("lost above: absorbed by the sheets", budget.LostAbove),
        ("lost in the host", budget.LostInHost),
        ("lost at the edges", budget.LostAtEdges),
        .. film.Lots.Select((lot, i) => ($"lost in {lot.Name}, without radiation", budget.LostInLots[i])),
    ];

    private static IReadOnlyList<string> White(string name, WhitePoint white, int decimals) =>
        [.. Coordinates(name, white.Chromaticity, decimals), Digits.Fixed(white.CctKelvin, 0), Digits.Signed(white.Duv, 4)];

    private static IEnumerable<string> Coordinates(string name, Chromaticity c, int decimals) =>
        [name, Digits.Fixed(c.X, decimals), Digits.Fixed(c.Y, decimals), Digits.Fixed(c.UPrime, decimals), Digits.Fixed(c.VPrime, decimals)];
}
