using Colorimetry;

namespace FilmOptics.BeerLambert;

/// <summary>Shares of light that end outside the dots.</summary>
internal readonly record struct LightEnds(double Out, double LostAbove, double LostBelow, double LostInHost)
{
    public double Sum => Out + LostAbove + LostBelow + LostInHost;

    public static LightEnds Of(ReadOnlySpan<double> light, CavityFates fates, ReadOnlySpan<double> hostDepth) => new(
        SpectralSum.Of(light, fates.Out),
        SpectralSum.Of(light, fates.LostAbove),
        SpectralSum.Of(light, fates.LostBelow),
        SpectralSum.Of(light, hostDepth, fates.AbsorbedPerDepth));
}

/// <summary>What comes of the excitations of one lot, before any of its light excites a lot again.</summary>
/// <param name="YieldShare">Photons per excitation.</param>
/// <param name="Ends">Where a photon ends outside the dots.</param>
/// <param name="Above">Photons leaving above per photon, in each bin; null without light.</param>
internal readonly record struct LotEmission(double YieldShare, LightEnds Ends, double[]? Above)
{
    /// <summary>A lot that emits nothing.</summary>
    public static LotEmission None => new(0, default, null);

    /// <summary>Share of the excitations that excites no lot again.</summary>
    public double EndedShare => 1 - YieldShare + (YieldShare * Ends.Sum);

    public static LotEmission Of(ReadOnlySpan<double> light, CavityFates fates, ReadOnlySpan<double> hostDepth, double yieldShare)
    {
        var above = new double[WavelengthGrid.Count];
        for (int i = 0; i < above.Length; i++)
            above[i] = light[i] * fates.Out[i];
        return new(yieldShare, LightEnds.Of(light, fates, hostDepth), above);
    }

    /// <summary>Light of the lot that leaves above.</summary>
    public Spectrum<PhotonPerNm> LightAbove(double excitations, string lotName)
    {
        if (Above is null)
            return Spectrum.Flat<PhotonPerNm>(0, lotName);
        double photons = YieldShare * excitations;
        for (int i = 0; i < Above.Length; i++)
            Above[i] *= photons;
        return Spectrum.FromSamples<PhotonPerNm>(Above, $"{lotName} above, beer-lambert");
    }
}
