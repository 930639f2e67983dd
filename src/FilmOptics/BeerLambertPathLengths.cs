namespace FilmOptics;

/// <summary>Mean path through the layer per thickness, as the quick model uses it.</summary>
/// <param name="PumpFactor">Source light, at least 1.</param>
/// <param name="EmissionFactor">Emitted light, at least 1.</param>
internal readonly record struct BeerLambertPathLengths(double PumpFactor, double EmissionFactor)
{
    private const int AngleSteps = 360;

    /// <summary>The film file's figures, or those of a clear film.</summary>
    public static BeerLambertPathLengths Of(Film film)
    {
        double index = film.Layers.Sum(l => l.RefractiveIndex * l.ThicknessMm) / film.Layers.Sum(l => l.ThicknessMm);
        double pump = film.BeerLambertPaths?.PumpPathFactor ?? film.Backlight.Incidence switch
        {
            { Kind: IncidenceKind.Normal } => 1,
            { Kind: IncidenceKind.Profile, RadianceByAngle: { } radiance } => OfProfile(radiance, index),
            _ => LambertianFactor(index),
        };
        return new(pump, film.BeerLambertPaths?.EmissionPathFactor ?? LambertianFactor(index));
    }

    /// <summary>Mean path of Lambertian light refracted into a clear slab: 2n²(1 − √(1 − 1/n²)), cosine-weighted in air.</summary>
    /// <param name="refractiveIndexFactor">Refractive index, at least 1.</param>
    public static double LambertianFactor(double refractiveIndexFactor)
    {
        double n2 = refractiveIndexFactor * refractiveIndexFactor;
        return 2 * n2 * (1 - Math.Sqrt(1 - (1 / n2)));
    }

    private static double OfProfile(AngleTable radiance, double index)
    {
        double flux = 0, path = 0;
        for (int i = 0; i < AngleSteps; i++)
        {
            double angle = (i + 0.5) * Math.PI / 2 / AngleSteps;
            double weight = radiance.At(Math.Cos(angle)) * Math.Sin(2 * angle);
            double sine = Math.Sin(angle) / index;
            flux += weight;
            path += weight / Math.Sqrt(1 - (sine * sine));
        }

        return flux > 0
            ? path / flux
            : throw new NumericalFailureException($"{radiance.Source}: the angular profile carries no light.");
    }
}
