namespace FilmOptics.PhotonTracing;

/// <summary>Draws the cosine, in air, at which a source photon reaches the film.</summary>
internal sealed class IncidenceSampler
{
    private const int Rings = 4096;
    private readonly IncidenceKind _kind;
    private readonly AliasTable? _rings;

    public IncidenceSampler(Incidence incidence)
    {
        _kind = incidence.Kind;
        if (_kind != IncidenceKind.Profile)
            return;
        var radiance = incidence.RadianceByAngle
            ?? throw new ArgumentException("A profile needs its table of radiance by angle.", nameof(incidence));
        var flux = new double[Rings];
        for (int i = 0; i < Rings; i++)
            flux[i] = radiance.At(Math.Cos(RingAngle(i + 0.5))) * (SinSquared(i + 1) - SinSquared(i));
        _rings = flux.Sum() > 0
            ? new AliasTable(flux)
            : throw new ArgumentException($"{radiance.Source}: no light within 0 to 90 degrees.", nameof(incidence));
    }

    /// <summary>Cosine of the polar angle in air, above 0.</summary>
    public double DrawCosine(ref Xoshiro256 random)
    {
        switch (_kind)
        {
            case IncidenceKind.Normal:
                return 1;
            case IncidenceKind.Lambertian:
                return LambertianCosine(random.NextShare());
            default:
                // Flux through a ring is radiance × sin θ cos θ dθ: even in sin²θ inside a ring so narrow.
                int ring = _rings!.Draw(random.NextShare());
                double sinSquared = SinSquared(ring) + (random.NextShare() * (SinSquared(ring + 1) - SinSquared(ring)));
                return Math.Sqrt(1 - sinSquared);
        }
    }

    /// <summary>Cosine of light of equal radiance on a plane: density 2 μ.</summary>
    public static double LambertianCosine(double share) => Math.Sqrt(share);

    private static double RingAngle(double ring) => ring * (Math.PI / 2 / Rings);

    private static double SinSquared(double ring) => Math.Pow(Math.Sin(RingAngle(ring)), 2);
}
