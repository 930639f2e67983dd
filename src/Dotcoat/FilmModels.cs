using FilmOptics;

namespace Dotcoat;

/// <summary>What a model is asked for beyond its name.</summary>
/// <param name="AccuracyShare">Largest error wanted of the exact model; null takes its default.</param>
/// <param name="Angles">Whether light against the exit angle is wanted.</param>
/// <param name="Photons">Photons to trace; null takes the tracer's default.</param>
/// <param name="Seed">Seed of the tracer; null takes its default.</param>
internal sealed record ModelSettings(double? AccuracyShare, bool Angles, long? Photons, ulong? Seed);

/// <summary>The models by the names users write.</summary>
internal static class FilmModels
{
    public const string DiscreteOrdinates = "discrete-ordinates", BeerLambert = "beer-lambert", MonteCarlo = "monte-carlo";

    /// <summary>What runs without --model.</summary>
    public const string Default = DiscreteOrdinates;

    private const double DefaultAccuracyShare = 3e-4;
    private const long DefaultPhotons = 4_000_000;

    /// <summary>Names that --model takes.</summary>
    public static IEnumerable<string> Names => [DiscreteOrdinates, BeerLambert, MonteCarlo];

    /// <summary>A fresh model.</summary>
    /// <param name="name">One of <see cref="Names"/>.</param>
    /// <param name="settings">What is asked of it.</param>
    /// <param name="progress">Told how far a traced run has come.</param>
    public static IFilmModel Named(string name, ModelSettings settings, IProgress<TracingProgress>? progress = null) => name switch
    {
        DiscreteOrdinates => new DiscreteOrdinatesModel(settings.AccuracyShare ?? DefaultAccuracyShare, settings.Angles),
        BeerLambert => new BeerLambertModel(),
        MonteCarlo => new PhotonTracingModel(settings.Photons ?? DefaultPhotons, settings.Seed ?? 1, progress: progress),
        _ => throw new ArgumentException(name, nameof(name)),
    };
}
