using System.Globalization;
using FilmOptics;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>Colour and luminance of the bare film against the exit angle: how far u′ and v′ move from the normal, and how luminance falls.</summary>
internal static class AngleChart
{
    private const double FieldHeight = 150;

    public static Drawing Of(FilmCase filmCase, AngularOutput output, Palette palette)
    {
        AngularColour[] angles = [.. AngularColour.Of(output, filmCase.Observer)];
        double lastDeg = angles[^1].AngleDeg;
        var across = new Axis("exit angle in air / °", 0, lastDeg, 10);
        AngularColour[] coloured = [.. angles.Where(angle => angle.Chromaticity is not null)];
        var luminance = new ChartFrame(
            new("colour-over-angle", "Bare film against the exit angle", Description(coloured), "luminance 1 along the normal"),
            across, Axis.Holding("relative luminance", angles.Select(angle => angle.RelativeLuminance).Append(0).Append(1), 4), palette, height: FieldHeight);
        Lines.Draw(luminance.Plot, [new("luminance", [.. angles.Select(angle => (angle.AngleDeg, angle.RelativeLuminance))], new(palette.Ink, 1.8))], palette);
        var normal = coloured.Length > 0 ? coloured[0].Chromaticity!.Value : default;
        NamedLine[] shifts =
        [
            new("Δu′", [.. coloured.Select(angle => (angle.AngleDeg, angle.Chromaticity!.Value.UPrime - normal.UPrime))], Lines.StrokeOf(0, palette)),
            new("Δv′", [.. coloured.Select(angle => (angle.AngleDeg, angle.Chromaticity!.Value.VPrime - normal.VPrime))], Lines.StrokeOf(1, palette)),
        ];
        var colour = new ChartFrame(
            new("", "Change of colour from the normal", ""),
            across, Axis.Holding("change of u′ and v′", shifts.SelectMany(shift => shift.Points).Select(point => point.Y).Append(0), 4, 0.004), palette, height: FieldHeight);
        Lines.Draw(colour.Plot, shifts, palette);
        var upper = luminance.Finish();
        return upper.Above(colour.Finish());
    }

    private static string Description(AngularColour[] angles)
    {
        if (angles.Length == 0)
            return "No light leaves the film.";
        var (normal, last) = (angles[0].Chromaticity!.Value, angles[^1].Chromaticity!.Value);
        return string.Create(
            CultureInfo.InvariantCulture,
            $"From the normal to {angles[^1].AngleDeg:0}°, u′ changes by {last.UPrime - normal.UPrime:0.0000}, v′ by {last.VPrime - normal.VPrime:0.0000}, luminance to {angles[^1].RelativeLuminance:0.000} of that along the normal.");
    }
}
