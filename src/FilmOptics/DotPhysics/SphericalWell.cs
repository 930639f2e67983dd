namespace FilmOptics;

/// <summary>Lowest level of a carrier in a dot of concentric layers, each with its mass and band edge.</summary>
/// <remarks>The radial function and its derivative over the mass are continuous at each face (BenDaniel and Duke, Phys. Rev. 152, 683, 1966).</remarks>
public static class SphericalWell
{
    private const int Steps = 4000;
    private const double MatrixMassFactor = 1;

    /// <summary>A layer of the dot.</summary>
    /// <param name="OuterRadiusNm">Where it ends, nm.</param>
    /// <param name="MassFactor">Effective mass ÷ rest mass.</param>
    /// <param name="EdgeEv">Band edge above the core's, eV; below 0 in a shell that draws the carrier.</param>
    public readonly record struct Region(double OuterRadiusNm, double MassFactor, double EdgeEv);

    /// <summary>Energy of the lowest level above the core's band edge, eV; null where the well is too shallow to hold one.</summary>
    /// <param name="regions">Core first.</param>
    /// <param name="barrierEv">Edge of the matrix outside, eV; infinite for hard walls.</param>
    /// <param name="matrixMassFactor">Mass outside ÷ rest mass; 1 for organic matter and vacuum.</param>
    public static double? GroundStateEv(IReadOnlyList<Region> regions, double barrierEv, double matrixMassFactor = MatrixMassFactor)
    {
        ArgumentNullException.ThrowIfNull(regions);
        double bottom = regions.Min(region => region.EdgeEv);

        // Behind hard walls of the whole dot the level lies below that of its lightest mass over its highest edge.
        double outer = regions[^1].OuterRadiusNm;
        double top = double.IsInfinity(barrierEv)
            ? regions.Max(region => region.EdgeEv) + (EffectiveMass.ConfinementEvNm2 * Math.PI * Math.PI / (regions.Min(region => region.MassFactor) * outer * outer)) + 1e-9
            : barrierEv;
        if (!(top > bottom))
            return null;
        double before = bottom;
        for (int step = 1; step <= Steps; step++)
        {
            // Steps grow with the square: levels of wide dots lie near the bottom.
            double energy = bottom + ((top - bottom) * Math.Pow((double)step / Steps, 2));
            if (Mismatch(regions, barrierEv, matrixMassFactor, energy) < 0)
                return Bisect(regions, barrierEv, matrixMassFactor, before, energy);
            before = energy;
        }

        return null;
    }

    private static double Bisect(IReadOnlyList<Region> regions, double barrierEv, double matrixMassFactor, double low, double high)
    {
        for (int i = 0; i < 200 && high - low > 1e-13; i++)
        {
            double middle = (low + high) / 2;
            (low, high) = Mismatch(regions, barrierEv, matrixMassFactor, middle) < 0 ? (low, middle) : (middle, high);
        }

        return (low + high) / 2;
    }

    // With R(0) = 1 the lowest level is where R'/m + R (κ + 1/r)/m_outside first falls to 0 at the outer face; with hard walls, where R does.
    private static double Mismatch(IReadOnlyList<Region> regions, double barrierEv, double matrixMassFactor, double energyEv)
    {
        double inner = 0, value = 1, flux = 0;
        foreach (var region in regions)
        {
            (value, flux) = Across(region, inner, value, flux, energyEv);
            inner = region.OuterRadiusNm;
        }

        if (double.IsInfinity(barrierEv))
            return value;
        double decay = Math.Sqrt(Math.Max(0, barrierEv - energyEv) * matrixMassFactor / EffectiveMass.ConfinementEvNm2);
        return flux + (value * (decay + (1 / inner)) / matrixMassFactor);
    }

    // u = r R obeys u″ = −k² u in each layer: carried over exactly by sine or hyperbolic sine.
    private static (double Value, double Flux) Across(Region region, double inner, double value, double flux, double energyEv)
    {
        double squared = region.MassFactor * (energyEv - region.EdgeEv) / EffectiveMass.ConfinementEvNm2, way = region.OuterRadiusNm - inner;
        double k = Math.Sqrt(Math.Abs(squared)), x = k * way;
        (double even, double odd, double turned) = x < 1e-8 ? (1, way, 0.0)
            : squared > 0 ? (Math.Cos(x), Math.Sin(x) / k, -k * Math.Sin(x))
            : (Math.Cosh(x), Math.Sinh(x) / k, k * Math.Sinh(x));
        double u = inner * value, slope = inner == 0 ? value : value + (inner * flux * region.MassFactor);
        double uOut = (u * even) + (slope * odd), slopeOut = (u * turned) + (slope * even), r = region.OuterRadiusNm;
        return (uOut / r, ((slopeOut / r) - (uOut / (r * r))) / region.MassFactor);
    }
}
