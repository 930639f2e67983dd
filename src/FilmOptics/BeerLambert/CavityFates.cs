using System.Numerics;
using Colorimetry;

namespace FilmOptics.BeerLambert;

/// <summary>Where light of each wavelength ends in film and cavity before any dot emits again, per photon.</summary>
/// <remarks>
/// All returns are summed as one geometric series, 1/(1 − R_b R_t T²). That difference is never taken of rounded numbers: it is built from
/// what the mirrors do not return and what the film absorbs, so that figures keep their digits however long light is caught.
/// </remarks>
internal readonly ref struct CavityFates(Span<double> room)
{
    /// <summary>Numbers of room that the fates need.</summary>
    public const int Room = 4 * WavelengthGrid.Count;

    /// <summary>Leaves above.</summary>
    public Span<double> Out { get; } = room[..WavelengthGrid.Count];

    /// <summary>Absorbed by the sheets above.</summary>
    public Span<double> LostAbove { get; } = room.Slice(WavelengthGrid.Count, WavelengthGrid.Count);

    /// <summary>Absorbed by the reflector below.</summary>
    public Span<double> LostBelow { get; } = room.Slice(2 * WavelengthGrid.Count, WavelengthGrid.Count);

    /// <summary>Absorbed in the film, per optical depth: times a part of the depth it is what that part absorbs.</summary>
    public Span<double> AbsorbedPerDepth { get; } = room.Slice(3 * WavelengthGrid.Count, WavelengthGrid.Count);

    /// <summary>Source light: from below, but for the share that misses the film and reaches the sheets above.</summary>
    /// <returns>Whether light of some wavelength has no way to end: its fates are then all 0.</returns>
    public bool OfSource(ReadOnlySpan<double> depth, ReadOnlySpan<double> below, ReadOnlySpan<double> above, ReadOnlySpan<double> absorptance, double bypassShare)
    {
        bool caught = false;
        var (one, through) = (Vector<double>.One, new Vector<double>(1 - bypassShare));
        var bypass = new Vector<double>(bypassShare);
        for (int next = 0; next < depth.Length;)
        {
            int i = Next(ref next, depth.Length);
            var (rb, rt, at) = (new Vector<double>(below[i..]), new Vector<double>(above[i..]), new Vector<double>(absorptance[i..]));
            var x = new Vector<double>(depth[i..]);
            var (t, crossed, _) = Crossing.Of(x);
            var series = Returns(x, t, crossed, rb, rt, ref caught);
            var fromAbove = bypass * rt;
            var arrivesAbove = bypass + (((through * t) + (fromAbove * rb * t * t)) * series);
            var arrivesBelow = ((through * rt * t * t) + (fromAbove * t)) * series;
            Store(i, arrivesAbove, arrivesBelow, rb, rt, at);
            (crossed * ((through * (one + (rt * t))) + (fromAbove * (one + (rb * t)))) * series).CopyTo(AbsorbedPerDepth[i..]);
        }

        return caught;
    }

    /// <summary>Light emitted evenly in depth, half up and half down.</summary>
    /// <returns>Whether light of some wavelength has no way to end: its fates are then all 0.</returns>
    public bool OfEmission(ReadOnlySpan<double> depth, ReadOnlySpan<double> below, ReadOnlySpan<double> above, ReadOnlySpan<double> absorptance)
    {
        bool caught = false;
        var (one, half) = (Vector<double>.One, new Vector<double>(0.5));
        for (int next = 0; next < depth.Length;)
        {
            int i = Next(ref next, depth.Length);
            var (rb, rt, at) = (new Vector<double>(below[i..]), new Vector<double>(above[i..]), new Vector<double>(absorptance[i..]));
            var x = new Vector<double>(depth[i..]);
            var (t, crossed, emitted) = Crossing.Of(x);
            var series = Returns(x, t, crossed, rb, rt, ref caught);
            var arrivesAbove = half * crossed * (one + (rb * t)) * series;
            var arrivesBelow = half * crossed * (one + (rt * t)) * series;
            Store(i, arrivesAbove, arrivesBelow, rb, rt, at);
            (emitted + (crossed * ((rt * arrivesAbove) + (rb * arrivesBelow)))).CopyTo(AbsorbedPerDepth[i..]);
        }

        return caught;
    }

    // 1/(1 − R_b R_t T²), or 0 where light of this wavelength is caught for ever.
    private static Vector<double> Returns(
        Vector<double> x, Vector<double> t, Vector<double> crossed, Vector<double> rb, Vector<double> rt, ref bool caught)
    {
        var one = Vector<double>.One;
        var ended = (one - rb) + (rb * (one - rt)) + (rb * rt * x * crossed * (one + t));
        var isCaught = Vector.Equals(ended, Vector<double>.Zero);
        caught |= Vector.EqualsAny(ended, Vector<double>.Zero);
        return Vector.ConditionalSelect(isCaught, Vector<double>.Zero, one / ended);
    }

    // The last vector overlaps the one before: each wavelength is then only computed twice.
    private static int Next(ref int next, int count)
    {
        int i = Math.Min(next, count - Vector<double>.Count);
        next = i + Vector<double>.Count;
        return i;
    }

    private void Store(int i, Vector<double> arrivesAbove, Vector<double> arrivesBelow, Vector<double> rb, Vector<double> rt, Vector<double> at)
    {
        // Rounding of a return and an absorptance that sum to 1 must not leave a negative opening.
        var open = Vector.Max(Vector<double>.One - rt - at, Vector<double>.Zero);
        (arrivesAbove * open).CopyTo(Out[i..]);
        (arrivesAbove * at).CopyTo(LostAbove[i..]);
        (arrivesBelow * (Vector<double>.One - rb)).CopyTo(LostBelow[i..]);
    }
}
