using Colorimetry;
using FilmOptics;

namespace FilmReports.Safety;

/// <summary>Blue-light figures of one light. They are no classification.</summary>
/// <param name="Light">Which light: the film's, or the panel's white.</param>
/// <param name="ShortBlueShare">Power in 415–455 nm over power in 400–500 nm; null without blue.</param>
/// <param name="HazardWattPerLumen">B(λ)-weighted watts per lumen; null without visible light.</param>
public sealed record BlueLight(string Light, double? ShortBlueShare, double? HazardWattPerLumen)
{
    /// <summary>What an eye can meet: the panel's white, where there is a panel, and the film's light.</summary>
    public static IReadOnlyList<BlueLight> Of(FilmCase filmCase, FilmAppraisal appraisal)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(appraisal);
        var film = Of("film", appraisal.Power);
        if (filmCase.Panel is not { } panel)
            return [film];
        var white = (appraisal.Power * panel.Red).ScaledBy(panel.RedAreaShare)
            + (appraisal.Power * panel.Green).ScaledBy(panel.GreenAreaShare)
            + (appraisal.Power * panel.Blue).ScaledBy(panel.BlueAreaShare);
        return [Of("panel white", white), film];
    }

    /// <summary>The figures of a light.</summary>
    /// <param name="name">Which light.</param>
    /// <param name="light">W/nm; its scale does not matter.</param>
    public static BlueLight Of(string name, Spectrum<WattPerNm> light)
    {
        ArgumentNullException.ThrowIfNull(light);
        double blue = Band(light, 400, 500);
        return new(name, blue > 0 ? Band(light, 415, 455) / blue : null, BlueLightHazard.WattPerLumen(light));
    }

    // Trapezoid at 1 nm: end points weigh half. Counting both ends whole would overstate the short band by two to four parts in a hundred.
    private static double Band(Spectrum<WattPerNm> light, int fromNm, int toNm)
    {
        double sum = (light[fromNm] + light[toNm]) / 2;
        for (int nm = fromNm + 1; nm < toNm; nm++)
            sum += light[nm];
        return sum;
    }
}
