using Colorimetry;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>Signs of the kinds of light, and where a light stands on the axis.</summary>
internal static class LightMarks
{
    /// <summary>Wavelength of the highest sample, nm.</summary>
    public static int PeakNm<TUnit>(Spectrum<TUnit> light)
        where TUnit : struct, ILightUnit => WavelengthGrid.NmAt(light.Samples.IndexOf(light.Peak));

    /// <summary>The sign of a kind of light: filled triangle, square or circle.</summary>
    public static Mark Sign(LightMark mark, Spot at, double size, string colour) => mark switch
    {
        LightMark.Triangle => new Shape(
            [new(at.X, at.Y - size), new(at.X + size, at.Y + (size * 0.8)), new(at.X - size, at.Y + (size * 0.8))], Closed: true, colour, 1, null),
        LightMark.Square => new Shape(Box.About(at, size * 0.85).Corners, Closed: true, colour, 1, null),
        _ => new Disc(at, size, colour, null),
    };

    /// <summary>Wavelengths that a spectral axis shows: 400 to 740 nm, and more where there is light.</summary>
    /// <param name="lights">All lights of the picture.</param>
    public static (int FromNm, int ToNm) Range<TUnit>(IEnumerable<Spectrum<TUnit>> lights)
        where TUnit : struct, ILightUnit
    {
        const double VisibleShare = 0.003;
        int first = 400, last = 740;
        foreach (var light in lights)
        {
            double least = light.Peak * VisibleShare;
            for (int i = 0; i < WavelengthGrid.Count && least > 0; i++)
            {
                if (light.Samples[i] <= least)
                    continue;
                first = Math.Min(first, WavelengthGrid.NmAt(i));
                last = Math.Max(last, WavelengthGrid.NmAt(i));
            }
        }

        return (Math.Max(first / 20 * 20, WavelengthGrid.FirstNm), Math.Min((last + 19) / 20 * 20, WavelengthGrid.LastNm));
    }
}
