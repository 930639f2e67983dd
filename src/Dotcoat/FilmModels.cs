using FilmOptics;

namespace Dotcoat;

/// <summary>The models by the names users write.</summary>
internal static class FilmModels
{
    private static readonly Dictionary<string, Func<IFilmModel>> Makers = new(StringComparer.Ordinal)
    {
        ["beer-lambert"] = () => new BeerLambertModel(),
        ["monte-carlo"] = () => new PhotonTracingModel(),
    };

    /// <summary>What runs without --model.</summary>
    public const string Default = "beer-lambert";

    /// <summary>Names that --model takes.</summary>
    public static IEnumerable<string> Names => Makers.Keys;

    /// <summary>A fresh model.</summary>
    public static IFilmModel Named(string name) => Makers[name]();
}
