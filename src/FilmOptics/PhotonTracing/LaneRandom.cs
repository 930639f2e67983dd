using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace FilmOptics.PhotonTracing;

/// <summary>The published generator xoshiro128++ 1.0, sixteen independent streams side by side in vector lanes.</summary>
/// <remarks>
/// Source: D. Blackman, S. Vigna, "Scrambled linear pseudorandom number generators", ACM Trans. Math. Softw. 47 (2021) 36.
/// Streams start at states spread by <see cref="SplitMix64"/>; at a period of 2^128 that two of a run overlap is out of the question.
/// </remarks>
internal struct LaneRandom
{
    private Vector512<uint> _a, _b, _c, _d;

    public LaneRandom(Vector512<uint> a, Vector512<uint> b, Vector512<uint> c, Vector512<uint> d) =>
        (_a, _b, _c, _d) = (a, b, c, d);

    /// <summary>Streams whose states are drawn from another generator.</summary>
    public static LaneRandom From(ref Xoshiro256 random)
    {
        Span<ulong> state = stackalloc ulong[4 * Vector512<uint>.Count / 2];
        foreach (ref ulong part in state)
            part = random.Next();
        var words = System.Runtime.InteropServices.MemoryMarshal.Cast<ulong, uint>(state);
        int lanes = Vector512<uint>.Count;
        return new(
            Vector512.Create<uint>(words[..lanes]),
            Vector512.Create<uint>(words[lanes..]),
            Vector512.Create<uint>(words[(2 * lanes)..]),
            Vector512.Create<uint>(words[(3 * lanes)..]));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Vector512<uint> Next()
    {
        var result = RotateLeft(_a + _d, 7) + _a;
        var shifted = Vector512.ShiftLeft(_b, 9);
        _c ^= _a;
        _d ^= _b;
        _b ^= _c;
        _a ^= _d;
        _c ^= shifted;
        _d = RotateLeft(_d, 11);
        return result;
    }

    /// <summary>Numbers strictly between 0 and 1, in steps of 2^−23: (k + ½)/2^23, each exact in single precision.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Vector512<float> NextShare()
    {
        var steps = Vector512.ConvertToSingle(Vector512.ShiftRightLogical(Next(), 9).AsInt32());
        return Vector512.FusedMultiplyAdd(
            steps, Vector512.Create(1f / (1 << 23)), Vector512.Create(0.5f / (1 << 23)));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector512<uint> RotateLeft(Vector512<uint> value, int bits) =>
        Vector512.ShiftLeft(value, bits) | Vector512.ShiftRightLogical(value, 32 - bits);
}
