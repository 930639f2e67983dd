namespace FilmOptics;

/// <summary>A rectangle of the backlight that is lit, seen from a point of the film.</summary>
/// <param name="LeftMm">Where it begins, mm along x from the point.</param>
/// <param name="RightMm">Where it ends along x, mm.</param>
/// <param name="BottomMm">Where it begins along y, mm.</param>
/// <param name="TopMm">Where it ends along y, mm.</param>
public readonly record struct LitZone(double LeftMm, double RightMm, double BottomMm, double TopMm)
{
    /// <summary>Share of a circle around the point that lies in the zone.</summary>
    /// <param name="radiusMm">Radius of the circle, mm, above 0.</param>
    public double ShareOfCircle(double radiusMm) =>
        Quadrant(RightMm / radiusMm, TopMm / radiusMm) - Quadrant(LeftMm / radiusMm, TopMm / radiusMm)
        - Quadrant(RightMm / radiusMm, BottomMm / radiusMm) + Quadrant(LeftMm / radiusMm, BottomMm / radiusMm);

    /// <summary>Share of the unit circle on which x and y stay below two limits.</summary>
    private static double Quadrant(double x, double y)
    {
        // x below its limit from angle α to 2π − α; y below its limit from π − β to 2π + β, and the same one turn earlier.
        double alpha = Math.Acos(Math.Clamp(x, -1, 1)), beta = Math.Asin(Math.Clamp(y, -1, 1)), end = (2 * Math.PI) - alpha;
        double late = Math.Min(end, (2 * Math.PI) + beta) - Math.Max(alpha, Math.PI - beta);
        double early = Math.Min(end, beta) - Math.Max(alpha, -Math.PI - beta);
        return (Math.Max(0, late) + Math.Max(0, early)) / (2 * Math.PI);
    }
}
