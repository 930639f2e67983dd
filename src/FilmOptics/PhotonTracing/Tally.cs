using Colorimetry;

namespace FilmOptics.PhotonTracing;

/// <summary>What traced photons ended as. Whole numbers only: sums do not depend on the order in which threads add them.</summary>
internal sealed class Tally(int lotCount)
{
    /// <summary>Photons traced to their end.</summary>
    public long Photons { get; private set; }

    /// <summary>Scatterings, absorptions and faces met: the work done.</summary>
    public long Interactions { get; set; }

    /// <summary>Left above, at [emitter × bins + bin]; emitter 0 is the source, 1 + i lot i.</summary>
    public long[] Above { get; } = new long[(lotCount + 1) * WavelengthGrid.Count];

    public long LostBelow { get; set; }

    public long LostAbove { get; set; }

    public long LostInHost { get; set; }

    public long LostAtEdges { get; set; }

    public long[] LostInLots { get; } = new long[lotCount];

    public long[] SourceAbsorbedBy { get; } = new long[lotCount];

    public long[] Excitations { get; } = new long[lotCount];

    /// <summary>Sum over photons of the square of each one's excitations of a lot: their spread.</summary>
    public long[] SquaredExcitations { get; } = new long[lotCount];

    /// <summary>Photons that left above within <see cref="NarrowCosine"/> of the normal.</summary>
    public long NarrowAbove { get; set; }

    /// <summary>Air cosine from which light counts as <see cref="NarrowAbove"/>; above 1 nothing does.</summary>
    public double NarrowCosine { get; init; } = 2;

    public void CountAbove(int emitter, int bin, double airCosine)
    {
        Above[(emitter * WavelengthGrid.Count) + bin]++;
        if (airCosine >= NarrowCosine)
            NarrowAbove++;
    }

    /// <param name="lot">Which lot was excited.</param>
    /// <param name="emitter">By whose light: 0 is the source.</param>
    /// <param name="earlierByThisPhoton">Excitations of this lot that the same source photon caused before.</param>
    public void CountExcitation(int lot, int emitter, int earlierByThisPhoton)
    {
        if (emitter == 0)
            SourceAbsorbedBy[lot]++;
        Excitations[lot]++;
        SquaredExcitations[lot] += (2L * earlierByThisPhoton) + 1;
    }

    public void EndBlock(int photons) => Photons += photons;

    public void Add(Tally other)
    {
        Photons += other.Photons;
        Interactions += other.Interactions;
        AddTo(Above, other.Above);
        LostBelow += other.LostBelow;
        LostAbove += other.LostAbove;
        LostInHost += other.LostInHost;
        LostAtEdges += other.LostAtEdges;
        AddTo(LostInLots, other.LostInLots);
        AddTo(SourceAbsorbedBy, other.SourceAbsorbedBy);
        AddTo(Excitations, other.Excitations);
        AddTo(SquaredExcitations, other.SquaredExcitations);
        NarrowAbove += other.NarrowAbove;
    }

    /// <summary>Photons of every fate: equal to <see cref="Photons"/>, or the tracer lost or made one.</summary>
    public long Fates => Above.Sum() + LostBelow + LostAbove + LostInHost + LostAtEdges + LostInLots.Sum();

    private static void AddTo(long[] sum, long[] more)
    {
        for (int i = 0; i < sum.Length; i++)
            sum[i] += more[i];
    }
}
