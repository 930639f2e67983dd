namespace Colorimetry;

/// <summary>The illuminants that the program ships, as relative spectral power (100 at 560 nm).</summary>
/// <remarks>
/// Source: CIE 15:2018, ISO/CIE 11664-2:2022. A is tabulated every 1 nm. D65 and D50 are tabulated every 5 nm; daylight is linear
/// between its rows by definition (ISO/CIE 11664-2), unlike other spectra, so that the published 1 nm rows come out to their digits.
/// </remarks>
public static class StandardIlluminant
{
    private static readonly Lazy<Spectrum<WattPerNm>> LazyA = new(() => Load("a", "CIE standard illuminant A"));
    private static readonly Lazy<Spectrum<WattPerNm>> LazyD65 = new(() => Load("d65", "CIE standard illuminant D65"));
    private static readonly Lazy<Spectrum<WattPerNm>> LazyD50 = new(() => Load("d50", "CIE illuminant D50"));
    private static readonly Lazy<Spectrum<WattPerNm>> LazyE = new(() => Load("e", "equal-energy illuminant E"));

    /// <summary>Incandescent light, a Planckian radiator of 2856 K.</summary>
    public static Spectrum<WattPerNm> A => LazyA.Value;

    /// <summary>Daylight of about 6504 K.</summary>
    public static Spectrum<WattPerNm> D65 => LazyD65.Value;

    /// <summary>Daylight of about 5003 K.</summary>
    public static Spectrum<WattPerNm> D50 => LazyD50.Value;

    /// <summary>Equal power at every wavelength.</summary>
    public static Spectrum<WattPerNm> E => LazyE.Value;

    private static Spectrum<WattPerNm> Load(string file, string source)
    {
        SpectrumTable table = PublishedTables.Read($"illuminants/{file}.csv");
        return new(Linear(table, "power_per_nm"), source);
    }

    /// <summary>A column of a table that spans the grid, on the grid, linear between its rows.</summary>
    internal static double[] Linear(SpectrumTable table, string column)
    {
        ReadOnlySpan<double> nm = table.WavelengthsNm, values = table.Values(column);
        var samples = new double[WavelengthGrid.Count];
        int row = 0;
        for (int i = 0; i < samples.Length; i++)
        {
            double wavelengthNm = WavelengthGrid.NmAt(i);
            while (row < nm.Length - 2 && nm[row + 1] <= wavelengthNm)
                row++;
            samples[i] = values[row] + ((values[row + 1] - values[row]) * (wavelengthNm - nm[row]) / (nm[row + 1] - nm[row]));
        }

        return samples;
    }
}
