using Colorimetry;
using FilmDesign;
using FilmOptics;

namespace FilmReports.Pages;

/// <summary>The answer of a film in a sentence and a few figures.</summary>
internal static class Findings
{
    /// <summary>Where white is, whether that is the target, and if not, what to do.</summary>
    public static string Answer(FilmCase filmCase, FilmAppraisal appraisal, Formulation? formulation)
    {
        if (formulation is { Reached: false, Limit: { } limit })
            return limit;
        bool isAtPanel = IsAtPanel(filmCase, appraisal);
        var white = (isAtPanel ? appraisal.Panel!.White : appraisal.FilmWhite).Chromaticity;
        int decimals = Math.Min(4, Digits.ShareDecimals(appraisal.Output));
        string at = $"{(isAtPanel ? "Panel" : "Film")} white is at x {Digits.Fixed(white.X, decimals)}, y {Digits.Fixed(white.Y, decimals)}";
        if (filmCase.Target is not { } target)
            return $"{at}. The film file has no target to compare it with.";
        double distance = white.DistanceXyTo(new Chromaticity(target.WhiteX, target.WhiteY));
        string off = $"{Distance(distance, decimals)} in xy from x {Digits.Fixed(target.WhiteX, 4)}, y {Digits.Fixed(target.WhiteY, 4)}, tolerance {Digits.Significant(target.ToleranceXy, 3)}";
        return distance <= target.ToleranceXy
            ? $"{at}: on target ({off})."
            : $"{at}: off target ({off}). The command formulate finds the loadings that bring it there, or says why none can.";
    }

    /// <summary>Whether white is judged behind the panel: where the target says so, and without a target where there is a panel.</summary>
    public static bool IsAtPanel(FilmCase filmCase, FilmAppraisal appraisal) =>
        appraisal.Panel is not null && filmCase.Target is null or { Place: TargetPlace.Panel };

    /// <summary>The figures a reader asks for first.</summary>
    public static IEnumerable<(string Name, string Value)> Key(FilmCase filmCase, FilmAppraisal appraisal)
    {
        if (appraisal.Panel is { } panel)
            yield return ("panel, lm per source W", Digits.Fixed(panel.LumensPerSourceWatt, 1));
        yield return ("film, lm per source W", Digits.Fixed(appraisal.FilmLumensPerSourceWatt, 1));
        yield return ("blue leakage, photons", Digits.Percent(appraisal.Efficiency.BlueLeakagePhotonShare));
        yield return ("energy efficiency", Digits.Percent(appraisal.Efficiency.EnergyShare));
        if (appraisal.Gamut is { Count: > 0 } gamut)
        {
            yield return ($"coverage of {gamut[0].Name} in xy", Digits.Percent(gamut[0].CoverageXy));
            yield return ($"coverage of {gamut[0].Name} in u′v′", Digits.Percent(gamut[0].CoverageUv));
        }

        if (filmCase.Film.Backlight.RadiantFluxW is { } watts)
            yield return ("film, lumens", Digits.Significant(appraisal.FilmLumensPerSourceWatt * watts, 4));
    }

    // Nearer than the last digit shown is not nothing.
    private static string Distance(double distanceXy, int decimals)
    {
        double least = Math.Pow(10, -decimals);
        return distanceXy < least / 2 ? $"less than {Digits.Fixed(least, decimals)}" : Digits.Fixed(distanceXy, decimals);
    }
}
