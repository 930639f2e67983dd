namespace Colorimetry;

/// <summary>A colour in CIELAB.</summary>
/// <param name="L">Lightness L*, 100 at white.</param>
/// <param name="A">a*, red positive.</param>
/// <param name="B">b*, yellow positive.</param>
/// <remarks>Source: ISO/CIE 11664-4:2019.</remarks>
public readonly record struct Cielab(double L, double A, double B)
{
    // (6/29)³ and its companions, exact as the standard writes them.
    private const double LinearBelow = 216.0 / 24389, LinearSlope = 841.0 / 108, LinearOffset = 4.0 / 29;

    /// <summary>From tristimulus values beside those of the white they are seen with.</summary>
    public static Cielab From(Tristimulus colour, Tristimulus white)
    {
        double x = F(colour.X / white.X), y = F(colour.Y / white.Y), z = F(colour.Z / white.Z);
        return new((116 * y) - 16, 500 * (x - y), 200 * (y - z));
    }

    /// <summary>Back to tristimulus values.</summary>
    public Tristimulus ToTristimulus(Tristimulus white)
    {
        double y = (L + 16) / 116;
        return new(white.X * Inverse(y + (A / 500)), white.Y * Inverse(y), white.Z * Inverse(y - (B / 200)));
    }

    /// <summary>L* of a luminance beside white.</summary>
    internal static double Lightness(double yOverWhite) => (116 * F(yOverWhite)) - 16;

    private static double F(double t) => t > LinearBelow ? Math.Cbrt(t) : (LinearSlope * t) + LinearOffset;

    private static double Inverse(double f) => f > 6.0 / 29 ? f * f * f : (f - LinearOffset) / LinearSlope;
}

/// <summary>A colour in CIELUV.</summary>
/// <param name="L">Lightness L*, 100 at white.</param>
/// <param name="U">u*.</param>
/// <param name="V">v*.</param>
/// <remarks>Source: ISO/CIE 11664-5:2016. Black, which has no chromaticity, is 0, 0, 0.</remarks>
public readonly record struct Cieluv(double L, double U, double V)
{
    /// <summary>From tristimulus values beside those of the white they are seen with.</summary>
    public static Cieluv From(Tristimulus colour, Tristimulus white)
    {
        double l = Cielab.Lightness(colour.Y / white.Y);
        if (!colour.HasColour)
            return new(l, 0, 0);
        var (c, w) = (colour.Chromaticity, white.Chromaticity);
        return new(l, 13 * l * (c.UPrime - w.UPrime), 13 * l * (c.VPrime - w.VPrime));
    }
}
