using Colorimetry;

namespace FilmOptics.PhotonTracing;

/// <summary>Counts light by its distance from a straight cut edge; the film lies on the side of positive x.</summary>
internal sealed class EdgeTally(int lotCount, double reachMm, int bands) : ILateralTally
{
    /// <summary>Light at [band × bins + bin].</summary>
    public long[] Light { get; } = new long[bands * WavelengthGrid.Count];

    public Tally Fates { get; } = new(lotCount);

    // Light from beyond the reach strays into it as light from within strays out: the lit width is twice the reach.
    public (double X, double Y) Start(ref Xoshiro256 random) => (2 * reachMm * random.NextShare(), 0);

    public bool IsBeyondEdge(double x, double y) => x < 0;

    public void CountAbove(int emitter, int bin, double x, double y)
    {
        int band = (int)(x / reachMm * bands);
        if (band < bands)
            Light[(band * WavelengthGrid.Count) + bin]++;
    }

    public void Add(EdgeTally other)
    {
        Fates.Add(other.Fates);
        for (int i = 0; i < Light.Length; i++)
            Light[i] += other.Light[i];
    }
}
