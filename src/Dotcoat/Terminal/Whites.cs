using Colorimetry;
using FilmOptics;

namespace Dotcoat.Terminal;

/// <summary>White points in words and rows.</summary>
internal static class Whites
{
    /// <summary>The white that matters, and how far it is from the target.</summary>
    public static string Answer(FilmCase filmCase, FilmAppraisal appraisal)
    {
        var (where, judged) = Judged(filmCase, appraisal);
        var white = judged.Chromaticity;
        string answer = $"{where} white x {Figure.Fixed(white.X, 4)}, y {Figure.Fixed(white.Y, 4)}.";
        if (filmCase.Target is not { } target)
            return answer;
        double distance = DistanceToTarget(filmCase, appraisal)!.Value;
        string verdict = distance <= target.ToleranceXy ? "On target" : "Off target";
        return $"{answer} {verdict}: {Figure.Fixed(distance, 4)} in xy from {Figure.Fixed(target.WhiteX, 4)}, {Figure.Fixed(target.WhiteY, 4)} "
            + $"(tolerance {Figure.Digits(target.ToleranceXy, 3)}).";
    }

    /// <summary>The white that is judged, and where: "Panel" or "Film".</summary>
    public static (string Place, WhitePoint White) Judged(FilmCase filmCase, FilmAppraisal appraisal) =>
        appraisal.Panel is { } panel && filmCase.Target?.Place != TargetPlace.Film ? ("Panel", panel.White) : ("Film", appraisal.FilmWhite);

    /// <summary>How far the judged white is from the target in xy; null without a target.</summary>
    public static double? DistanceToTarget(FilmCase filmCase, FilmAppraisal appraisal) => filmCase.Target is { } target
        ? Judged(filmCase, appraisal).White.Chromaticity.DistanceXyTo(new Chromaticity(target.WhiteX, target.WhiteY))
        : null;

    /// <summary>Panel white, its primaries and the film's white.</summary>
    public static IEnumerable<string[]> Rows(FilmAppraisal appraisal)
    {
        if (appraisal.Panel is { } panel)
        {
            yield return White("panel white", panel.White, panel.LumensPerSourceWatt);
            yield return Row("panel red", panel.Red);
            yield return Row("panel green", panel.Green);
            yield return Row("panel blue", panel.Blue);
        }

        yield return White("film white", appraisal.FilmWhite, appraisal.FilmLumensPerSourceWatt);
    }

    private static string[] White(string name, WhitePoint white, double lumensPerWatt) =>
        [.. Coordinates(name, white.Chromaticity), Figure.Fixed(white.CctKelvin, 0), Figure.Signed(white.Duv, 4), Figure.Fixed(lumensPerWatt, 1)];

    private static string[] Row(string name, Chromaticity colour) => [.. Coordinates(name, colour), "", "", ""];

    private static string[] Coordinates(string name, Chromaticity colour) =>
        [name, Figure.Fixed(colour.X, 4), Figure.Fixed(colour.Y, 4), Figure.Fixed(colour.UPrime, 4), Figure.Fixed(colour.VPrime, 4)];
}
