using Colorimetry;

namespace FilmOptics;

/// <summary>Turns a model's result into the figures a film is judged by (definitions: README.md).</summary>
public static class FilmAppraiser
{
    private static readonly string[] DefaultGamuts = ["BT.2020", "DCI-P3"];

    /// <summary>All figures of one result.</summary>
    /// <param name="filmCase">The film and what it is judged by.</param>
    /// <param name="output">A model's result for that film.</param>
    /// <exception cref="NumericalFailureException">No light leaves above, so there is nothing to judge.</exception>
    public static FilmAppraisal Appraise(FilmCase filmCase, FilmOutput output)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(output);
        var film = filmCase.Film;
        double sourceEnergy = film.Backlight.Photons.ToPower().Integral;
        var unconverted = output.Unconverted.ToPower().ScaledBy(1 / sourceEnergy);
        Spectrum<WattPerNm>[] converted = [.. output.ConvertedByLot.Select(lot => lot.ToPower().ScaledBy(1 / sourceEnergy))];
        var power = converted.Aggregate(unconverted, (sum, lot) => sum + lot);
        var panel = filmCase.Panel is { } p ? ColoursBehind(p, power, filmCase.Observer) : null;
        var light = Tristimulus.Of(power, filmCase.Observer);
        RequireColour(light, "No light leaves above the film");
        return new FilmAppraisal
        {
            Output = output,
            Power = power,
            UnconvertedPower = unconverted,
            ConvertedPowerByLot = converted,
            FilmWhite = White(light),
            FilmLumensPerSourceWatt = light.Y,
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

    private static PanelColours ColoursBehind(Panel panel, Spectrum<WattPerNm> power, StandardObserver observer)
    {
        var red = Behind(panel.Red, panel.RedAreaShare, "red");
        var green = Behind(panel.Green, panel.GreenAreaShare, "green");
        var blue = Behind(panel.Blue, panel.BlueAreaShare, "blue");
        var white = red + green + blue;
        return new(White(white), red.Chromaticity, green.Chromaticity, blue.Chromaticity, white.Y);

        Tristimulus Behind(Spectrum<Fraction> filter, double areaShare, string name)
        {
            var colour = Tristimulus.Of((power * filter).ScaledBy(areaShare), observer);
            RequireColour(colour, $"No light passes the {name} filter");
            return colour;
        }
    }

    private static void RequireColour(Tristimulus light, string finding)
    {
        if (!light.HasColour)
            throw new NumericalFailureException($"{finding}, so it has no colour. Check the cavity, the filters and the spectrum.");
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
