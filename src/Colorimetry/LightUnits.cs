namespace Colorimetry;

/// <summary>Conversion between light counted in photons and light measured in watts.</summary>
public static class LightUnits
{
    /// <summary>Photons per joule-scaled sample: each sample divided by the photon's energy.</summary>
    /// <param name="power">Light in W/nm; the result is in photons per second and nm for absolute watts.</param>
    public static Spectrum<PhotonPerNm> ToPhotons(this Spectrum<WattPerNm> power)
    {
        ArgumentNullException.ThrowIfNull(power);
        return Reweighted<PhotonPerNm>(power.Samples, nm => 1 / PhysicalConstants.PhotonEnergyJoule(nm), power.Source);
    }

    /// <summary>Power: each sample times the photon's energy.</summary>
    /// <param name="photons">Light in photons per nm.</param>
    public static Spectrum<WattPerNm> ToPower(this Spectrum<PhotonPerNm> photons)
    {
        ArgumentNullException.ThrowIfNull(photons);
        return Reweighted<WattPerNm>(photons.Samples, nm => PhysicalConstants.PhotonEnergyJoule(nm), photons.Source);
    }

    private static Spectrum<TUnit> Reweighted<TUnit>(ReadOnlySpan<double> samples, Func<double, double> weight, string source)
        where TUnit : struct, ISpectralUnit
    {
        var result = new double[samples.Length];
        for (int i = 0; i < result.Length; i++)
            result[i] = samples[i] * weight(WavelengthGrid.NmAt(i));
        return new(result, source);
    }
}
