using FilmOptics;

namespace FilmDesign;

/// <summary>The outcome of a formulation: the film on its white, or the nearest film and what stands in the way.</summary>
public sealed record Formulation
{
    /// <summary>The film file with the solved loadings.</summary>
    public required FilmCase FilmCase { get; init; }

    /// <summary>That film's figures.</summary>
    public required FilmAppraisal Appraisal { get; init; }

    /// <summary>The solved loadings, one row per free lot and layer.</summary>
    public required IReadOnlyList<SolvedLoading> Loadings { get; init; }

    /// <summary>Whether white is within the target's tolerance.</summary>
    public required bool Reached { get; init; }

    /// <summary>Distance of white from the target in xy.</summary>
    public required double WhiteErrorXy { get; init; }

    /// <summary>Why the target cannot be reached, and what to do; null where it is.</summary>
    public string? Limit { get; init; }

    /// <summary>Film solves it took.</summary>
    public required int Solves { get; init; }
}

/// <summary>A solved loading.</summary>
/// <param name="LotName">The lot.</param>
/// <param name="LayerName">The layer.</param>
/// <param name="LoadingMgPerMl">Dots with ligand in the cured layer, mg/mL.</param>
public sealed record SolvedLoading(string LotName, string LayerName, double LoadingMgPerMl);
