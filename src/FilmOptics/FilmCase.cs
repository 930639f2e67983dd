using Colorimetry;

namespace FilmOptics;

/// <summary>A film file, read and checked: the film and what it is judged by.</summary>
public sealed record FilmCase
{
    /// <summary>The film.</summary>
    public required Film Film { get; init; }

    /// <summary>The panel, or null where colours are those of the film's light.</summary>
    public Panel? Panel { get; init; }

    /// <summary>The target, or null.</summary>
    public WhiteTarget? Target { get; init; }

    /// <summary>Observer that colours are computed with.</summary>
    public required StandardObserver Observer { get; init; }

    /// <summary>What the reader found worth saying: noise set to zero, uncalibrated factors, how spectra were interpolated.</summary>
    public IReadOnlyList<string> Warnings { get; init; } = [];
}
