using System.Numerics;

namespace FilmOptics.PhotonTracing;

/// <summary>The published generator xoshiro256++ 1.0, for one stream of numbers.</summary>
/// <remarks>
/// Source: D. Blackman, S. Vigna, "Scrambled linear pseudorandom number generators", ACM Trans. Math. Softw. 47 (2021) 36.
/// Streams are seeded through <see cref="SplitMix64"/>, as its authors advise; its period of 2^256 makes overlap negligible.
/// </remarks>
internal struct Xoshiro256
{
    private ulong _a, _b, _c, _d;

    public Xoshiro256(ulong a, ulong b, ulong c, ulong d) => (_a, _b, _c, _d) = (a, b, c, d);

    /// <summary>The stream of a block of photons.</summary>
    public static Xoshiro256 ForBlock(ulong seed, long block)
    {
        // The seed and the block are mixed one after the other, so that (1, 2) and (2, 1) are different streams.
        var mixer = new SplitMix64(new SplitMix64(seed).Next() + (ulong)block);
        return new(mixer.Next(), mixer.Next(), mixer.Next(), mixer.Next());
    }

    public ulong Next()
    {
        ulong result = BitOperations.RotateLeft(_a + _d, 23) + _a;
        ulong shifted = _b << 17;
        _c ^= _a;
        _d ^= _b;
        _b ^= _c;
        _a ^= _d;
        _c ^= shifted;
        _d = BitOperations.RotateLeft(_d, 45);
        return result;
    }

    /// <summary>A number strictly between 0 and 1, in steps of 2^−52.</summary>
    public double NextShare() => ((Next() >> 12) + 0.5) * (1.0 / (1UL << 52));
}

/// <summary>The published generator SplitMix64: spreads one seed over the state of another generator.</summary>
/// <remarks>Source: G. Steele, D. Lea, C. Flood, "Fast splittable pseudorandom number generators", OOPSLA 2014.</remarks>
internal struct SplitMix64(ulong state)
{
    private ulong _state = state;

    public ulong Next()
    {
        _state += 0x9E3779B97F4A7C15;
        ulong z = _state;
        z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9;
        z = (z ^ (z >> 27)) * 0x94D049BB133111EB;
        return z ^ (z >> 31);
    }
}
