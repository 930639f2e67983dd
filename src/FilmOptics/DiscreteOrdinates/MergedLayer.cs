using Colorimetry;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>A layer as the solver sees it: equal neighbours are one.</summary>
/// <param name="Layer">One of the layers it stands for.</param>
/// <param name="ThicknessMm">Thickness of them all, mm.</param>
/// <param name="Emitters">Lots in it, by position in the film.</param>
internal sealed record MergedLayer(Layer Layer, double ThicknessMm, IReadOnlyList<int> Emitters)
{
    public double Index => Layer.RefractiveIndex;

    public bool Scatters { get; } = Layer.Scattering.Peak > 0;

    /// <summary>The layers of a film, bottom to top.</summary>
    public static IReadOnlyList<MergedLayer> Of(Film film)
    {
        List<MergedLayer> merged = [];
        foreach (var layer in film.Layers)
        {
            if (merged.Count > 0 && AreEqual(merged[^1].Layer, layer))
                merged[^1] = merged[^1] with { ThicknessMm = merged[^1].ThicknessMm + layer.ThicknessMm };
            else
                merged.Add(new(layer, layer.ThicknessMm, [.. layer.Dots.Select(dots => film.IndexOf(dots.Lot))]));
        }

        return merged;
    }

    private static bool AreEqual(Layer one, Layer other) =>
        one.RefractiveIndex == other.RefractiveIndex
        && AreEqual(one.HostAbsorption, other.HostAbsorption)
        && AreEqual(one.Scattering, other.Scattering)
        && AreEqual(one.Anisotropy, other.Anisotropy)
        && one.Dots.Count == other.Dots.Count
        && one.Dots.Zip(other.Dots).All(pair =>
            pair.First.LoadingMgPerMl == pair.Second.LoadingMgPerMl
            && string.Equals(pair.First.Lot.Name, pair.Second.Lot.Name, StringComparison.Ordinal));

    private static bool AreEqual<TUnit>(Spectrum<TUnit> one, Spectrum<TUnit> other)
        where TUnit : struct, ISpectralUnit => ReferenceEquals(one, other) || one.Samples.SequenceEqual(other.Samples);
}
