using Colorimetry;

namespace FilmOptics.PhotonTracing;

/// <summary>Counts where light comes out by its distance from where it went in.</summary>
internal sealed class RingTally(int lotCount) : ILateralTally
{
    /// <summary>Rings per factor of ten in radius.</summary>
    private const int PerDecade = 40;

    private const int Decades = 7;

    /// <summary>Inner disc, rings, and all that lies beyond.</summary>
    public const int Rings = (PerDecade * Decades) + 2;

    /// <summary>Radius of the inner disc, mm.</summary>
    private const double InnermostMm = 1e-4;

    /// <summary>Light of all emitters at [ring × bins + bin].</summary>
    public long[] Light { get; } = new long[Rings * WavelengthGrid.Count];

    /// <summary>Photons at [emitter × rings + ring].</summary>
    public long[] ByEmitter { get; } = new long[(lotCount + 1) * Rings];

    public Tally Fates { get; } = new(lotCount);

    /// <summary>Inner and outer radius of a ring, mm. The last has no end; its outer radius stands for one ring more.</summary>
    public static (double InnerMm, double OuterMm) Radii(int ring) => (
        ring == 0 ? 0 : InnermostMm * Math.Pow(10, (ring - 1.0) / PerDecade),
        InnermostMm * Math.Pow(10, (double)ring / PerDecade));

    public (double X, double Y) Start(ref Xoshiro256 random) => (0, 0);

    public bool IsBeyondEdge(double x, double y) => false;

    public void CountAbove(int emitter, int bin, double x, double y)
    {
        double square = (x * x) + (y * y);
        int ring = square < InnermostMm * InnermostMm
            ? 0
            : Math.Min(Rings - 1, 1 + (int)(PerDecade * 0.5 * Math.Log10(square / (InnermostMm * InnermostMm))));
        Light[(ring * WavelengthGrid.Count) + bin]++;
        ByEmitter[(emitter * Rings) + ring]++;
    }

    public void Add(RingTally other)
    {
        Fates.Add(other.Fates);
        for (int i = 0; i < Light.Length; i++)
            Light[i] += other.Light[i];
        for (int i = 0; i < ByEmitter.Length; i++)
            ByEmitter[i] += other.ByEmitter[i];
    }
}
