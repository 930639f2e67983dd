using Colorimetry;

namespace FilmOptics;

/// <summary>Emission that the sample takes back before it leaves, and the yield without that.</summary>
/// <remarks>Source: Ahn, Al-Kaysi, Müller, Wentz and Bardeen, Rev. Sci. Instrum. 78, 086105 (2007); the form from memory, its algebra by the generation series.</remarks>
/// <param name="ReabsorbedShare">Share of emitted photons that is re-absorbed.</param>
/// <param name="TailFromNm">Where the red tails are taken as equal from, nm.</param>
/// <param name="YieldShare">The yield corrected for it.</param>
/// <param name="YieldUncertaintyShare">Its standard uncertainty: that of the observed yield and of the tail's scale.</param>
public sealed record SelfAbsorption(double ReabsorbedShare, double TailFromNm, double YieldShare, double YieldUncertaintyShare)
{
    private const double HalfWidthsBehindPeak = 1.5;

    /// <summary>The yield without re-absorption: q = q_obs/(1 − s + s q_obs).</summary>
    /// <param name="observedShare">Yield as observed.</param>
    /// <param name="reabsorbedShare">s, 0 to 1.</param>
    public static double Corrected(double observedShare, double reabsorbedShare) =>
        observedShare / (1 - reabsorbedShare + (reabsorbedShare * observedShare));

    /// <summary>The way back: the yield that is observed when a share is re-absorbed.</summary>
    /// <param name="yieldShare">Yield without re-absorption.</param>
    /// <param name="reabsorbedShare">s, 0 to 1.</param>
    public static double Observed(double yieldShare, double reabsorbedShare) =>
        yieldShare * (1 - reabsorbedShare) / (1 - (reabsorbedShare * yieldShare));

    internal static SelfAbsorption? Of(SphereMeasurement measurement, double absorptance, double yieldShare, double uncertaintyShare)
    {
        if (measurement.Dilute is not { } dilute)
            return null;
        var window = measurement.Emission;
        double from = measurement.TailFromNm ?? TailOf(dilute, window);
        if (!(from > window.LowNm && from < window.HighNm))
        {
            throw new InputException(new InputFault(dilute.Name, null, null, FormattableString.Invariant(
                $"the red tail would begin at {from:0.#} nm; it has to lie within the emission window, {window.LowNm} to {window.HighNm} nm.")));
        }

        WavelengthWindow tail = new(from, window.HighNm);
        double Sample(WavelengthWindow part) => measurement.InBeam.Sum(part).Photons - measurement.Empty.Sum(part).Photons
            - (measurement.Beside is { } beside ? (1 - absorptance) * (beside.Sum(part).Photons - measurement.Empty.Sum(part).Photons) : 0);
        MeasuredSum whole = dilute.Sum(window), reference = dilute.Sum(tail);
        double inTail = Sample(tail), scale = inTail / reference.Photons;
        if (!(inTail > 0) || !(reference.Photons > 0))
            throw new InputException(new InputFault(dilute.Name, null, null, FormattableString.Invariant($"there is no emission behind {from:0.#} nm to scale by.")));
        double s = 1 - (Sample(window) / (scale * whole.Photons));

        // The scale carries the noise of both tails; dq/ds = q_obs (1 − q_obs)/(1 − s + s q_obs)², dq/dq_obs = (1 − s)/(…)².
        double noise = Math.Sqrt(
            Math.Pow(reference.UncertaintyPhotons / reference.Photons, 2)
            + Math.Pow(measurement.InBeam.Sum(tail).UncertaintyPhotons / inTail, 2));
        double divisor = Math.Pow(1 - s + (s * yieldShare), 2);
        double u = Math.Sqrt(
            Math.Pow((1 - s) / divisor * uncertaintyShare, 2)
            + Math.Pow(yieldShare * (1 - yieldShare) / divisor * (1 - s) * noise, 2));
        return new(s, from, Corrected(yieldShare, s), u);
    }

    private static double TailOf(SphereScan dilute, WavelengthWindow window)
    {
        var wavelengths = dilute.WavelengthsNm;
        var photons = dilute.PhotonsPerNm;
        int peak = -1;
        for (int i = 0; i < photons.Length; i++)
        {
            if (wavelengths[i] >= window.LowNm && wavelengths[i] <= window.HighNm && (peak < 0 || photons[i] > photons[peak]))
                peak = i;
        }

        int half = peak;
        while (half >= 0 && half + 1 < photons.Length && photons[half] > photons[peak] / 2)
            half++;
        return peak < 0 ? double.NaN : wavelengths[peak] + (HalfWidthsBehindPeak * (wavelengths[half] - wavelengths[peak]));
    }
}
