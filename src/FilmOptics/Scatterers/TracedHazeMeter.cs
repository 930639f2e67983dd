using System.Globalization;
using Colorimetry;
using FilmOptics.PhotonTracing;

namespace FilmOptics;

/// <summary>Reads haze by tracing photons, with their own angles: the narrow forward peak of large particles is kept.</summary>
public sealed class TracedHazeMeter : IHazeMeter
{
    /// <summary>Light deflected by more than this counts as haze.</summary>
    public const double HazeAngleDeg = 2.5;

    // Dots may take this share of a straight pass before their re-emission would show in the reading.
    private const double LargestDotShare = 1e-3;

    private static readonly double NarrowCosine = Math.Cos(HazeAngleDeg * Math.PI / 180);

    private readonly long _photons;
    private readonly ulong _seed;
    private readonly int _threads;

    /// <summary>A meter.</summary>
    /// <param name="photons">Photons to trace, at least 1.</param>
    /// <param name="seed">Any number.</param>
    /// <param name="threads">Threads, at least 1; null takes all processors. Does not change the reading.</param>
    public TracedHazeMeter(long photons = 4_000_000, ulong seed = 1, int? threads = null)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(photons, 1);
        ArgumentOutOfRangeException.ThrowIfLessThan(threads ?? 1, 1, nameof(threads));
        (_photons, _seed, _threads) = (photons, seed, threads ?? Environment.ProcessorCount);
    }

    /// <inheritdoc/>
    public HazeReading Read(Film film, int wavelengthNm, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(film);
        RequireNoDots(film, wavelengthNm);
        var traced = new TracedFilm(Bare(film, wavelengthNm));
        var lanes = film.Layers.Count <= LaneFilm.MostLayers ? new LaneFilm(traced) : null;
        var tally = new BlockRun(_photons, _threads).Run(
            () => new Tally(0) { NarrowCosine = NarrowCosine },
            (block, photons, into) =>
                PhotonTracingModel.TraceBlock(traced, lanes, Xoshiro256.ForBlock(_seed, block), photons, into),
            (sum, more) => sum.Add(more),
            null,
            cancellationToken);
        cancellationToken.ThrowIfCancellationRequested();
        return ReadingOf(tally, wavelengthNm);
    }

    /// <summary>The film's layers in air, without dots, under a beam of one wavelength along the normal.</summary>
    internal static Film Bare(Film film, int wavelengthNm)
    {
        var none = Spectrum.Flat<Fraction>(0, "bare film");
        return film with
        {
            Backlight = new(
                Spectrum.Sampled<PhotonPerNm>(nm => nm == wavelengthNm ? 1 : 0, "beam of a haze meter"), Incidence.Normal, null),
            Cavity = new(none, none, none, 0),
            Lots = [],
            Layers = [.. film.Layers.Select(layer => layer with { Dots = [] })],
        };
    }

    private static void RequireNoDots(Film film, int wavelengthNm)
    {
        if (wavelengthNm is < WavelengthGrid.FirstNm or > WavelengthGrid.LastNm)
        {
            throw Fault(film, string.Create(CultureInfo.InvariantCulture,
                $"a haze wavelength of {wavelengthNm} nm; {WavelengthGrid.FirstNm} to {WavelengthGrid.LastNm} nm is allowed."));
        }

        double depth = film.Layers.Sum(layer =>
            layer.Dots.Sum(dots => dots.AbsorptionPerMm(WavelengthGrid.IndexOf(wavelengthNm))) * layer.ThicknessMm);
        double share = 1 - Math.Exp(-depth);
        if (!(share <= LargestDotShare))
        {
            throw Fault(film, string.Create(CultureInfo.InvariantCulture,
                $"dots absorb {100 * share:0.##} % of a straight pass at the haze wavelength, {wavelengthNm} nm; at most {100 * LargestDotShare} % is allowed. Choose a longer wavelength."));
        }
    }

    private static InputException Fault(Film film, string message) => new(new InputFault(film.Title, null, null, message));

    private static HazeReading ReadingOf(Tally tally, int wavelengthNm)
    {
        double passed = tally.Above.Sum(), transmittance = passed / tally.Photons;
        double haze = passed > 0 ? (passed - tally.NarrowAbove) / passed : 0;
        return new(
            wavelengthNm,
            transmittance,
            haze,
            Math.Sqrt(transmittance * (1 - transmittance) / tally.Photons),
            passed > 0 ? Math.Sqrt(haze * (1 - haze) / passed) : 0);
    }
}
