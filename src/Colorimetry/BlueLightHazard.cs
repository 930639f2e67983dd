namespace Colorimetry;

/// <summary>The blue-light hazard of the eye: how much light of each wavelength counts.</summary>
/// <remarks>
/// Source: IEC 62471:2006 and ICNIRP 2013: a table every 5 nm from 380 to 500 nm, joined by straight lines; 10^((450 − λ)/50) to 600 nm;
/// 0.001 to 700 nm. Here 0 outside 380 to 700 nm. A weighted figure is no classification: that needs a calibrated measurement.
/// </remarks>
public static class BlueLightHazard
{
    private static readonly Lazy<Spectrum<Fraction>> LazyWeighting = new(Weigh);

    /// <summary>B(λ), 0…1.</summary>
    public static Spectrum<Fraction> Weighting => LazyWeighting.Value;

    /// <summary>Weighted watts per lumen: K_B,v of IEC TR 62778. Typical of daylight: 0.001.</summary>
    /// <param name="light">Any light; its scale does not matter.</param>
    /// <returns>W/lm; null for light without lumens.</returns>
    public static double? WattPerLumen(Spectrum<WattPerNm> light)
    {
        ArgumentNullException.ThrowIfNull(light);
        double lumens = Tristimulus.Of(light, StandardObserver.Cie1931).Y;
        return lumens > 0 ? (light * Weighting).Integral / lumens : null;
    }

    private static Spectrum<Fraction> Weigh()
    {
        var table = PublishedTables.Read("hazard/blue-light-hazard.csv");
        double[] nm = table.WavelengthsNm.ToArray(), weights = table.Values("weight").ToArray();
        return Spectrum.Sampled<Fraction>(At, "blue-light hazard B(λ), IEC 62471");

        double At(double wavelengthNm)
        {
            if (wavelengthNm < nm[0] || wavelengthNm > 700)
                return 0;
            if (wavelengthNm > 600)
                return 0.001;
            if (wavelengthNm >= nm[^1])
                return Math.Pow(10, (450 - wavelengthNm) / 50);
            int i = Array.FindLastIndex(nm, n => n <= wavelengthNm);
            return weights[i] + ((wavelengthNm - nm[i]) / (nm[i + 1] - nm[i]) * (weights[i + 1] - weights[i]));
        }
    }
}
