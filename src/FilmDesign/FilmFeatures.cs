using Colorimetry;
using FilmOptics;

namespace FilmDesign;

/// <summary>The features of a film that the quick model leaves out, taken away one at a time.</summary>
internal static class FilmFeatures
{
    /// <summary>The film without each feature that it has, named for what is gone.</summary>
    public static IEnumerable<(string Name, Film Film)> Without(Film film)
    {
        if (film.Layers.Any(layer => layer.Scattering.Peak > 0))
        {
            yield return ("scattering", EachLayer(film, layer => layer with
            {
                Scattering = Spectrum.Flat<PerMm>(0, "no scattering"),
                Anisotropy = Spectrum.Flat<MeanCosine>(0, "no scattering"),
            }));
        }

        if (film.Layers.Any(layer => layer.RefractiveIndex > 1))
            yield return ("faces (all indices 1)", EachLayer(film, layer => layer with { RefractiveIndex = 1 }));
        if (film.Layers.Count(layer => layer.Dots.Count > 0) > 1)
            yield return ("the order of the layers (dots spread evenly)", Mixed(film));
        if (film.Backlight.Incidence.Kind == IncidenceKind.Profile)
            yield return ("the source's angular profile (Lambertian instead)", film with { Backlight = film.Backlight with { Incidence = Incidence.Lambertian } });
        if (film.Cavity.AboveReflectanceByAngle is { LambertianMean: var mean })
        {
            yield return ("the angle of the return above (its mean instead)", film with
            {
                Cavity = film.Cavity with { AboveReflectance = Spectrum.Flat<Fraction>(mean, "mean return above"), AboveReflectanceByAngle = null },
            });
        }
    }

    private static Film EachLayer(Film film, Func<Layer, Layer> change) => film with { Layers = [.. film.Layers.Select(change)] };

    // Dots of all dot layers in each of them, at the loading that keeps their amount.
    private static Film Mixed(Film film)
    {
        double thicknessMm = film.Layers.Where(layer => layer.Dots.Count > 0).Sum(layer => layer.ThicknessMm);
        DotLoading[] everywhere =
        [
            .. film.Layers.SelectMany(layer => layer.Dots.Select(dots => (dots.Lot, Amount: dots.LoadingMgPerMl * layer.ThicknessMm)))
                .GroupBy(dots => dots.Lot.Name, StringComparer.Ordinal)
                .Select(lot => new DotLoading(lot.First().Lot, lot.Sum(dots => dots.Amount) / thicknessMm)),
        ];
        return EachLayer(film, layer => layer.Dots.Count > 0 ? layer.WithDots(everywhere) : layer);
    }
}
