namespace Colorimetry;

/// <summary>Which plane areas are measured in. They give different numbers, so every figure names its own.</summary>
public enum ChromaticityDiagram
{
    /// <summary>CIE 1931 xy.</summary>
    Xy1931,

    /// <summary>CIE 1976 u′v′.</summary>
    UvPrime1976,
}

/// <summary>Areas of colour triangles: coverage (what of a standard is reached) and area ratio (how large beside it).</summary>
/// <remarks>Coverage is at most 1; the area ratio may exceed 1. Neither is ever clamped to the other.</remarks>
public static class GamutCoverage
{
    /// <summary>Area of the triangle of three primaries.</summary>
    public static double Area(Chromaticity red, Chromaticity green, Chromaticity blue, ChromaticityDiagram diagram) =>
        Math.Abs(SignedArea(Triangle(red, green, blue, diagram)));

    /// <summary>Area of (panel ∩ standard) over area of the standard.</summary>
    public static double Coverage(Chromaticity red, Chromaticity green, Chromaticity blue, ColourGamut standard, ChromaticityDiagram diagram)
    {
        ArgumentNullException.ThrowIfNull(standard);
        var wanted = Triangle(standard.Red, standard.Green, standard.Blue, diagram);
        var common = Clip(Triangle(red, green, blue, diagram), wanted);
        return Math.Abs(SignedArea(common)) / Math.Abs(SignedArea(wanted));
    }

    /// <summary>Area of the panel over area of the standard.</summary>
    public static double AreaRatio(Chromaticity red, Chromaticity green, Chromaticity blue, ColourGamut standard, ChromaticityDiagram diagram)
    {
        ArgumentNullException.ThrowIfNull(standard);
        return Area(red, green, blue, diagram) / Area(standard.Red, standard.Green, standard.Blue, diagram);
    }

    /// <summary>Area of a polygon, positive when it runs counterclockwise.</summary>
    internal static double SignedArea(IReadOnlyList<(double X, double Y)> polygon)
    {
        double sum = 0;
        for (int i = 0; i < polygon.Count; i++)
        {
            var (a, b) = (polygon[i], polygon[(i + 1) % polygon.Count]);
            sum += (a.X * b.Y) - (b.X * a.Y);
        }

        return sum / 2;
    }

    private static List<(double X, double Y)> Triangle(Chromaticity red, Chromaticity green, Chromaticity blue, ChromaticityDiagram diagram)
    {
        List<(double X, double Y)> corners = [At(red), At(green), At(blue)];
        if (SignedArea(corners) < 0)
            corners.Reverse();
        return corners;

        (double X, double Y) At(Chromaticity c) => diagram == ChromaticityDiagram.Xy1931 ? (c.X, c.Y) : (c.UPrime, c.VPrime);
    }

    // Sutherland–Hodgman: a polygon cut by each side of a convex counterclockwise one.
    private static List<(double X, double Y)> Clip(List<(double X, double Y)> subject, List<(double X, double Y)> window)
    {
        var result = subject;
        for (int side = 0; side < window.Count && result.Count > 0; side++)
        {
            var (a, b) = (window[side], window[(side + 1) % window.Count]);
            var input = result;
            result = [];
            for (int i = 0; i < input.Count; i++)
            {
                var (from, to) = (input[i], input[(i + 1) % input.Count]);
                double fromSide = Side(from), toSide = Side(to);
                if (fromSide >= 0)
                    result.Add(from);
                if (fromSide * toSide < 0)
                {
                    double share = fromSide / (fromSide - toSide);
                    result.Add((from.X + (share * (to.X - from.X)), from.Y + (share * (to.Y - from.Y))));
                }
            }

            double Side((double X, double Y) p) => ((b.X - a.X) * (p.Y - a.Y)) - ((b.Y - a.Y) * (p.X - a.X));
        }

        return result;
    }
}
