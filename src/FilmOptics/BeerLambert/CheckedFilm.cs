using System.Globalization;
using Colorimetry;

namespace FilmOptics.BeerLambert;

/// <summary>Refuses a film whose numbers could close a budget and still mean nothing. The film file's reader is stricter; films come from code too.</summary>
internal static class CheckedFilm
{
    private const double UnitSumTolerance = 1e-9;

    /// <exception cref="InputException">All that is wrong, by key of the film file.</exception>
    public static void Require(Film film)
    {
        var faults = new List<InputFault>();
        Check(film.Layers.Count > 0, "layers", $"the film has {film.Layers.Count} layers; at least one is needed.");
        Check(film.Cavity.BypassShare is >= 0 and <= 1, "cavity.bypass_share", $"{film.Cavity.BypassShare}; 0 to 1 is allowed.");
        CheckUnitSum(film.Backlight.Photons, "backlight.spectrum");
        CheckRange(film.Cavity.BelowReflectance, 1, "cavity.below_reflectance");
        CheckRange(film.Cavity.AboveReflectance, 1, "cavity.above_reflectance");
        CheckRange(film.Cavity.AboveAbsorptance, 1, "cavity.above_absorptance");
        for (int l = 0; l < film.Layers.Count; l++)
        {
            var layer = film.Layers[l];
            Check(layer.ThicknessMm > 0 && double.IsFinite(layer.ThicknessMm), $"layers[{l}]", $"the thickness is {layer.ThicknessMm} mm; above 0 is allowed.");
            Check(layer.RefractiveIndex >= 1 && double.IsFinite(layer.RefractiveIndex), $"layers[{l}].refractive_index", $"{layer.RefractiveIndex}; at least 1 is allowed.");
            CheckRange(layer.HostAbsorption, double.MaxValue, $"layers[{l}].absorption_per_mm");
            foreach (var dots in layer.Dots)
            {
                Check(dots.LoadingMgPerMl >= 0 && double.IsFinite(dots.LoadingMgPerMl), $"layers[{l}].dots[{dots.Lot.Name}]", $"the loading is {dots.LoadingMgPerMl} mg/mL; at least 0 is allowed.");
                Check(film.Lots.Any(lot => lot.Name == dots.Lot.Name), $"layers[{l}].dots[{dots.Lot.Name}]", $"{dots.Lot.Name} is not one of the film's lots.");
            }
        }

        foreach (var lot in film.Lots)
        {
            Check(lot.FilmYieldShare is >= 0 and <= 1, $"lots[{lot.Name}].quantum_yield", $"the yield in the film is {lot.FilmYieldShare}; 0 to 1 is allowed.");
            Check(lot.FilmExtinctionFactor > 0 && double.IsFinite(lot.FilmExtinctionFactor), $"lots[{lot.Name}].film_extinction_factor", $"{lot.FilmExtinctionFactor}; above 0 is allowed.");
            CheckUnitSum(lot.Emission, $"lots[{lot.Name}].emission");
            CheckRange(lot.Absorbance, double.MaxValue, $"lots[{lot.Name}].absorbance");
        }

        if (film.BeerLambertPaths is { } paths)
        {
            Check(paths.PumpPathFactor is null or (>= 1 and < double.PositiveInfinity), "beer_lambert.pump_path", $"{paths.PumpPathFactor}; at least 1 is allowed.");
            Check(paths.EmissionPathFactor is null or (>= 1 and < double.PositiveInfinity), "beer_lambert.emission_path", $"{paths.EmissionPathFactor}; at least 1 is allowed.");
        }

        if (faults.Count > 0)
            throw new InputException(faults);

        void Check(bool isRight, string key, FormattableString message)
        {
            if (!isRight)
                faults.Add(new(key, null, null, message.ToString(CultureInfo.InvariantCulture)));
        }

        void CheckUnitSum(Spectrum<PhotonPerNm> light, string key)
        {
            double sum = light.Integral;
            Check(Math.Abs(sum - 1) <= UnitSumTolerance, key, $"the photons sum to {sum}; they have to sum to 1.");
            CheckRange(light, double.MaxValue, key);
        }

        void CheckRange<TUnit>(Spectrum<TUnit> spectrum, double greatest, string key)
            where TUnit : struct, ISpectralUnit
        {
            ReadOnlySpan<double> samples = spectrum.Samples;
            string range = greatest < double.MaxValue ? "0 to 1" : "at least 0";
            for (int i = 0; i < samples.Length; i++)
            {
                if (samples[i] >= 0 && samples[i] <= greatest)
                    continue;
                Check(false, key, $"{samples[i]} at {WavelengthGrid.NmAt(i)} nm; {range} is allowed.");
                return;
            }
        }
    }
}
