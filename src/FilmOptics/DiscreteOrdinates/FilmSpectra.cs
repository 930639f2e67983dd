using Colorimetry;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>A film's spectra with its loadings, at the wavelengths where there is light.</summary>
internal sealed class FilmSpectra
{
    /// <summary>Reads a film.</summary>
    public FilmSpectra(Film film, IReadOnlyList<MergedLayer> layers)
    {
        Layers = layers;
        UsedLots = [.. layers.SelectMany(layer => layer.Emitters).Distinct().Order()];
        Emitters = [.. layers.SelectMany((layer, position) => layer.Emitters.Select((lot, entry) =>
            new Emitter(position, lot, Array.IndexOf(UsedLots, lot), layer.Layer.Dots[entry], film.Lots[lot].FilmYieldShare)))];
        Bins = [.. Enumerable.Range(0, WavelengthGrid.Count).Where(bin =>
            film.Backlight.Photons.Samples[bin] > 0 || UsedLots.Any(lot => film.Lots[lot].Emission.Samples[bin] > 0))];
        Source = At(film.Backlight.Photons);
        Emission = [.. UsedLots.Select(lot => At(film.Lots[lot].Emission))];
        Absorption = new double[layers.Count][];
        HostShare = new double[layers.Count][];
        DotShare = [.. Emitters.Select(_ => new double[Bins.Length])];
        for (int layer = 0; layer < layers.Count; layer++)
        {
            (Absorption[layer], HostShare[layer]) = (new double[Bins.Length], new double[Bins.Length]);
            for (int i = 0; i < Bins.Length; i++)
                Split(layer, i);
        }
    }

    /// <summary>A lot in a layer.</summary>
    /// <param name="Layer">Position of the layer.</param>
    /// <param name="Lot">Position among the film's lots.</param>
    /// <param name="UsedLot">Position among the lots in use.</param>
    /// <param name="Loading">Its loading.</param>
    /// <param name="YieldShare">Quantum yield in the film.</param>
    internal sealed record Emitter(int Layer, int Lot, int UsedLot, DotLoading Loading, double YieldShare);

    public IReadOnlyList<MergedLayer> Layers { get; }

    /// <summary>Lots that stand in a layer, by position in the film.</summary>
    public int[] UsedLots { get; }

    public Emitter[] Emitters { get; }

    /// <summary>Grid bins in which the source or a used lot gives light.</summary>
    public int[] Bins { get; }

    /// <summary>Source photons in each of them.</summary>
    public double[] Source { get; }

    /// <summary>Emission of each used lot in each of them.</summary>
    public double[][] Emission { get; }

    /// <summary>Absorption of each layer, 1/mm, host and dots.</summary>
    public double[][] Absorption { get; }

    /// <summary>Share of each layer's absorption that is the host's.</summary>
    public double[][] HostShare { get; }

    /// <summary>Share of its layer's absorption that is an emitter's.</summary>
    public double[][] DotShare { get; }

    /// <summary>A spectrum at the bins.</summary>
    public double[] At<TUnit>(Spectrum<TUnit> spectrum)
        where TUnit : struct, ISpectralUnit => [.. Bins.Select(bin => spectrum.Samples[bin])];

    private void Split(int layer, int i)
    {
        int bin = Bins[i];
        double host = Layers[layer].Layer.HostAbsorption.Samples[bin], sum = host;
        for (int e = 0; e < Emitters.Length; e++)
        {
            if (Emitters[e].Layer == layer)
                sum += DotShare[e][i] = Emitters[e].Loading.AbsorptionPerMm(bin);
        }

        if (!(sum >= 0) || !double.IsFinite(sum))
        {
            throw new NumericalFailureException(
                $"Layer '{Layers[layer].Layer.Name}': absorption {sum} per mm at {WavelengthGrid.NmAt(bin)} nm; it has to be at least 0.");
        }

        // Where nothing absorbs, a rounding error of the interpolation is the host's.
        (Absorption[layer][i], HostShare[layer][i]) = (sum, sum > 0 ? host / sum : 1);
        for (int e = 0; e < Emitters.Length; e++)
        {
            if (Emitters[e].Layer == layer)
                DotShare[e][i] = sum > 0 ? DotShare[e][i] / sum : 0;
        }
    }
}
