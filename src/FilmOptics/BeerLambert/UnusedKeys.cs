using System.Globalization;

namespace FilmOptics.BeerLambert;

/// <summary>Says which keys of a film file the quick model did not use.</summary>
internal static class UnusedKeys
{
    /// <summary>The warnings; at least the one about faces.</summary>
    /// <param name="film">The film.</param>
    /// <param name="returnMeanShare">What the return by angle was taken as; null where there is none.</param>
    public static IReadOnlyList<string> Warnings(Film film, double? returnMeanShare)
    {
        var keys = new List<string>();
        for (int l = 0; l < film.Layers.Count; l++)
        {
            var layer = film.Layers[l];
            if (layer.Scattering.Peak <= 0)
                continue;
            keys.Add(string.Create(CultureInfo.InvariantCulture, $"layers[{l}].scattering_per_mm"));
            if (layer.Anisotropy.Samples.ContainsAnyExcept(0.0))
                keys.Add(string.Create(CultureInfo.InvariantCulture, $"layers[{l}].anisotropy"));
        }

        bool arePathsGiven = film.BeerLambertPaths is { PumpPathFactor: not null, EmissionPathFactor: not null };
        keys.Add(arePathsGiven ? "refractive_index" : "refractive_index (but for the default path lengths)");
        if (film.BeerLambertPaths?.PumpPathFactor is not null)
            keys.Add("backlight.incidence");
        else if (film.Backlight.Incidence.Kind == IncidenceKind.Profile)
            keys.Add("backlight.incidence (but for its mean path)");
        if (film.Sheet is not null)
            keys.Add("sheet.width_mm");
        if (film.Layers.Count > 1)
            keys.Add("the order of the layers");

        List<string> warnings =
        [
            "beer-lambert sees no scattering, faces, angles or edges, and mixes all layers into one. It did not use "
            + string.Join(", ", keys) + ".",
        ];
        if (returnMeanShare is { } mean)
        {
            warnings.Add(string.Create(
                CultureInfo.InvariantCulture,
                $"beer-lambert took cavity.above_reflectance, given by angle, as its mean for Lambertian light: {mean:0.####}."));
        }

        return warnings;
    }
}
