namespace Colorimetry;

/// <summary>The line of single wavelengths in the chromaticity diagram, CIE 1931 observer, 380 to 780 nm.</summary>
public static class SpectralLocus
{
    /// <summary>First wavelength used, nm. Below it the locus does not move visibly.</summary>
    public const int FirstNm = 380;

    /// <summary>Last wavelength used, nm.</summary>
    public const int LastNm = 780;

    /// <summary>Chromaticity of a single wavelength.</summary>
    /// <param name="wavelengthNm">360 to 830 nm.</param>
    public static Chromaticity At(int wavelengthNm)
    {
        int i = WavelengthGrid.IndexOf(wavelengthNm);
        var observer = StandardObserver.Cie1931;
        return new Tristimulus(observer.XBar[i], observer.YBar[i], observer.ZBar[i]).Chromaticity;
    }
}

/// <summary>Dominant (or complementary) wavelength and excitation purity of a colour beside a white.</summary>
/// <param name="WavelengthNm">
/// Where the ray from white through the colour meets the locus, nm; for a purple, where the ray the other way does (complementary).
/// </param>
/// <param name="IsComplementary">Whether the wavelength is complementary.</param>
/// <param name="ExcitationPurityShare">Distance of the colour from white over that of the boundary (the purple line for a purple).</param>
/// <remarks>Source: definitions of CIE 15:2018 and the International Lighting Vocabulary; chromaticities linear between whole nm.</remarks>
public readonly record struct DominantWavelength(double WavelengthNm, bool IsComplementary, double ExcitationPurityShare)
{
    // Nearer to white than this a direction means nothing.
    private const double LeastDistanceXy = 1e-6;

    /// <summary>Of a colour beside a white.</summary>
    /// <returns>Null where the colour is the white, so that no direction is defined.</returns>
    public static DominantWavelength? Of(Chromaticity colour, Chromaticity white)
    {
        double dx = colour.X - white.X, dy = colour.Y - white.Y;
        double distance = Math.Sqrt((dx * dx) + (dy * dy));
        if (!(distance > LeastDistanceXy))
            return null;
        (dx, dy) = (dx / distance, dy / distance);
        if (Meet(white, dx, dy) is var (nm, reach))
            return new(nm, false, distance / reach);
        if (Meet(white, -dx, -dy) is not var (complementaryNm, _))
            return null;
        var (violet, red) = (SpectralLocus.At(SpectralLocus.FirstNm), SpectralLocus.At(SpectralLocus.LastNm));
        return Crossing(white, dx, dy, violet, red) is var (_, purple) ? new(complementaryNm, true, distance / purple) : null;
    }

    private static (double Nm, double Reach)? Meet(Chromaticity white, double dx, double dy)
    {
        for (int nm = SpectralLocus.FirstNm; nm < SpectralLocus.LastNm; nm++)
        {
            if (Crossing(white, dx, dy, SpectralLocus.At(nm), SpectralLocus.At(nm + 1)) is var (share, reach))
                return (nm + share, reach);
        }

        return null;
    }

    // Where a ray meets a segment: share along the segment and distance along the ray.
    private static (double Share, double Reach)? Crossing(Chromaticity from, double dx, double dy, Chromaticity a, Chromaticity b)
    {
        double ex = b.X - a.X, ey = b.Y - a.Y, determinant = (dx * ey) - (dy * ex);
        if (determinant == 0)
            return null;
        double ax = a.X - from.X, ay = a.Y - from.Y;
        double reach = ((ax * ey) - (ay * ex)) / determinant, share = ((ax * dy) - (ay * dx)) / determinant;
        return reach > 0 && share is >= 0 and <= 1 ? (share, reach) : null;
    }
}
