using Dotcoat.Terminal;
using FilmOptics;

namespace Dotcoat.Desk;

/// <summary>The figures that a designer watches while a slider moves; pinned films are compared by them.</summary>
internal static class KeyFigures
{
    public static IEnumerable<KeyFigure> Of(FilmCase filmCase, FilmAppraisal appraisal)
    {
        var (place, white) = Whites.Judged(filmCase, appraisal);
        yield return new($"{place} white x", Figure.Fixed(white.Chromaticity.X, 4));
        yield return new($"{place} white y", Figure.Fixed(white.Chromaticity.Y, 4));
        if (Whites.DistanceToTarget(filmCase, appraisal) is { } distance)
            yield return new("from target, xy", Figure.Fixed(distance, 4));
        yield return new("CCT, K", Figure.Fixed(white.CctKelvin, 0));
        yield return new("blue leakage", Percent(appraisal.Efficiency.BlueLeakagePhotonShare));
        yield return appraisal.Panel is { } panel
            ? new("panel, lm/W", Figure.Fixed(panel.LumensPerSourceWatt, 1))
            : new("film, lm/W", Figure.Fixed(appraisal.FilmLumensPerSourceWatt, 1));
        yield return new("energy efficiency", Percent(appraisal.Efficiency.EnergyShare));
        foreach (var gamut in (appraisal.Gamut ?? []).Take(2))
            yield return new($"{gamut.Name}, u′v′", Percent(gamut.CoverageUv));
    }

    private static string Percent(double share) => $"{Figure.Fixed(100 * share, 2)}\u2009%";
}
