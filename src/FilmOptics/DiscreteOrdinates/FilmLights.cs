using Colorimetry;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>A film's light and what absorbs it, at the wavelengths where there is light; loadings do not matter.</summary>
internal sealed class FilmLights
{
    // What lies this far below a line's peak is left out, and the rest scaled to the same sum.
    private const double DarkShare = 1e-12;

    private readonly Film _film;
    private readonly (Spectrum<PerMm> Host, int Emitters)[] _layers;

    /// <summary>Reads a film.</summary>
    public FilmLights(Film film, IReadOnlyList<MergedLayer> layers)
    {
        _film = film;
        _layers = [.. layers.Select(layer => (layer.Layer.HostAbsorption, layer.Emitters.Count))];
        UsedLots = [.. layers.SelectMany(layer => layer.Emitters).Distinct().Order()];
        Emitters = [.. layers.SelectMany((layer, position) => layer.Emitters.Select((lot, entry) =>
            new Emitter(position, entry, lot, Array.IndexOf(UsedLots, lot), film.Lots[lot].FilmYieldShare)))];
        Spectrum<PhotonPerNm>[] lines = [film.Backlight.Photons, .. UsedLots.Select(lot => film.Lots[lot].Emission)];
        double[] dark = [.. lines.Select(line => DarkShare * line.Peak)];
        Bins = [.. Enumerable.Range(0, WavelengthGrid.Count).Where(bin => IsLit(lines, dark, bin))];
        Lines = [.. lines.Select((line, i) => Lit(At(line), dark[i], line.Integral))];
        Host = [.. layers.Select(layer => At(layer.Layer.HostAbsorption))];
        UnitAbsorption = [.. Emitters.Select(emitter => At(film.Lots[emitter.Lot].Absorbance))];
    }

    /// <summary>A lot in a layer.</summary>
    /// <param name="Layer">Position of the layer.</param>
    /// <param name="Entry">Position among the layer's lots.</param>
    /// <param name="Lot">Position among the film's lots.</param>
    /// <param name="UsedLot">Position among the lots in use.</param>
    /// <param name="YieldShare">Quantum yield in the film.</param>
    internal sealed record Emitter(int Layer, int Entry, int Lot, int UsedLot, double YieldShare);

    /// <summary>Light of the source or of a lot.</summary>
    /// <param name="Photons">Photons in each bin.</param>
    /// <param name="First">First bin with any.</param>
    /// <param name="End">Behind the last.</param>
    internal sealed record Line(double[] Photons, int First, int End);

    /// <summary>Lots that stand in a layer, by position in the film.</summary>
    public int[] UsedLots { get; }

    public Emitter[] Emitters { get; }

    /// <summary>Grid bins in which the source or a used lot gives light.</summary>
    public int[] Bins { get; }

    /// <summary>The source, then each used lot.</summary>
    public Line[] Lines { get; }

    /// <summary>Absorption of each layer's host, 1/mm.</summary>
    public double[][] Host { get; }

    /// <summary>Absorbance of each emitter's lot, per cm at 1 mg/mL.</summary>
    public double[][] UnitAbsorption { get; }

    /// <summary>A spectrum at the bins.</summary>
    public double[] At<TUnit>(Spectrum<TUnit> spectrum)
        where TUnit : struct, ISpectralUnit => Array.ConvertAll(Bins, bin => spectrum.Samples[bin]);

    /// <summary>By bin, whether any line has more than a share of its peak there.</summary>
    public bool[] BrighterThan(double peakShare)
    {
        var bright = new bool[Bins.Length];
        foreach (var line in Lines)
        {
            double least = peakShare * line.Photons.Max();
            for (int i = line.First; i < line.End; i++)
                bright[i] |= line.Photons[i] > least;
        }

        return bright;
    }

    /// <summary>Whether another film differs in nothing that stands here: the same source, lots and hosts.</summary>
    public bool Serve(Film film, IReadOnlyList<MergedLayer> layers)
    {
        if (!ReferenceEquals(film.Backlight, _film.Backlight) || !ReferenceEquals(film.Lots, _film.Lots) || layers.Count != _layers.Length)
            return false;
        int emitter = 0;
        for (int i = 0; i < _layers.Length; i++)
        {
            if (!ReferenceEquals(layers[i].Layer.HostAbsorption, _layers[i].Host) || layers[i].Emitters.Count != _layers[i].Emitters)
                return false;
            foreach (int lot in layers[i].Emitters)
            {
                if (Emitters[emitter++].Lot != lot)
                    return false;
            }
        }

        return true;
    }

    private static bool IsLit(Spectrum<PhotonPerNm>[] lines, double[] dark, int bin)
    {
        for (int i = 0; i < lines.Length; i++)
        {
            if (lines[i].Samples[bin] > dark[i])
                return true;
        }

        return false;
    }

    private static Line Lit(double[] photons, double dark, double sum)
    {
        int first = 0, end = photons.Length;
        while (first < end && !(photons[first] > dark))
            first++;
        while (end > first && !(photons[end - 1] > dark))
            end--;
        double scale = sum / photons.AsSpan(first, end - first).ToArray().Sum();
        for (int bin = first; bin < end; bin++)
            photons[bin] *= scale;
        return new(photons, first, end);
    }
}
