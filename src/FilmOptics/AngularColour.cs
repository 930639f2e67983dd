using Colorimetry;

namespace FilmOptics;

/// <summary>Colour and luminance of the film's own light at one exit angle.</summary>
/// <param name="AngleDeg">Polar angle in air, degrees.</param>
/// <param name="RelativeLuminance">Luminance over that along the normal.</param>
/// <param name="Chromaticity">Colour; null where there is no light.</param>
public sealed record AngularColour(double AngleDeg, double RelativeLuminance, Chromaticity? Chromaticity)
{
    /// <summary>Every angle of an output.</summary>
    /// <param name="angles">Radiance by angle, the normal first.</param>
    /// <param name="observer">Colour-matching functions.</param>
    public static IReadOnlyList<AngularColour> Of(AngularOutput angles, StandardObserver observer)
    {
        ArgumentNullException.ThrowIfNull(angles);
        Tristimulus[] seen = [.. angles.Radiance.Select(radiance => Tristimulus.Of(radiance.ToPower(), observer))];
        double normal = seen.Length > 0 ? seen[0].Y : 0;
        return
        [
            .. seen.Select((light, i) => new AngularColour(
                angles.AnglesDeg[i], normal > 0 ? light.Y / normal : 0, light.HasColour ? light.Chromaticity : null)),
        ];
    }
}
