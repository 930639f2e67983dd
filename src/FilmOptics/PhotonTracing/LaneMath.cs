using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.X86;

namespace FilmOptics.PhotonTracing;

/// <summary>Elementary functions in single-precision lanes, by polynomials whose bits do not depend on the machine.</summary>
/// <remarks>Coefficients: own fits at Chebyshev nodes (see the tests for the errors reached).</remarks>
internal static class LaneMath
{
    /// <summary>−ln u for u strictly between 0 and 1.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector512<float> MinusLog(Vector512<float> share)
    {
        // u = 2^e m with m in [2/3, 4/3): ln u = e ln 2 + ln m, and ln m from a polynomial in m − 1, which is exact.
        var bits = share.AsInt32() - Vector512.Create(0x3f2aaaab);
        var exponent = Vector512.ConvertToSingle(Vector512.ShiftRightArithmetic(bits, 23));
        var mantissa = ((bits & Vector512.Create(0x007fffff)) + Vector512.Create(0x3f2aaaab)).AsSingle();
        var x = mantissa - Vector512<float>.One;
        var p = Vector512.Create(0.13748309f);
        p = Vector512.FusedMultiplyAdd(p, x, Vector512.Create(-0.15394272f));
        p = Vector512.FusedMultiplyAdd(p, x, Vector512.Create(0.14055812f));
        p = Vector512.FusedMultiplyAdd(p, x, Vector512.Create(-0.1641452f));
        p = Vector512.FusedMultiplyAdd(p, x, Vector512.Create(0.20007233f));
        p = Vector512.FusedMultiplyAdd(p, x, Vector512.Create(-0.2500793f));
        p = Vector512.FusedMultiplyAdd(p, x, Vector512.Create(0.33333272f));
        p = Vector512.FusedMultiplyAdd(p, x, Vector512.Create(-0.49999934f));
        p = Vector512.FusedMultiplyAdd(p, x, Vector512.Create(1f));
        return Vector512.FusedMultiplyAdd(exponent, Vector512.Create(-0.693147181f), -(x * p));
    }

    /// <summary>cos(π u) for u in 0…1: the cosine of an even azimuth, whose two halves look alike.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector512<float> CosineOfHalfTurns(Vector512<float> share)
    {
        // cos(π u) = −sin(π v), v = u − ½, odd in v.
        var v = share - Vector512.Create(0.5f);
        var square = v * v;
        var p = Vector512.Create(0.07765591f);
        p = Vector512.FusedMultiplyAdd(p, square, Vector512.Create(-0.5982904f));
        p = Vector512.FusedMultiplyAdd(p, square, Vector512.Create(2.5500774f));
        p = Vector512.FusedMultiplyAdd(p, square, Vector512.Create(-5.1677103f));
        p = Vector512.FusedMultiplyAdd(p, square, Vector512.Create(3.1415927f));
        return -(v * p);
    }

    /// <summary>Entries of a table of sixteen, by the index in each lane.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector512<float> Pick(Vector512<float> table, Vector512<int> index)
    {
        // Without 512-bit hardware the general shuffle falls back to memory; two permutes of half tables do not.
        return Vector512.IsHardwareAccelerated || !Avx2.IsSupported
            ? Vector512.Shuffle(table, index)
            : Vector512.Create(PickHalf(table, index.GetLower()), PickHalf(table, index.GetUpper()));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector256<float> PickHalf(Vector512<float> table, Vector256<int> index) => Vector256.ConditionalSelect(
        Vector256.GreaterThan(index, Vector256.Create(7)).AsSingle(),
        Avx2.PermuteVar8x32(table.GetUpper(), index),
        Avx2.PermuteVar8x32(table.GetLower(), index));
}
