using System.Globalization;
using Colorimetry;
using FilmOptics;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>The halo of one lit square zone of a dimmed backlight: luminance and colour against the distance from its centre.</summary>
internal static class ZoneChart
{
    private const double FieldHeight = 200, SmallHeight = 110, LeastLuminance = 1e-4;

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
        Edge(luminance.Plot, zoneMm / 2, palette, "edge of the zone");
        Lines.Draw(luminance.Plot, [.. profiles.Select((p, i) => new NamedLine(
            p.Name, [.. p.Profile.Points.Where(point => point.LuminanceShare > 0).Select(point => (point.DistanceMm, point.LuminanceShare))], Lines.StrokeOf(i, palette)))], palette);
        return luminance.Finish()
            .Above(Colour("u′", "above 0 is redder", c => c.UPrime))
            .Above(Colour("v′", "below 0 is bluer, above 0 is yellower", c => c.VPrime));

        Drawing Colour(string coordinate, string meaning, Func<Chromaticity, double> value)
        {
            NamedLine[] lines = [.. profiles.Select((p, i) => new NamedLine(p.Name, Shift(p.Profile, value), Lines.StrokeOf(i, palette)))];
            var frame = new ChartFrame(
                new("", $"Change of {coordinate} from the centre of the zone", "", meaning),
                across, Axis.Holding($"change of {coordinate}", lines.SelectMany(line => line.Points).Select(point => point.Y).Append(0), 4, 0.02), palette, height: SmallHeight);
            Edge(frame.Plot, zoneMm / 2, palette, name: null);
            Lines.Draw(frame.Plot, lines, palette);
            return frame.Finish();
        }
    }

    private static void Edge(Plot plot, double edgeMm, Palette palette, string? name)
    {
        Spot top = plot.At(edgeMm, plot.Y.To), foot = plot.At(edgeMm, plot.Y.From);
        plot.Inside(new Shape([top, foot], Closed: false, null, 1, new Stroke(palette.Faint, 0.9, [2, 2])));
        if (name is not null)
            plot.Over(plot.Labels.Place(name, top, 8.5, palette.Faint, palette.Ground, 8, (1, 1)));
    }

    private static (double X, double Y)[] Shift(ZoneProfile profile, Func<Chromaticity, double> value)
    {
        var centre = profile.Points[0].Chromaticity;
        return centre is not { } from ? [] :
        [
            .. profile.Points.Where(point => point.Chromaticity is not null && point.LuminanceShare >= ColouredLuminance)
                .Select(point => (point.DistanceMm, value(point.Chromaticity!.Value) - value(from))),
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
