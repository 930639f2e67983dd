using System.Globalization;

namespace Colorimetry;

/// <summary>Daylight of any correlated colour temperature, from the CIE's components S0, S1, S2.</summary>
/// <remarks>
/// Source: CIE 15:2018, daylight locus and M1, M2, here without rounding them to three decimals (which D65 and D50 are published with);
/// linear between the 5 nm rows of the components, as ISO/CIE 11664-2 has it.
/// </remarks>
public static class DaylightIlluminant
{
    /// <summary>Lowest CCT that the CIE's formula is given for, K.</summary>
    public const double LowestCctKelvin = 4000;

    /// <summary>Highest CCT that the CIE's formula is given for, K.</summary>
    public const double HighestCctKelvin = 25_000;

    private static readonly Lazy<(double[] S0, double[] S1, double[] S2)> Components = new(() =>
    {
        SpectrumTable table = PublishedTables.Read("illuminants/daylight-components.csv");
        return (StandardIlluminant.Linear(table, "s0"), StandardIlluminant.Linear(table, "s1"), StandardIlluminant.Linear(table, "s2"));
    });

    /// <summary>Relative spectral power of daylight, 100 at 560 nm.</summary>
    /// <param name="cctKelvin">
    /// 4000 to 25 000 K on the present temperature scale (c2 = 1.4388e-2 m K): D65 is 6504 K, D50 is 5003 K.
    /// </param>
    /// <exception cref="ArgumentOutOfRangeException">The CCT is out of range.</exception>
    public static Spectrum<WattPerNm> FromCct(double cctKelvin)
    {
        (double m1, double m2) = ComponentFactors(ChromaticityAt(cctKelvin));
        return FromFactors(m1, m2, string.Create(CultureInfo.InvariantCulture, $"CIE daylight {cctKelvin} K"));
    }

    /// <summary>Chromaticity of daylight, on the CIE daylight locus (CIE 1931).</summary>
    /// <param name="cctKelvin">4000 to 25 000 K.</param>
    /// <exception cref="ArgumentOutOfRangeException">The CCT is out of range.</exception>
    public static Chromaticity ChromaticityAt(double cctKelvin)
    {
        if (!(cctKelvin is >= LowestCctKelvin and <= HighestCctKelvin))
            throw new ArgumentOutOfRangeException(nameof(cctKelvin), cctKelvin, $"daylight is defined from {LowestCctKelvin} to {HighestCctKelvin} K.");
        double k = 1000 / cctKelvin;
        double x = cctKelvin <= 7000
            ? 0.244063 + (k * (0.09911 + (k * (2.9678 - (k * 4.6070)))))
            : 0.237040 + (k * (0.24748 + (k * (1.9018 - (k * 2.0064)))));
        return new(x, (x * (2.870 - (3.000 * x))) - 0.275);
    }

    /// <summary>M1 and M2 of a chromaticity on the daylight locus.</summary>
    internal static (double M1, double M2) ComponentFactors(Chromaticity white)
    {
        double m = 0.0241 + (0.2562 * white.X) - (0.7341 * white.Y);
        return ((-1.3515 - (1.7703 * white.X) + (5.9114 * white.Y)) / m, (0.0300 - (31.4424 * white.X) + (30.0717 * white.Y)) / m);
    }

    /// <summary>S0 + M1 S1 + M2 S2.</summary>
    internal static Spectrum<WattPerNm> FromFactors(double m1Factor, double m2Factor, string source)
    {
        (double[] s0, double[] s1, double[] s2) = Components.Value;
        var samples = new double[WavelengthGrid.Count];
        for (int i = 0; i < samples.Length; i++)
            samples[i] = s0[i] + (m1Factor * s1[i]) + (m2Factor * s2[i]);
        return new(samples, source);
    }
}
