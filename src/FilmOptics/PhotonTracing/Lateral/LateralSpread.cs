using Colorimetry;
using FilmOptics.PhotonTracing;

namespace FilmOptics;

/// <summary>How far light strays sideways between entering a film and leaving it for good.</summary>
/// <remarks>
/// Photons enter at a point; where they leave above is counted by distance, which all directions share. Light returned by the
/// reflector below and the sheets above comes back where it left: their own spread, that of the air between, is not in it.
/// </remarks>
public sealed class LateralSpread
{
    private const int PointsInRing = 4;
    private readonly RingTally _rings;
    private readonly IReadOnlyList<string> _lots;

    private LateralSpread(RingTally rings, IReadOnlyList<string> lots, IReadOnlyList<string> warnings) =>
        (_rings, _lots, Warnings) = (rings, lots, warnings);

    /// <summary>Source photons traced.</summary>
    public long Photons => _rings.Fates.Photons;

    /// <summary>What makes the figures doubtful.</summary>
    public IReadOnlyList<string> Warnings { get; }

    /// <summary>Spread of unconverted light, then of each lot's.</summary>
    public IReadOnlyList<ColourSpread> Colours =>
        [.. Enumerable.Range(0, _lots.Count + 1).Select(emitter => SpreadOf(emitter))];

    /// <summary>Mean square distance between entering and leaving, all light above, mm².</summary>
    public double MeanSquareMm2
    {
        get
        {
            double sum = 0, count = 0;
            for (int ring = 0; ring < RingTally.Rings; ring++)
            {
                (double inner, double outer) = RingTally.Radii(ring);
                long photons = Enumerable.Range(0, _lots.Count + 1).Sum(emitter => _rings.ByEmitter[(emitter * RingTally.Rings) + ring]);
                sum += photons * ((inner * inner) + (outer * outer)) / 2;
                count += photons;
            }

            return count > 0 ? sum / count : 0;
        }
    }

    /// <summary>Traces a film lit at a point.</summary>
    /// <param name="film">The film.</param>
    /// <param name="photons">Source photons, at least 1.</param>
    /// <param name="seed">Any number; the same gives the same bits on any number of threads.</param>
    /// <param name="threads">Threads, at least 1; null takes all processors.</param>
    /// <param name="progress">Told now and then how far the run has come, from any thread.</param>
    /// <param name="cancellationToken">Ends the run early; what was traced is kept, with a warning.</param>
    /// <exception cref="OperationCanceledException">Cancelled before the first block of photons was traced.</exception>
    public static LateralSpread Trace(
        Film film,
        long photons = 1_000_000,
        ulong seed = 1,
        int? threads = null,
        IProgress<TracingProgress>? progress = null,
        CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(film);
        ArgumentOutOfRangeException.ThrowIfLessThan(photons, 1);
        var traced = new TracedFilm(film);
        var rings = new BlockRun(photons, threads ?? Environment.ProcessorCount).Run(
            () => new RingTally(film.Lots.Count),
            (block, count, into) => ScalarTracer.Trace(traced, Xoshiro256.ForBlock(seed, block), count, into.Fates, into),
            (sum, more) => sum.Add(more),
            progress is null ? null : sum => progress.Report(
                new(sum.Fates.Photons, photons, TracedOutput.LargestStandardError(sum.Fates))),
            cancellationToken);
        if (rings.Fates.Photons == 0)
            throw new OperationCanceledException("Interrupted before the first block of photons was traced.", cancellationToken);
        return new(rings, [.. film.Lots.Select(lot => lot.Name)], [.. TracedOutput.Warnings(rings.Fates, photons)]);
    }

    /// <summary>Light leaving above at a point while a rectangle of the backlight is lit, per source photon of an endless lit one.</summary>
    /// <param name="zone">The rectangle as seen from the point.</param>
    public Spectrum<PhotonPerNm> LightAt(LitZone zone)
    {
        var light = new double[WavelengthGrid.Count];
        AddLight(zone, light, squares: null);
        return Spectrum.FromSamples<PhotonPerNm>(light, "light over a lit zone");
    }

    /// <summary>Light and colour across one lit square zone, from its centre outwards along its middle line.</summary>
    /// <param name="zoneMm">Side of the zone, mm, above 0.</param>
    /// <param name="observer">Observer for luminance and colour.</param>
    /// <param name="distancesMm">Distances from the centre, mm; null takes 121 as far as 99 % of the light strays, over the next zone at most.</param>
    public ZoneProfile AcrossZone(double zoneMm, StandardObserver observer, IReadOnlyList<double>? distancesMm = null)
    {
        ArgumentNullException.ThrowIfNull(observer);
        if (!(zoneMm > 0) || !double.IsFinite(zoneMm))
            throw new ArgumentOutOfRangeException(nameof(zoneMm), zoneMm, "The zone's side is above 0 mm.");
        const double endless = 1e9;
        var weights = LuminancePerPhoton(observer);
        double full = Weighted(LightAt(new(-endless, endless, -endless, endless)).Samples, weights);
        var points = (distancesMm ?? DefaultDistances(zoneMm)).Select(distance =>
        {
            var light = new double[WavelengthGrid.Count];
            var squares = new double[WavelengthGrid.Count];
            double half = zoneMm / 2;
            AddLight(new(-half - distance, half - distance, -half, half), light, squares);
            double luminance = Weighted(light, weights), square = 0;
            for (int bin = 0; bin < weights.Length; bin++)
                square += weights[bin] * weights[bin] * squares[bin];
            var colour = Tristimulus.Of(Spectrum.FromSamples<PhotonPerNm>(light, "zone").ToPower(), observer);
            return new ZonePoint(
                distance,
                full > 0 ? luminance / full : 0,
                full > 0 ? Math.Sqrt(Math.Max(0, square - (luminance * luminance)) / Photons) / full : 0,
                colour.HasColour ? colour.Chromaticity : null);
        });
        return new(zoneMm, [.. points]);
    }

    private static double[] LuminancePerPhoton(StandardObserver observer)
    {
        var weights = new double[WavelengthGrid.Count];
        for (int bin = 0; bin < weights.Length; bin++)
            weights[bin] = observer.YBar[bin] * PhysicalConstants.PhotonEnergyJoule(WavelengthGrid.NmAt(bin));
        return weights;
    }

    private static double Weighted(ReadOnlySpan<double> light, double[] weights)
    {
        double sum = 0;
        for (int bin = 0; bin < weights.Length; bin++)
            sum += weights[bin] * light[bin];
        return sum;
    }

    private double[] DefaultDistances(double zoneMm)
    {
        const int points = 121;
        double reach = (zoneMm / 2) + Math.Clamp(RadiusHolding(0.99, _ => true).RadiusMm, zoneMm / 20, zoneMm);
        return [.. Enumerable.Range(0, points).Select(i => reach * i / (points - 1))];
    }

    /// <summary>Adds the light of each ring that comes from the zone; and, for the error, the same with squared shares.</summary>
    private void AddLight(LitZone zone, double[] light, double[]? squares)
    {
        for (int ring = 0; ring < RingTally.Rings; ring++)
        {
            double share = ShareOfRing(zone, ring);
            if (share == 0)
                continue;
            var counts = _rings.Light.AsSpan(ring * WavelengthGrid.Count, WavelengthGrid.Count);
            for (int bin = 0; bin < counts.Length; bin++)
            {
                light[bin] += share * counts[bin] / Photons;
                if (squares is not null)
                    squares[bin] += share * share * counts[bin] / Photons;
            }
        }
    }

    private static double ShareOfRing(LitZone zone, int ring)
    {
        (double inner, double outer) = RingTally.Radii(ring);
        double share = 0;
        for (int i = 0; i < PointsInRing; i++)
        {
            // Even in area.
            double part = (i + 0.5) / PointsInRing;
            share += zone.ShareOfCircle(Math.Sqrt((inner * inner) + (part * ((outer * outer) - (inner * inner)))));
        }

        return share / PointsInRing;
    }

    private ColourSpread SpreadOf(int emitter)
    {
        long count = _rings.ByEmitter.AsSpan(emitter * RingTally.Rings, RingTally.Rings).ToArray().Sum();
        (double half, double halfError) = RadiusHolding(0.5, other => other == emitter);
        (double most, double mostError) = RadiusHolding(0.9, other => other == emitter);
        return new(
            emitter == 0 ? "source" : _lots[emitter - 1],
            (double)count / Photons,
            count > 0 ? half : null,
            count > 0 ? halfError : null,
            count > 0 ? most : null,
            count > 0 ? mostError : null);
    }

    private (double RadiusMm, double ErrorMm) RadiusHolding(double share, Func<int, bool> counts)
    {
        var photons = new long[RingTally.Rings];
        for (int i = 0; i < _rings.ByEmitter.Length; i++)
            photons[i % RingTally.Rings] += counts(i / RingTally.Rings) ? _rings.ByEmitter[i] : 0;
        double all = photons.Sum(), before = 0;
        for (int ring = 0; ring < photons.Length; ring++)
        {
            if (photons[ring] > 0 && before + photons[ring] >= share * all)
            {
                (double inner, double outer) = RingTally.Radii(ring);
                double part = ((share * all) - before) / photons[ring];

                // The error of a quantile: that of the share held, over the light per mm of radius there.
                double perMm = photons[ring] / all / (outer - inner);
                return (
                    Math.Sqrt((inner * inner) + (part * ((outer * outer) - (inner * inner)))),
                    Math.Sqrt(share * (1 - share) / all) / perMm);
            }

            before += photons[ring];
        }

        return (0, 0);
    }
}

/// <summary>Spread of one colour.</summary>
/// <param name="Name">"source" or the lot's name.</param>
/// <param name="Photons">Photons leaving above per source photon.</param>
/// <param name="Radius50Mm">Radius around the point lit that holds half of them, mm; null without light.</param>
/// <param name="Radius50ErrorMm">Its standard error, mm.</param>
/// <param name="Radius90Mm">Radius that holds 90 %, mm.</param>
/// <param name="Radius90ErrorMm">Its standard error, mm.</param>
public sealed record ColourSpread(
    string Name, double Photons, double? Radius50Mm, double? Radius50ErrorMm, double? Radius90Mm, double? Radius90ErrorMm);

/// <summary>Light across one lit zone: the halo of a locally dimmed display.</summary>
/// <param name="ZoneMm">Side of the square zone, mm.</param>
/// <param name="Points">From the centre outwards.</param>
public sealed record ZoneProfile(double ZoneMm, IReadOnlyList<ZonePoint> Points);

/// <summary>A point on the middle line of a lit zone.</summary>
/// <param name="DistanceMm">Distance from the zone's centre, mm; its edge is at half of the side.</param>
/// <param name="LuminanceShare">Light per area, as luminance of the flux above, relative to a backlight lit everywhere.</param>
/// <param name="LuminanceErrorShare">Its standard error.</param>
/// <param name="Chromaticity">Its colour; null where no light was counted.</param>
public sealed record ZonePoint(double DistanceMm, double LuminanceShare, double LuminanceErrorShare, Chromaticity? Chromaticity);
