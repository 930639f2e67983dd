using Colorimetry;

namespace FilmOptics.BeerLambert;

/// <summary>Mean path of light through a layer per thickness, one crossing, without reflections at the faces.</summary>
internal static class PathFactors
{
    private const int Steps = 180;

    /// <summary>Lambertian light that enters from air: 2n²(1 − √(1 − 1/n²)); 2 in air, 1.146 at n = 1.5, 1 for a very high index.</summary>
    /// <remarks>Source: ∫ 2μ dμ/μ′ over the air cosine μ, with Snell's law for μ′; written without the difference of near-equal numbers.</remarks>
    public static double Lambertian(double refractiveIndex) => 2 / (1 + Math.Sqrt(1 - (1 / (refractiveIndex * refractiveIndex))));

    /// <summary>Source light: by its incidence.</summary>
    public static double OfSource(Incidence incidence, double refractiveIndex) => incidence.Kind switch
    {
        IncidenceKind.Normal => 1,
        IncidenceKind.Lambertian => Lambertian(refractiveIndex),
        _ => OfProfile(incidence.RadianceByAngle!, refractiveIndex),
    };

    private static double OfProfile(AngleTable radiance, double refractiveIndex)
    {
        double path = 0, flux = 0;
        for (int i = 0; i < Steps; i++)
        {
            double angle = (i + 0.5) * Math.PI / 2 / Steps, sine = Math.Sin(angle), cosine = Math.Cos(angle);
            double arriving = radiance.At(cosine) * sine * cosine;
            flux += arriving;
            path += arriving / Math.Sqrt(1 - (sine * sine / (refractiveIndex * refractiveIndex)));
        }

        return flux > 0
            ? path / flux
            : throw new InputException(new InputFault("backlight.incidence", null, null, $"{radiance.Source}: the radiance is 0 at every angle."));
    }
}
