using Colorimetry;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>All that decides how light travels in a film except its loadings and the light itself.</summary>
internal sealed class FilmShape
{
    private readonly Cavity _cavity;
    private readonly Incidence _incidence;
    private readonly double? _widthMm;
    private readonly IReadOnlyList<MergedLayer> _layers;

    /// <summary>Of a film.</summary>
    public FilmShape(Film film, IReadOnlyList<MergedLayer> layers)
    {
        (_cavity, _incidence, _widthMm, _layers) = (film.Cavity, film.Backlight.Incidence, film.Sheet?.WidthMm, layers);
        bool flat = IsFlat(film.Cavity.BelowReflectance) && IsFlat(film.Cavity.AboveReflectance) && IsFlat(film.Cavity.AboveAbsorptance)
            && layers.All(layer => IsFlat(layer.Layer.Scattering) && IsFlat(layer.Layer.Anisotropy));
        double longestMm = OpticalStates.SheetMm(film, layers);
        MayGuide = layers.Any(layer => layer.Emitters.Count > 0 && layer.Layer.Scattering.Samples.ContainsAnyInRange(0, GuidedLight<WideLanes>.OutOfReach / longestMm));
        int[] varying = [.. Enumerable.Range(0, layers.Count).Where(i => layers[i].Emitters.Count > 0 || !IsFlat(layers[i].Layer.HostAbsorption))];
        VaryingLayer = !flat || MayGuide ? null : varying is [var only] ? only : null;
    }

    /// <summary>The one layer whose absorption is all that depends on the wavelength; null where more does.</summary>
    public int? VaryingLayer { get; }

    /// <summary>Whether light may be emitted that only the edges end: that sets in at once where absorption vanishes, and no interpolation follows it.</summary>
    public bool MayGuide { get; }

    /// <summary>Whether another film has this shape: the very same spectra, not equal ones.</summary>
    public bool Is(Film film, IReadOnlyList<MergedLayer> layers)
    {
        if (!ReferenceEquals(film.Cavity, _cavity) || !ReferenceEquals(film.Backlight.Incidence, _incidence)
            || film.Sheet?.WidthMm != _widthMm || layers.Count != _layers.Count)
        {
            return false;
        }

        for (int i = 0; i < layers.Count; i++)
        {
            var (one, other) = (layers[i], _layers[i]);
            if (one.ThicknessMm != other.ThicknessMm || one.Index != other.Index
                || (one.Emitters.Count > 0) != (other.Emitters.Count > 0)
                || !ReferenceEquals(one.Layer.HostAbsorption, other.Layer.HostAbsorption)
                || !ReferenceEquals(one.Layer.Scattering, other.Layer.Scattering)
                || !ReferenceEquals(one.Layer.Anisotropy, other.Layer.Anisotropy))
            {
                return false;
            }
        }

        return true;
    }

    private static bool IsFlat<TUnit>(Spectrum<TUnit> spectrum)
        where TUnit : struct, ISpectralUnit => spectrum.Samples.IndexOfAnyExcept(spectrum.Samples[0]) < 0;
}
