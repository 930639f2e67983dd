using Colorimetry;

namespace FilmOptics;

/// <summary>Turns a model's result into the figures a film is judged by (definitions: README.md).</summary>
public static class FilmAppraiser
{
    private static readonly string[] DefaultGamuts = ["BT.2020", "DCI-P3"];

    /// <summary>All figures of one result.</summary>
    /// <param name="filmCase">The film and what it is judged by.</param>
    /// <param name="output">A model's result for that film.</param>
    /// <remarks>Under a normal view colours are those of the radiance along the normal; lumens stay those of all light leaving above.</remarks>
    /// <exception cref="InputException">No light leaves above, so there is nothing to judge; or the view is normal and the model has no angles.</exception>
    public static FilmAppraisal Appraise(FilmCase filmCase, FilmOutput output)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(output);
        var film = filmCase.Film;
        double sourceEnergy = film.Backlight.Photons.ToPower().Integral;
        var unconverted = output.Unconverted.ToPower().ScaledBy(1 / sourceEnergy);
        Spectrum<WattPerNm>[] converted = [.. output.ConvertedByLot.Select(lot => lot.ToPower().ScaledBy(1 / sourceEnergy))];
        var power = converted.Aggregate(unconverted, (sum, lot) => sum + lot);
        bool isNormalView = filmCase.Target?.View == TargetView.Normal;
        var judged = isNormalView ? WhiteMeter.RadianceAlongNormal(output).ToPower() : power;
        double lumens = Tristimulus.Of(power, filmCase.Observer).Y;
        var light = Tristimulus.Of(judged, filmCase.Observer);
        RequireColour(light, "cavity", "no light leaves above the film, so it has no colour; lower above_reflectance + above_absorptance, or make the film absorb less.");
        var panel = filmCase.Panel is { } p ? ColoursBehind(p, judged, power, filmCase.Observer) : null;
        return new FilmAppraisal
        {
            Output = output,
            Power = power,
            UnconvertedPower = unconverted,
            ConvertedPowerByLot = converted,
            FilmWhite = White(light),
            FilmLumensPerSourceWatt = lumens,
            Panel = panel,
            Gamut = panel is null ? null : Compare(panel, filmCase.Target?.Gamuts is { Count: > 0 } names ? names : DefaultGamuts),
            Bands =
            [
                EmissionBands.Of("source", output.Unconverted),
                .. film.Lots.Select((lot, i) => EmissionBands.Of(lot.Name, output.ConvertedByLot[i])),
            ],
            Layers = [.. film.Layers.Select(layer => Figures(film, layer))],
            Efficiency = Efficiency(output, unconverted, power),
            Warnings = [.. filmCase.Warnings, .. output.Warnings],
        };
    }

    private static PanelColours ColoursBehind(
        Panel panel, Spectrum<WattPerNm> judged, Spectrum<WattPerNm> power, StandardObserver observer)
    {
        var red = Behind(panel.Red, panel.RedAreaShare, "red");
        var green = Behind(panel.Green, panel.GreenAreaShare, "green");
        var blue = Behind(panel.Blue, panel.BlueAreaShare, "blue");
        double lumens = ReferenceEquals(judged, power)
            ? (red + green + blue).Y
            : Through(power, panel.Red, panel.RedAreaShare).Y
                + Through(power, panel.Green, panel.GreenAreaShare).Y
                + Through(power, panel.Blue, panel.BlueAreaShare).Y;
        return new(White(red + green + blue), red.Chromaticity, green.Chromaticity, blue.Chromaticity, lumens);

        Tristimulus Behind(Spectrum<Fraction> filter, double areaShare, string name)
        {
            var colour = Through(judged, filter, areaShare);
            RequireColour(colour, "panel", $"no light passes the {name} filter, so the panel has no {name}; check filters and area_shares, and that the film sends light there.");
            return colour;
        }

        Tristimulus Through(Spectrum<WattPerNm> light, Spectrum<Fraction> filter, double areaShare) =>
            Tristimulus.Of((light * filter).ScaledBy(areaShare), observer);
    }

    private static void RequireColour(Tristimulus light, string key, string finding)
    {
        if (!light.HasColour)
            throw new InputException(new InputFault(key, null, null, finding));
    }

    private static WhitePoint White(Tristimulus light)
    {
        var temperature = CorrelatedColourTemperature.Of(light.Chromaticity);
        return new(light.Chromaticity, temperature?.Kelvin, temperature?.Duv);
    }

    private static IReadOnlyList<GamutComparison> Compare(PanelColours panel, IReadOnlyList<string> names)
    {
        return [.. names.Select(ColourGamut.Named).Select(standard => new GamutComparison(
            standard.Name,
            Coverage(standard, ChromaticityDiagram.Xy1931),
            Coverage(standard, ChromaticityDiagram.UvPrime1976),
            AreaRatio(standard, ChromaticityDiagram.Xy1931),
            AreaRatio(standard, ChromaticityDiagram.UvPrime1976)))];

        double Coverage(ColourGamut standard, ChromaticityDiagram diagram) =>
            GamutCoverage.Coverage(panel.Red, panel.Green, panel.Blue, standard, diagram);

        double AreaRatio(ColourGamut standard, ChromaticityDiagram diagram) =>
            GamutCoverage.AreaRatio(panel.Red, panel.Green, panel.Blue, standard, diagram);
    }

    private static LayerFigures Figures(Film film, Layer layer)
    {
        var source = film.Backlight.Photons.Samples;
        int peak = source.IndexOf(film.Backlight.Photons.Peak);
        double perMm = layer.HostAbsorption.Samples[peak] + layer.Dots.Sum(dots => dots.AbsorptionPerMm(peak));
        return new(layer.Name, layer.ThicknessMm * 1000, Loadings.CoatWeightGPerM2(layer), perMm * layer.ThicknessMm / Math.Log(10));
    }

    private static FilmEfficiency Efficiency(FilmOutput output, Spectrum<WattPerNm> unconverted, Spectrum<WattPerNm> power)
    {
        double absorbed = output.Budget.SourceAbsorbedBy.Sum();
        return new(
            output.Budget.Unconverted,
            unconverted.Integral,
            output.Budget.Converted,
            absorbed > 0 ? output.Budget.Converted / absorbed : null,
            power.Integral);
    }
}
