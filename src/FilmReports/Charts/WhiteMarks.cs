using Colorimetry;
using FilmOptics;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>The signs of white: the film's a ring, the panel's a dot, the target a cross inside its tolerance outline.</summary>
internal static class WhiteMarks
{
    /// <summary>All whites of a film on a diagram.</summary>
    /// <param name="scale">Where chromaticities lie.</param>
    /// <param name="filmCase">Gives the target.</param>
    /// <param name="appraisal">Gives the whites.</param>
    /// <param name="palette">Colours.</param>
    /// <param name="sizeFactor">Size of the signs; 1 for an inset.</param>
    public static IEnumerable<Mark> Of(ChromaticityScale scale, FilmCase filmCase, FilmAppraisal appraisal, Palette palette, double sizeFactor)
    {
        if (filmCase.Target is { } target)
        {
            var at = scale.At(new Chromaticity(target.WhiteX, target.WhiteY));
            double arm = 7 * sizeFactor;
            yield return new Shape(ToleranceOutline(scale, target), Closed: true, null, 1, new Stroke(palette.Ink, 0.9));
            yield return Line(new(at.X - arm, at.Y), new(at.X + arm, at.Y));
            yield return Line(new(at.X, at.Y - arm), new(at.X, at.Y + arm));
        }

        yield return new Disc(scale.At(appraisal.FilmWhite.Chromaticity), 4.5 * sizeFactor, null, new Stroke(palette.Ink, 1.6 * sizeFactor));
        if (appraisal.Panel is { } panel)
            yield return new Disc(scale.At(panel.White.Chromaticity), 3 * sizeFactor, palette.Ink, null);

        Shape Line(Spot a, Spot b) => new([a, b], Closed: false, null, 1, new Stroke(palette.Ink, 0.9));
    }

    /// <summary>Chromaticities at the tolerance from the target: a circle in xy, an ellipse in u′v′.</summary>
    internal static IReadOnlyList<Spot> ToleranceOutline(ChromaticityScale scale, WhiteTarget target) =>
    [
        .. Enumerable.Range(0, 72).Select(i => i * Math.PI / 36).Select(angle => scale.At(new Chromaticity(
            target.WhiteX + (target.ToleranceXy * Math.Cos(angle)), target.WhiteY + (target.ToleranceXy * Math.Sin(angle))))),
    ];
}
