using Colorimetry;
using FilmOptics.PhotonTracing;

namespace FilmOptics;

/// <summary>Light and colour near the cut edge of a sheet, lit evenly up to it.</summary>
/// <remarks>Light that reaches the cut inside the film leaves there and does not come back.</remarks>
/// <param name="ReachMm">How far from the edge the profile goes, mm.</param>
/// <param name="LostWidthMm">Light lost at the cut, as the width of backlight that would emit as much, mm.</param>
/// <param name="LostWidthErrorMm">Its standard error, mm.</param>
/// <param name="Bands">From the edge inwards.</param>
/// <param name="Warnings">What makes the figures doubtful.</param>
public sealed record SheetEdge(
    double ReachMm, double LostWidthMm, double LostWidthErrorMm, IReadOnlyList<EdgeBand> Bands, IReadOnlyList<string> Warnings)
{
    /// <summary>Traces a film near its edge.</summary>
    /// <param name="film">The film; its sheet's size does not matter here.</param>
    /// <param name="reachMm">How far inwards, mm, above 0.</param>
    /// <param name="observer">Observer for colour.</param>
    /// <param name="photons">Source photons, at least 1; half of them start within the reach.</param>
    /// <param name="seed">Any number.</param>
    /// <param name="bands">Bands of equal width, at least 1.</param>
    /// <param name="cancellationToken">Ends the run early; what was traced is kept, with a warning.</param>
    public static SheetEdge Trace(
        Film film,
        double reachMm,
        StandardObserver observer,
        long photons = 1_000_000,
        ulong seed = 1,
        int bands = 50,
        CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(film);
        ArgumentNullException.ThrowIfNull(observer);
        ArgumentOutOfRangeException.ThrowIfLessThan(photons, 1);
        ArgumentOutOfRangeException.ThrowIfLessThan(bands, 1);
        if (!(reachMm > 0) || !double.IsFinite(reachMm))
            throw new ArgumentOutOfRangeException(nameof(reachMm), reachMm, "The reach is above 0 mm.");

        // The edge stands in the geometry here, so that no limit on the length of a flight has to stand for it.
        var traced = new TracedFilm(film with { Sheet = null });
        var tally = new BlockRun(photons, Environment.ProcessorCount).Run(
            () => new EdgeTally(film.Lots.Count, reachMm, bands),
            (block, count, into) => ScalarTracer.Trace(traced, Xoshiro256.ForBlock(seed, block), count, into.Fates, into),
            (sum, more) => sum.Add(more),
            null,
            cancellationToken);
        if (tally.Fates.Photons == 0)
            throw new OperationCanceledException("Interrupted before the first block of photons was traced.", cancellationToken);
        double lost = (double)tally.Fates.LostAtEdges / tally.Fates.Photons;
        return new(
            reachMm,
            lost * 2 * reachMm,
            Math.Sqrt(lost * (1 - lost) / tally.Fates.Photons) * 2 * reachMm,
            [.. Enumerable.Range(0, bands).Select(band => BandOf(tally, band, bands, reachMm, observer))],
            [.. TracedOutput.Warnings(tally.Fates, photons)]);
    }

    private static EdgeBand BandOf(EdgeTally tally, int band, int bands, double reachMm, StandardObserver observer)
    {
        // Source photons per band: the bands are half of the lit width.
        double started = tally.Fates.Photons / (2.0 * bands);
        var light = new double[WavelengthGrid.Count];
        for (int bin = 0; bin < light.Length; bin++)
            light[bin] = tally.Light[(band * WavelengthGrid.Count) + bin] / started;
        var spectrum = Spectrum.FromSamples<PhotonPerNm>(light, "light near an edge");
        var colour = Tristimulus.Of(spectrum.ToPower(), observer);
        double photons = spectrum.Integral;
        return new(
            (band + 0.5) * reachMm / bands,
            photons,
            Math.Sqrt(photons / started),
            colour.HasColour ? colour.Chromaticity : null);
    }
}

/// <summary>Light leaving above in a band along the edge.</summary>
/// <param name="DistanceMm">Middle of the band, mm from the edge.</param>
/// <param name="Photons">Photons leaving above per source photon under the band.</param>
/// <param name="PhotonsError">Its standard error.</param>
/// <param name="Chromaticity">Its colour; null where no light was counted.</param>
public sealed record EdgeBand(double DistanceMm, double Photons, double PhotonsError, Chromaticity? Chromaticity);
