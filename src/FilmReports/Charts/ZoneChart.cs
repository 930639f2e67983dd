using System.Globalization;
using FilmOptics;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>The halo of one lit square zone of a dimmed backlight: luminance and colour against the distance from its centre.</summary>
internal static class ZoneChart
{
    private const double FieldHeight = 210, SmallHeight = 130, LeastLuminance = 1e-4;

    // Of a full backlight: below it the colour is that of a few photons.
    private const double ColouredLuminance = 3e-4;

    /// <summary>One line for each profile.</summary>
    /// <param name="profiles">Profiles of one zone with their names.</param>
    /// <param name="palette">Colours.</param>
    public static Drawing Of(IReadOnlyList<(string Name, ZoneProfile Profile)> profiles, Palette palette)
    {
        double zoneMm = profiles[0].Profile.ZoneMm, lastMm = profiles.Max(p => p.Profile.Points[^1].DistanceMm);
        // From within the zone as far as the halo reaches twice: the middle of a large zone is as bright as a backlight lit everywhere.
        double firstMm = Math.Max(0, (zoneMm / 2) - (2 * (lastMm - (zoneMm / 2))));
        var across = new Axis("distance from the centre of the zone / mm", firstMm, lastMm, Plot.NiceStep(lastMm - firstMm, 8));
        var luminance = new ChartFrame(
            new(
                "halo",
                string.Create(CultureInfo.InvariantCulture, $"Beside one lit zone of {zoneMm:0.##} mm"),
                string.Join(' ', profiles.Select(p => $"{p.Name}: {Spread(p.Profile)}")),
                "luminance 1: backlight lit everywhere"),
            across, new("relative luminance", LeastLuminance, 2, 1, IsLog: true), palette, height: FieldHeight);
        var colour = new ChartFrame(
            new("", "Colour, Δv′ from the centre of the zone", "", "below 0 is bluer, above 0 is yellower"),
            across, Axis.Holding("change of v′", profiles.SelectMany(p => Shift(p.Profile)).Select(point => point.V).Append(0), 4), palette, height: SmallHeight);
        foreach (var plot in (Plot[])[luminance.Plot, colour.Plot])
            Edge(plot, zoneMm / 2, palette);
        Lines.Draw(luminance.Plot, [.. profiles.Select((p, i) => new NamedLine(
            p.Name, [.. p.Profile.Points.Where(point => point.LuminanceShare > 0).Select(point => (point.DistanceMm, point.LuminanceShare))], Lines.StrokeOf(i, palette)))], palette);
        Lines.Draw(colour.Plot, [.. profiles.Select((p, i) => new NamedLine(p.Name, Shift(p.Profile), Lines.StrokeOf(i, palette)))], palette);
        return luminance.Finish().Above(colour.Finish());
    }

    private static void Edge(Plot plot, double edgeMm, Palette palette)
    {
        Spot top = plot.At(edgeMm, plot.Y.To), foot = plot.At(edgeMm, plot.Y.From);
        plot.Inside(new Shape([top, foot], Closed: false, null, 1, new Stroke(palette.Faint, 0.9, [2, 2])));
        plot.Over(plot.Labels.Place("edge of the zone", top, 8.5, palette.Faint, palette.Ground, 8, (1, 1)));
    }

    private static (double X, double V)[] Shift(ZoneProfile profile)
    {
        var centre = profile.Points[0].Chromaticity;
        return centre is not { } from ? [] :
        [
            .. profile.Points.Where(point => point.Chromaticity is not null && point.LuminanceShare >= ColouredLuminance)
                .Select(point => (point.DistanceMm, point.Chromaticity!.Value.VPrime - from.VPrime)),
        ];
    }

    private static string Spread(ZoneProfile profile)
    {
        double edgeMm = profile.ZoneMm / 2;
        var dim = profile.Points.FirstOrDefault(point => point.DistanceMm > edgeMm && point.LuminanceShare < 0.01);
        return dim is null
            ? "luminance stays above 1 % as far as the profile goes."
            : string.Create(CultureInfo.InvariantCulture, $"luminance falls below 1 % {dim.DistanceMm - edgeMm:0.0} mm beyond the edge.");
    }
}
