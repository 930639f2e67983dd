using System.Globalization;
using FilmOptics.PhotonTracing;

namespace FilmOptics;

/// <summary>The independent check: follows photons one by one through layers, faces, dots and returns.</summary>
/// <remarks>
/// <para>Shares with the other models only the film's description. Takes layers of unequal index, air gaps, angular
/// source profiles, a return by angle of arrival and bypass.</para>
/// <para>Photons come in blocks, each with its own stream of a published generator, and results are sums of whole
/// numbers: the same seed and number of photons give the same bits on any number of threads.</para>
/// </remarks>
public sealed class PhotonTracingModel : IFilmModel
{
    /// <summary>Photons that share a stream of random numbers, and after which an interruption is heeded.</summary>
    internal const int BlockPhotons = 16_384;

    private readonly long _photons;
    private readonly ulong _seed;
    private readonly int _threads;
    private readonly IProgress<TracingProgress>? _progress;

    /// <summary>A tracer.</summary>
    /// <param name="photons">Source photons to trace, at least 1.</param>
    /// <param name="seed">Any number; another seed gives an independent result.</param>
    /// <param name="threads">Threads, at least 1; null takes all processors. Does not change the result.</param>
    /// <param name="progress">Told now and then how far the run has come, from any thread.</param>
    public PhotonTracingModel(
        long photons = 4_000_000, ulong seed = 1, int? threads = null, IProgress<TracingProgress>? progress = null)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(photons, 1);
        ArgumentOutOfRangeException.ThrowIfLessThan(threads ?? 1, 1, nameof(threads));
        (_photons, _seed, _threads, _progress) = (photons, seed, threads ?? Environment.ProcessorCount, progress);
    }

    /// <inheritdoc/>
    public string Name => "monte-carlo";

    /// <summary>Traces the film. An interruption keeps what was traced and says so in a warning.</summary>
    /// <param name="film">The film.</param>
    /// <param name="cancellationToken">Ends the run after the blocks now being traced.</param>
    /// <exception cref="OperationCanceledException">Cancelled before the first block of photons was traced.</exception>
    /// <exception cref="NumericalFailureException">A coefficient is not a number, or a photon was lost count of.</exception>
    public FilmOutput Solve(Film film, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(film);
        var traced = new TracedFilm(film);
        var lanes = UsesLanes(film) ? new LaneFilm(traced) : null;
        var tally = new BlockRun(_photons, _threads).Run(
            () => new Tally(film.Lots.Count),
            (block, photons, into) => TraceBlock(traced, lanes, Xoshiro256.ForBlock(_seed, block), photons, into),
            (sum, more) => sum.Add(more),
            sum => Report(sum),
            cancellationToken);
        if (tally.Photons == 0)
            throw new OperationCanceledException("Interrupted before the first block of photons was traced.", cancellationToken);
        if (tally.Fates != tally.Photons)
        {
            throw new NumericalFailureException(string.Create(
                CultureInfo.InvariantCulture, $"{tally.Photons} photons were traced, but {tally.Fates} fates counted."));
        }

        return new TracedOutput(film, tally, _photons, _seed).Build(Name);
    }

    /// <summary>Whether photons are traced in vector lanes: nearly always.</summary>
    internal static bool UsesLanes(Film film) => film.Layers.Count <= LaneFilm.MostLayers;

    internal static void TraceBlock(TracedFilm film, LaneFilm? lanes, Xoshiro256 random, int photons, Tally into)
    {
        if (lanes is null)
            ScalarTracer.Trace(film, random, photons, into);
        else
            LaneTracer.Trace(lanes, random, photons, into);
    }

    private void Report(Tally sum) =>
        _progress?.Report(new(sum.Photons, _photons, TracedOutput.LargestStandardError(sum)));
}
