using Colorimetry;

namespace FilmReports.Safety;

/// <summary>Blue-light figures of a display's white. They are no classification.</summary>
/// <param name="ShortBlueShare">Power in 415–455 nm over power in 400–500 nm (display-trade practice, from memory: below 0.5 is asked for).</param>
/// <param name="HazardWattPerLumen">B(λ)-weighted power per lumen, W/lm (the K_B,v of IEC TR 62778).</param>
public sealed record BlueLight(double? ShortBlueShare, double? HazardWattPerLumen)
{
    private static readonly Lazy<(double[] Nm, double[] Weight)> Table = new(ReadTable);

    /// <summary>The figures of a light.</summary>
    /// <param name="light">W/nm; its scale does not matter.</param>
    /// <returns>Null where there is no blue, or no visible light, to divide by.</returns>
    public static BlueLight Of(Spectrum<WattPerNm> light)
    {
        ArgumentNullException.ThrowIfNull(light);
        double blue = Band(light, 400, 500), hazard = 0;
        for (int i = 0; i < WavelengthGrid.Count; i++)
            hazard += light.Samples[i] * Weight(WavelengthGrid.NmAt(i));
        double lumens = Tristimulus.Of(light, StandardObserver.Cie1931).Y;
        return new(blue > 0 ? Band(light, 415, 455) / blue : null, lumens > 0 ? hazard / lumens : null);
    }

    /// <summary>B(λ): 5 nm table with straight lines up to 500 nm, 10^((450 − λ)/50) to 600 nm, 0.001 to 700 nm (IEC 62471:2006).</summary>
    /// <param name="wavelengthNm">Wavelength, nm. Outside 380 to 700 nm the weight is 0.</param>
    public static double Weight(double wavelengthNm)
    {
        if (wavelengthNm is < 380 or > 700)
            return 0;
        if (wavelengthNm > 600)
            return 0.001;
        if (wavelengthNm > 500)
            return Math.Pow(10, (450 - wavelengthNm) / 50);
        var (nm, weight) = Table.Value;
        int i = Math.Min((int)((wavelengthNm - nm[0]) / 5), nm.Length - 2);
        double share = (wavelengthNm - nm[i]) / 5;
        return weight[i] + (share * (weight[i + 1] - weight[i]));
    }

    // Trapezoid at 1 nm: end points weigh half. Counting both ends whole would overstate the short band by two to four parts in a hundred.
    private static double Band(Spectrum<WattPerNm> light, int fromNm, int toNm)
    {
        double sum = (light[fromNm] + light[toNm]) / 2;
        for (int nm = fromNm + 1; nm < toNm; nm++)
            sum += light[nm];
        return sum;
    }

    private static (double[] Nm, double[] Weight) ReadTable()
    {
        const string Name = "hazard/blue-light-hazard.csv";
        using var stream = typeof(BlueLight).Assembly.GetManifestResourceStream(Name)
            ?? throw new InvalidOperationException($"{Name} was not built in.");
        var table = SpectrumFile.Read(stream, Name);
        return (table.WavelengthsNm.ToArray(), table.Values("weight").ToArray());
    }
}
