using Colorimetry;

namespace FilmOptics;

/// <summary>Scans of an integrating sphere and how they are to be read.</summary>
public sealed record SphereMeasurement
{
    /// <summary>The empty sphere.</summary>
    public required SphereScan Empty { get; init; }

    /// <summary>The sample in the sphere, beside the beam; null for the two-measurement form.</summary>
    public SphereScan? Beside { get; init; }

    /// <summary>The sample in the beam.</summary>
    public required SphereScan InBeam { get; init; }

    /// <summary>Window of the exciting light.</summary>
    public required WavelengthWindow Pump { get; init; }

    /// <summary>Window of the emission; it begins behind the pump's.</summary>
    public required WavelengthWindow Emission { get; init; }

    /// <summary>Relative standard uncertainty of the response between the two windows.</summary>
    public double ResponseUncertaintyShare { get; init; }

    /// <summary>Emission of a sample so dilute that it does not absorb itself; null where that is not corrected for.</summary>
    public SphereScan? Dilute { get; init; }

    /// <summary>From here to the end of the emission window nothing is re-absorbed, nm; null puts it 1.5 half-widths behind the dilute peak.</summary>
    public double? TailFromNm { get; init; }
}

/// <summary>What a sphere measurement gives.</summary>
/// <param name="Method">Which form: three or two measurements.</param>
/// <param name="YieldShare">Photons emitted per photon absorbed, as observed.</param>
/// <param name="YieldUncertaintyShare">Its standard uncertainty.</param>
/// <param name="AbsorptanceShare">Share of the beam that the sample absorbs.</param>
/// <param name="AbsorptanceUncertaintyShare">Its standard uncertainty.</param>
/// <param name="SelfAbsorption">Correction for re-absorbed emission; null without a dilute reference.</param>
/// <param name="Warnings">What makes the figures doubtful.</param>
public sealed record SphereYield(
    string Method,
    double YieldShare,
    double YieldUncertaintyShare,
    double AbsorptanceShare,
    double AbsorptanceUncertaintyShare,
    SelfAbsorption? SelfAbsorption,
    IReadOnlyList<string> Warnings)
{
    // Common practice, no source for the limits; that small and noisy absorptance biases the ratio: van Dam et al., arXiv 1711.06200 and 1808.00779.
    private const double SmallAbsorptanceShare = 0.1, NoisyAbsorptanceShare = 0.1;

    /// <summary>The yield to go on with: corrected for self-absorption where that is known.</summary>
    public double BestYieldShare => SelfAbsorption?.YieldShare ?? YieldShare;

    /// <summary>Its standard uncertainty.</summary>
    public double BestUncertaintyShare => SelfAbsorption?.YieldUncertaintyShare ?? YieldUncertaintyShare;

    /// <summary>Evaluates a measurement: de Mello, Wittmann and Friend, Adv. Mater. 9, 230 (1997); with two scans the form that Leyre et al.,
    /// Rev. Sci. Instrum. 85, 123115 (2014), confirm.</summary>
    /// <remarks>What the empty sphere shows in the emission window is stray light and is taken off every scan.</remarks>
    /// <exception cref="InputException">The sample absorbs nothing, or the windows overlap.</exception>
    public static SphereYield Of(SphereMeasurement measurement)
    {
        ArgumentNullException.ThrowIfNull(measurement);
        if (!(measurement.Emission.LowNm >= measurement.Pump.HighNm))
        {
            throw new InputException(new InputFault("emission window", null, null, FormattableString.Invariant(
                $"begins at {measurement.Emission.LowNm} nm; it has to begin behind the pump window, which ends at {measurement.Pump.HighNm} nm.")));
        }

        MeasuredSum la = measurement.Empty.Sum(measurement.Pump), lc = measurement.InBeam.Sum(measurement.Pump);
        MeasuredSum pa = measurement.Empty.Sum(measurement.Emission), pc = measurement.InBeam.Sum(measurement.Emission);
        List<string> warnings = [];
        SphereYield result;
        if (measurement.Beside is { } beside)
            result = Three(la, beside.Sum(measurement.Pump), lc, pa, beside.Sum(measurement.Emission), pc, measurement, warnings);
        else
            result = Two(la, lc, pa, pc, measurement, warnings);
        if (result.AbsorptanceShare < SmallAbsorptanceShare || result.AbsorptanceUncertaintyShare > NoisyAbsorptanceShare * result.AbsorptanceShare)
        {
            warnings.Add(FormattableString.Invariant(
                $"The sample absorbs {100 * result.AbsorptanceShare:0.#} ± {100 * result.AbsorptanceUncertaintyShare:0.#} % of the beam: with so little the ratio is biased low. Use a sample that absorbs more than 10 %, or average more scans."));
        }

        if (result.BestYieldShare > 1)
            warnings.Add(FormattableString.Invariant($"A yield of {result.BestYieldShare:0.000} is above 1: check the response of sphere and detector and the windows."));
        return result;
    }

    private static SphereYield Three(
        MeasuredSum la, MeasuredSum lb, MeasuredSum lc, MeasuredSum pa, MeasuredSum pb, MeasuredSum pc, SphereMeasurement measurement, List<string> warnings)
    {
        double a = 1 - (lc.Photons / lb.Photons);
        RequireAbsorption(a, measurement.InBeam.Name, measurement.Beside!.Name);
        double emittedB = pb.Photons - pa.Photons, emittedC = pc.Photons - pa.Photons;
        double absorbed = la.Photons * a;
        double q = (emittedC - ((1 - a) * emittedB)) / absorbed;

        // q = (P_c − P_a − (1 − A)(P_b − P_a))/(L_a A): first derivatives by every sum; A itself depends on L_b and L_c.
        double byA = (emittedB - (q * la.Photons)) / absorbed;
        double aByLc = -1 / lb.Photons, aByLb = lc.Photons / (lb.Photons * lb.Photons);
        double u = Root(
            pc.UncertaintyPhotons / absorbed,
            (1 - a) * pb.UncertaintyPhotons / absorbed,
            a * pa.UncertaintyPhotons / absorbed,
            q / la.Photons * la.UncertaintyPhotons,
            byA * aByLc * lc.UncertaintyPhotons,
            byA * aByLb * lb.UncertaintyPhotons,
            q * measurement.ResponseUncertaintyShare);
        double uA = Root(aByLc * lc.UncertaintyPhotons, aByLb * lb.UncertaintyPhotons);
        return new("three measurements", q, u, a, uA, SelfAbsorption.Of(measurement, a, q, u), warnings);
    }

    private static SphereYield Two(MeasuredSum la, MeasuredSum lc, MeasuredSum pa, MeasuredSum pc, SphereMeasurement measurement, List<string> warnings)
    {
        double absorbed = la.Photons - lc.Photons, a = absorbed / la.Photons;
        RequireAbsorption(a, measurement.InBeam.Name, measurement.Empty.Name);
        double q = (pc.Photons - pa.Photons) / absorbed;
        double u = Root(
            pc.UncertaintyPhotons / absorbed,
            pa.UncertaintyPhotons / absorbed,
            q / absorbed * la.UncertaintyPhotons,
            q / absorbed * lc.UncertaintyPhotons,
            q * measurement.ResponseUncertaintyShare);
        double uA = Root(lc.UncertaintyPhotons / la.Photons, lc.Photons / (la.Photons * la.Photons) * la.UncertaintyPhotons);
        warnings.Add("Two scans: what the sphere's diffuse light excites counts as the beam's, so the absorptance is that of beam and sphere together.");
        return new("two measurements", q, u, a, uA, SelfAbsorption.Of(measurement, a, q, u), warnings);
    }

    private static void RequireAbsorption(double absorptance, string inBeam, string reference)
    {
        if (!(absorptance > 0))
        {
            throw new InputException(new InputFault(inBeam, null, null, FormattableString.Invariant(
                $"the sample absorbs {100 * absorptance:0.###} % of the pump light against {reference}; it has to absorb some. Check which scan is which, and the pump window.")));
        }
    }

    private static double Root(params ReadOnlySpan<double> terms)
    {
        double sum = 0;
        foreach (double term in terms)
            sum += term * term;
        return Math.Sqrt(sum);
    }
}
