namespace Colorimetry;

/// <summary>The triangle of three primaries, with the white of its standard.</summary>
/// <param name="Name">Name, as film files write it.</param>
/// <param name="Red">Red primary.</param>
/// <param name="Green">Green primary.</param>
/// <param name="Blue">Blue primary.</param>
/// <param name="White">White point.</param>
/// <param name="Source">The standard.</param>
public sealed record ColourGamut(
    string Name, Chromaticity Red, Chromaticity Green, Chromaticity Blue, Chromaticity White, string Source)
{
    private static readonly Chromaticity D65 = new(0.3127, 0.3290);

    /// <summary>The standards that film files may name.</summary>
    public static IReadOnlyList<ColourGamut> All { get; } =
    [
        new("BT.709", new(0.64, 0.33), new(0.30, 0.60), new(0.15, 0.06), D65, "ITU-R BT.709-6"),
        new("BT.2020", new(0.708, 0.292), new(0.170, 0.797), new(0.131, 0.046), D65, "ITU-R BT.2020-2"),
        new("DCI-P3", new(0.680, 0.320), new(0.265, 0.690), new(0.150, 0.060), new(0.314, 0.351), "SMPTE RP 431-2:2011"),
        new("P3-D65", new(0.680, 0.320), new(0.265, 0.690), new(0.150, 0.060), D65, "SMPTE EG 432-1:2010"),
        new("Adobe RGB (1998)", new(0.64, 0.33), new(0.21, 0.71), new(0.15, 0.06), D65, "Adobe RGB (1998) encoding, IEC 61966-2-5:2007"),
        new("NTSC 1953", new(0.67, 0.33), new(0.21, 0.71), new(0.14, 0.08), new(0.310, 0.316), "FCC 1953, ITU-R BT.470-6 system M"),
    ];

    /// <summary>The standard of that name.</summary>
    /// <exception cref="ArgumentException">No such standard; the message names those there are.</exception>
    public static ColourGamut Named(string name) =>
        All.FirstOrDefault(gamut => string.Equals(gamut.Name, name, StringComparison.Ordinal))
        ?? throw new ArgumentException($"'{name}' is not a known gamut; known are {string.Join(", ", All.Select(g => g.Name))}.", nameof(name));

    /// <summary>Tristimulus values of the primaries that add up to the white with Y = 1.</summary>
    public (Tristimulus Red, Tristimulus Green, Tristimulus Blue) PrimariesAtWhite()
    {
        var white = Tristimulus.From(White, 1);
        var (r, g, b) = (Tristimulus.From(Red, 1), Tristimulus.From(Green, 1), Tristimulus.From(Blue, 1));
        double determinant = Determinant(r, g, b);
        return (Tristimulus.From(Red, Determinant(white, g, b) / determinant),
            Tristimulus.From(Green, Determinant(r, white, b) / determinant),
            Tristimulus.From(Blue, Determinant(r, g, white) / determinant));
    }

    private static double Determinant(Tristimulus a, Tristimulus b, Tristimulus c) =>
        (a.X * ((b.Y * c.Z) - (c.Y * b.Z))) - (b.X * ((a.Y * c.Z) - (c.Y * a.Z))) + (c.X * ((a.Y * b.Z) - (b.Y * a.Z)));
}
