using Colorimetry;
using FilmOptics;

namespace FilmReports.Pages;

/// <summary>Rows of the report's tables.</summary>
internal static class ReportTables
{
    public static IEnumerable<IReadOnlyList<string>> Colours(FilmAppraisal appraisal)
    {
        yield return White("film white", appraisal.FilmWhite);
        if (appraisal.Panel is not { } panel)
            yield break;
        yield return White("panel white", panel.White);
        yield return Primary("panel red", panel.Red);
        yield return Primary("panel green", panel.Green);
        yield return Primary("panel blue", panel.Blue);
    }

    public static IEnumerable<IReadOnlyList<string>> Budget(FilmCase filmCase, PhotonBudget budget)
    {
        yield return ["leaves above unconverted", Digits.Fixed(budget.Unconverted, 5)];
        yield return ["leaves above converted", Digits.Fixed(budget.Converted, 5)];
        yield return ["lost below: absorbed by the reflector", Digits.Fixed(budget.LostBelow, 5)];
        yield return ["lost above: absorbed by the sheets", Digits.Fixed(budget.LostAbove, 5)];
        yield return ["lost in host", Digits.Fixed(budget.LostInHost, 5)];
        yield return ["lost at edges", Digits.Fixed(budget.LostAtEdges, 5)];
        for (int i = 0; i < budget.LostInLots.Count; i++)
            yield return [$"not emitted by {filmCase.Film.Lots[i].Name}", Digits.Fixed(budget.LostInLots[i], 5)];
        yield return ["sum", Digits.Fixed(budget.Sum, 5)];
    }

    public static IEnumerable<IReadOnlyList<string>> Lots(FilmCase filmCase, FilmAppraisal appraisal)
    {
        var budget = appraisal.Output.Budget;
        for (int i = 0; i < filmCase.Film.Lots.Count; i++)
        {
            var band = appraisal.Bands[i + 1];
            yield return
            [
                band.Name, Digits.Fixed(budget.SourceAbsorbedBy[i], 4), Digits.Fixed(budget.Excitations[i], 4),
                Digits.Fixed(band.Photons, 4), Digits.Fixed(band.PeakNm, 1), Digits.Fixed(band.FwhmNm, 1),
            ];
        }
    }

    public static IEnumerable<IReadOnlyList<string>> Efficiencies(FilmAppraisal appraisal)
    {
        var efficiency = appraisal.Efficiency;
        yield return ["blue leakage, photons", Digits.Percent(efficiency.BlueLeakagePhotonShare), "source photons that leave above unconverted"];
        yield return ["blue leakage, power", Digits.Percent(efficiency.BlueLeakagePowerShare), "source power that leaves above unconverted"];
        yield return ["external photon efficiency", Digits.Percent(efficiency.ExternalPhotonShare), "converted photons leaving above per source photon"];
        yield return ["down-conversion efficiency", Digits.Percent(efficiency.DownConversionShare), "converted photons leaving above per source photon absorbed by dots"];
        yield return ["energy efficiency", Digits.Percent(efficiency.EnergyShare), "power leaving above per source power"];
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
            Digits.Fixed(figures.OpticalDensity, 3), Digits.Fixed(layer.RefractiveIndex, 2),
        ]);

    public static IEnumerable<IReadOnlyList<string>> Input(FilmCase filmCase)
    {
        var (film, source) = (filmCase.Film, EmissionBands.Of("source", filmCase.Film.Backlight.Photons));
        yield return ["source peak / nm", Digits.Fixed(source.PeakNm, 1)];
        yield return ["source FWHM / nm", Digits.Fixed(source.FwhmNm, 1)];
        yield return ["incidence", film.Backlight.Incidence.Kind.ToString().ToLowerInvariant()];
        yield return ["reflectance below", Range(film.Cavity.BelowReflectance)];
        yield return ["reflectance above", film.Cavity.AboveReflectanceByAngle is { } byAngle ? $"by angle: {byAngle.Source}" : Range(film.Cavity.AboveReflectance)];
        yield return ["absorptance above", Range(film.Cavity.AboveAbsorptance)];
        yield return ["source that misses the film", Digits.Percent(film.Cavity.BypassShare)];
        if (film.Sheet is { } sheet)
            yield return ["sheet / mm", sheet.HeightMm is { } height ? $"{Digits.Significant(sheet.WidthMm, 6)} × {Digits.Significant(height, 6)}" : Digits.Significant(sheet.WidthMm, 6)];
        if (filmCase.Panel is { } panel)
            yield return ["pixel area, red, green, blue", $"{Digits.Fixed(panel.RedAreaShare, 3)}, {Digits.Fixed(panel.GreenAreaShare, 3)}, {Digits.Fixed(panel.BlueAreaShare, 3)}"];
        if (filmCase.Target is { } target)
        {
            yield return ["target white", $"{Digits.Fixed(target.WhiteX, 4)}, {Digits.Fixed(target.WhiteY, 4)} at the {(target.Place == TargetPlace.Panel ? "panel" : "film")}"];
            yield return ["tolerance in xy", Digits.Significant(target.ToleranceXy, 3)];
        }
    }

    public static IEnumerable<IReadOnlyList<string>> LotInputs(Film film) => film.Lots.Select(lot => (IReadOnlyList<string>)
    [
        lot.Name, Digits.Fixed(lot.QuantumYieldShare, 3), Digits.Fixed(lot.FilmYieldShare, 3), Digits.Fixed(lot.FilmExtinctionFactor, 3), Digits.Fixed(lot.FilmEmissionShiftNm, 1),
    ]);

    private static IReadOnlyList<string> White(string name, WhitePoint white) =>
        [.. Primary(name, white.Chromaticity), Digits.Fixed(white.CctKelvin, 0), Digits.Fixed(white.Duv, 4)];

    private static IReadOnlyList<string> Primary(string name, Chromaticity c) =>
        [name, Digits.Fixed(c.X, 4), Digits.Fixed(c.Y, 4), Digits.Fixed(c.UPrime, 4), Digits.Fixed(c.VPrime, 4)];

    private static string Range(Spectrum<Fraction> share)
    {
        double low = share.Samples[0], high = low;
        foreach (double value in share.Samples)
            (low, high) = (Math.Min(low, value), Math.Max(high, value));
        return high - low < 5e-4 ? Digits.Fixed(high, 3) : $"{Digits.Fixed(low, 3)}–{Digits.Fixed(high, 3)}";
    }
}
