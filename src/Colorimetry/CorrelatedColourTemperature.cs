namespace Colorimetry;

/// <summary>Correlated colour temperature and Duv: the true nearest point of the Planckian locus in CIE 1960 uv.</summary>
/// <remarks>Source: definition of CIE 15:2018. Valid for the CIE 1931 observer, whatever observer a colour was computed with.</remarks>
public static class CorrelatedColourTemperature
{
    /// <summary>Lowest temperature answered, K.</summary>
    public const double MinKelvin = 1000;

    /// <summary>Highest temperature answered, K.</summary>
    public const double MaxKelvin = 25000;

    /// <summary>Largest |Duv| at which CIE 15:2018 lets the quantity be used.</summary>
    public const double MaxDuv = 0.05;

    // A black body of exactly 1000 or 25 000 K must come back as such through rounding.
    private const double LimitSlackShare = 1e-6;
    private const double FirstMired = 33, LastMired = 1008, StepMired = 3;

    private static readonly Lazy<(double Mired, double U, double V)[]> Coarse = new(() =>
    [
        .. Enumerable.Range(0, (int)((LastMired - FirstMired) / StepMired) + 1).Select(i =>
        {
            double mired = FirstMired + (i * StepMired);
            var (u, v, _, _) = PlanckianLocus.TangentAt(mired);
            return (mired, u, v);
        }),
    ]);

    /// <summary>Temperature and signed distance from the locus, above it positive.</summary>
    /// <param name="chromaticity">Any chromaticity.</param>
    /// <returns>Kelvin and Duv; null where the nearest point lies outside 1000 to 25 000 K or |Duv| exceeds 0.05.</returns>
    public static (double Kelvin, double Duv)? Of(Chromaticity chromaticity)
    {
        double u = chromaticity.UPrime, v = chromaticity.V1960;
        if (!double.IsFinite(u) || !double.IsFinite(v))
            return null;
        var coarse = Coarse.Value;
        int nearest = 0;
        for (int i = 1; i < coarse.Length; i++)
        {
            if (Squared(u - coarse[i].U, v - coarse[i].V) < Squared(u - coarse[nearest].U, v - coarse[nearest].V))
                nearest = i;
        }

        if (nearest == 0 || nearest == coarse.Length - 1)
            return null;
        double mired = FootOfPerpendicular(u, v, coarse[nearest - 1].Mired, coarse[nearest + 1].Mired);
        double kelvin = 1e6 / mired;
        if (kelvin < MinKelvin * (1 - LimitSlackShare) || kelvin > MaxKelvin * (1 + LimitSlackShare))
            return null;
        var (u0, v0, _, _) = PlanckianLocus.TangentAt(mired);
        double duv = Math.CopySign(Math.Sqrt(Squared(u - u0, v - v0)), v - v0);
        return Math.Abs(duv) <= MaxDuv ? (kelvin, duv) : null;
    }

    /// <summary>The chromaticity at a temperature and a distance from the locus along its normal in CIE 1960 uv.</summary>
    /// <param name="kelvin">1000 to 25 000 K.</param>
    /// <param name="duv">Signed distance, above the locus positive.</param>
    public static Chromaticity ChromaticityAt(double kelvin, double duv)
    {
        if (!(kelvin is >= MinKelvin and <= MaxKelvin))
            throw new ArgumentOutOfRangeException(nameof(kelvin), kelvin, $"{MinKelvin} to {MaxKelvin} K are allowed.");
        var (u, v, du, dv) = PlanckianLocus.TangentAt(1e6 / kelvin);
        double length = Math.Sqrt(Squared(du, dv));
        // The locus runs towards larger u with rising mired, so (−dv, du) points above it.
        return Chromaticity.FromUvPrime(u - (duv * dv / length), 1.5 * (v + (duv * du / length)));
    }

    // The projection on the tangent falls through 0 at the nearest point. Bisection keeps the bracket, the secant makes it quick.
    private static double FootOfPerpendicular(double u, double v, double low, double high)
    {
        double atLow = Projection(u, v, low), atHigh = Projection(u, v, high);
        for (int i = 0; i < 60 && high - low > 1e-9; i++)
        {
            double middle = i % 3 == 2 ? (low + high) / 2 : low + ((high - low) * atLow / (atLow - atHigh));
            if (!(middle > low && middle < high))
                middle = (low + high) / 2;
            double at = Projection(u, v, middle);
            if (at == 0)
                return middle;
            if (at > 0)
                (low, atLow) = (middle, at);
            else
                (high, atHigh) = (middle, at);
        }

        return (low + high) / 2;
    }

    private static double Projection(double u, double v, double mired)
    {
        var (u0, v0, du, dv) = PlanckianLocus.TangentAt(mired);
        return ((u - u0) * du) + ((v - v0) * dv);
    }

    private static double Squared(double a, double b) => (a * a) + (b * b);
}
