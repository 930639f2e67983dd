using Colorimetry;
using FilmDesign;
using FilmOptics;

namespace FilmReports.Pages;

/// <summary>The answer of a film in a sentence and a few figures.</summary>
internal static class Findings
{
    /// <summary>Where white is and whether that is the target.</summary>
    public static string Answer(FilmCase filmCase, FilmAppraisal appraisal, Formulation? formulation)
    {
        if (formulation is { Reached: false, Limit: { } limit })
            return limit;
        bool atPanel = appraisal.Panel is not null && filmCase.Target is null or { Place: TargetPlace.Panel };
        var white = (atPanel ? appraisal.Panel!.White : appraisal.FilmWhite).Chromaticity;
        string place = atPanel ? "Panel" : "Film";
        string at = $"{place} white is at x {Digits.Fixed(white.X, 4)}, y {Digits.Fixed(white.Y, 4)}";
        if (filmCase.Target is not { } target)
            return $"{at}.";
        double distance = white.DistanceXyTo(new Chromaticity(target.WhiteX, target.WhiteY));
        string wanted = $"({Digits.Fixed(target.WhiteX, 4)}, {Digits.Fixed(target.WhiteY, 4)})";
        return distance <= target.ToleranceXy
            ? $"{at}: on target, {Digits.Fixed(distance, 5)} from {wanted} with a tolerance of {Digits.Significant(target.ToleranceXy, 3)}."
            : $"{at}: off target, {Digits.Fixed(distance, 4)} from {wanted} with a tolerance of {Digits.Significant(target.ToleranceXy, 3)}. Formulate finds the loadings.";
    }

    /// <summary>The figures a reader asks for first.</summary>
    public static IEnumerable<(string Name, string Value)> Key(FilmCase filmCase, FilmAppraisal appraisal)
    {
        if (appraisal.Gamut is { Count: > 0 } gamut)
        {
            yield return ($"coverage of {gamut[0].Name}, xy", Digits.Percent(gamut[0].CoverageXy, 1));
            yield return ($"coverage of {gamut[0].Name}, u′v′", Digits.Percent(gamut[0].CoverageUv, 1));
        }

        yield return ("blue leakage, photons", Digits.Percent(appraisal.Efficiency.BlueLeakagePhotonShare, 1));
        yield return ("film output / lm per source W", Digits.Fixed(appraisal.FilmLumensPerSourceWatt, 1));
        if (appraisal.Panel is { } panel)
            yield return ("panel output / lm per source W", Digits.Fixed(panel.LumensPerSourceWatt, 2));
        yield return ("energy efficiency", Digits.Percent(appraisal.Efficiency.EnergyShare, 1));
        if (filmCase.Film.Backlight.RadiantFluxW is { } watts)
            yield return ("film output / lm", Digits.Fixed(appraisal.FilmLumensPerSourceWatt * watts, 0));
    }
}
