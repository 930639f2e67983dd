namespace FilmOptics.PhotonTracing;

/// <summary>The Henyey–Greenstein phase function, drawn by inverting its cumulative.</summary>
/// <remarks>
/// Source: L. G. Henyey, J. L. Greenstein, Astrophys. J. 93 (1941) 70. Rearranged here for 1 − cos θ, which needs no
/// division by g and loses no digit near g = 0 or straight ahead: 1 − cos θ = (1 − g)² (1 − u)(1 + g + d)/d², d = 1 − g + 2 g u.
/// </remarks>
internal static class HenyeyGreenstein
{
    /// <summary>1 − cosine of the scattering angle, 0…2.</summary>
    public static double DrawVersine(double meanCosine, double share)
    {
        double denominator = 1 - meanCosine + (2 * meanCosine * share);
        double ratio = (1 - meanCosine) / denominator;
        return Math.Min(2, ratio * ratio * (1 - share) * (1 + meanCosine + denominator));
    }
}
