using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace FilmOptics.PhotonTracing;

/// <summary>Traces sixteen photons at once, one in each vector lane, in single precision: depth and direction cosine only.</summary>
/// <remarks>
/// <para>Every lane takes one interaction per step (scatter, absorption or face), whatever the others do; a lane whose
/// photon has ended gets the next one at once. What happens seldom (absorption, leaving the film) is done lane by lane.</para>
/// <para>Single precision suffices: a cosine is off by 6e-8, a probability by 1.2e-7, far below the standard error of any run.</para>
/// <para>Positions along the sheet are not followed, and azimuths only where they change the cosine.</para>
/// </remarks>
internal static class LaneTracer
{
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void Trace(LaneFilm film, Xoshiro256 random, int photons, Tally tally)
    {
        var one = Vector512<float>.One;
        var zero = Vector512<float>.Zero;
        var thicknesses = Vector512.LoadUnsafe(ref film.ThicknessMm[0]);
        var ratiosUp = Vector512.LoadUnsafe(ref film.RatioUp[0]);
        var ratiosDown = Vector512.LoadUnsafe(ref film.RatioDown[0]);
        var longest = Vector512.Create(film.LongestFlightMm);
        var airAbove = Vector512.Create(film.Film.LayerCount + 1);
        bool layered = film.Film.LayerCount > 1;

        var lanes = LaneRandom.From(ref random);
        var seldom = new LaneEvents(film, random, photons, tally, stackalloc int[16 * film.Film.LotCount]);
        for (int lane = 0; lane < LaneEvents.Lanes; lane++)
            seldom.Launch(lane);
        ref var state = ref seldom.State;
        var flown = zero;
        long interactions = 0;
        while (seldom.Active > 0)
        {
            interactions += seldom.Active;
            var place = state.Place;
            var depth = state.Depth;
            var cosine = state.Cosine;

            // The flight and the face ahead.
            var flight = LaneMath.MinusLog(lanes.NextShare()) * state.FreePath;
            var chance = lanes.NextShare();
            var isUp = Vector512.GreaterThan(cosine, zero);
            var steepness = Vector512.Abs(cosine);
            var thickness = LaneMath.Pick(thicknesses, place);
            var ahead = Vector512.ConditionalSelect(isUp, thickness - depth, depth);
            var up = LaneMath.Pick(ratiosUp, place);
            var down = LaneMath.Pick(ratiosDown, place);
            var ratio = Vector512.ConditionalSelect(isUp, up, down);
            var rise = steepness * flight;
            var meetsFace = Vector512.GreaterThan(rise, ahead);
            var lostAtEdge = Vector512<float>.Zero;

            // Between two faces that both reflect all, the flight is folded into this one step.
            var sineSquare = Vector512.FusedMultiplyAdd(-steepness, steepness, one);
            var least = Vector512.Min(up, down);
            var guided = meetsFace & Vector512.GreaterThanOrEqual(least * least * sineSquare, one)
                & Vector512.GreaterThan(least, one);
            if (guided != zero)
            {
                lostAtEdge = guided & Vector512.GreaterThan(flight + flown, longest);
                Fold(guided, thickness - ahead + rise, thickness, lanes.NextShare(), ref cosine, ref depth);
                meetsFace = Vector512.AndNot(meetsFace, guided);
            }

            // At a face: unpolarised Fresnel. r = n/n′, cos²t = (1 − r²) + r² cos²i.
            var behindSquare = Vector512.FusedMultiplyAdd(
                ratio * ratio, steepness * steepness, Vector512.FusedMultiplyAdd(-ratio, ratio, one));
            var behind = Vector512.Sqrt(Vector512.Max(behindSquare, zero));
            var acrossSum = Vector512.FusedMultiplyAdd(ratio, steepness, behind);
            var acrossDifference = Vector512.FusedMultiplyAdd(ratio, steepness, -behind);
            var alongSum = Vector512.FusedMultiplyAdd(ratio, behind, steepness);
            var alongDifference = Vector512.FusedMultiplyAdd(ratio, behind, -steepness);
            var both = acrossSum * alongSum;
            var first = acrossDifference * alongSum;
            var second = alongDifference * acrossSum;
            var numerator = Vector512.FusedMultiplyAdd(first, first, second * second);
            var reflects = Vector512.LessThan(chance * (both * both) * Vector512.Create(2f), numerator)
                | Vector512.LessThanOrEqual(behindSquare, zero);
            var passes = Vector512.AndNot(meetsFace, reflects);
            var stepUp = Vector512.ConditionalSelect(isUp.AsInt32(), Vector512<int>.One, -Vector512<int>.One);
            var nextPlace = place + (stepUp & passes.AsInt32());
            var faceCosine = Vector512.ConditionalSelect(
                reflects, -cosine, Vector512.ConditionalSelect(isUp, behind, -behind));
            var faceDepth = Vector512.ConditionalSelect(
                isUp ^ passes, LaneMath.Pick(thicknesses, nextPlace), zero);

            // In between: scatter, or absorption, which is seldom.
            var innerDepth = Vector512.ConditionalSelect(
                guided, depth, Vector512.Min(thickness, Vector512.Max(zero, Vector512.FusedMultiplyAdd(cosine, flight, depth))));
            var absorbed = Vector512.AndNot(Vector512.LessThan(chance, state.AbsorbedShare), meetsFace | lostAtEdge);
            var innerCosine = Scatter(cosine, state.Anisotropy, lanes.NextShare(), lanes.NextShare());

            state.Depth = Vector512.ConditionalSelect(meetsFace, faceDepth, innerDepth);
            state.Cosine = Vector512.ConditionalSelect(meetsFace, faceCosine, innerCosine);
            state.Place = nextPlace;
            if (layered)
            {
                // A guided photon may roam between layers that end it late or never.
                flown = meetsFace & (flown + (ahead / steepness));
                lostAtEdge |= Vector512.GreaterThan(flown, longest);
            }

            var goesUp = Vector512.GreaterThan(state.Cosine, zero).AsInt32();
            var leaves = (Vector512.Equals(nextPlace, airAbove) & goesUp)
                | Vector512.AndNot(Vector512.Equals(nextPlace, Vector512<int>.Zero), goesUp);
            flown = Vector512.AndNot(flown, lostAtEdge | leaves.AsSingle());
            var changes = layered ? passes.AsInt32() : leaves;
            var special = leaves | changes | absorbed.AsInt32() | lostAtEdge.AsInt32();
            if (special != Vector512<int>.Zero)
            {
                seldom.Handle(
                    Vector512.ExtractMostSignificantBits(special),
                    Vector512.ExtractMostSignificantBits(absorbed),
                    Vector512.ExtractMostSignificantBits(lostAtEdge),
                    Vector512.ExtractMostSignificantBits(leaves));
            }
        }

        tally.Interactions += interactions;
        tally.EndBlock(photons);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Fold(
        Vector512<float> guided, Vector512<float> unfolded, Vector512<float> thickness, Vector512<float> fresh,
        ref Vector512<float> cosine, ref Vector512<float> depth)
    {
        var passes = unfolded / thickness;

        // Too many passes to follow: the depth is as good as evenly spread. Passes 0 to 2 stand for both ways at any depth.
        passes = Vector512.ConditionalSelect(
            Vector512.GreaterThan(passes, Vector512.Create((float)GuidedFlight.CountedPasses)), fresh + fresh, passes);
        var whole = Vector512.Floor(passes);
        var turned = Vector512.ShiftLeft(Vector512.ConvertToInt32(whole), 31).AsSingle();
        var after = cosine ^ turned;
        var fromBehind = (passes - whole) * thickness;
        var folded = Vector512.ConditionalSelect(
            Vector512.GreaterThan(after, Vector512<float>.Zero), fromBehind, thickness - fromBehind);
        cosine = Vector512.ConditionalSelect(guided, after, cosine);
        depth = Vector512.ConditionalSelect(guided, folded, depth);
    }

    /// <summary>Cosine after a Henyey–Greenstein scattering through an even azimuth.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector512<float> Scatter(
        Vector512<float> cosine, Vector512<float> anisotropy, Vector512<float> share, Vector512<float> azimuthShare)
    {
        // 1 − cos θ = (1 − g)² (1 − u)(1 + g + d)/d², d = 1 − g + 2 g u, as in HenyeyGreenstein.
        var one = Vector512<float>.One;
        var back = one - anisotropy;
        var denominator = Vector512.FusedMultiplyAdd(anisotropy + anisotropy, share, back);
        var ratio = back / denominator;
        var versine = Vector512.Min(
            Vector512.Create(2f), ratio * ratio * (one - share) * (one + anisotropy + denominator));
        var sines = Vector512.Sqrt(
            versine * (Vector512.Create(2f) - versine) * (one - cosine) * (one + cosine));
        var turned = Vector512.FusedMultiplyAdd(
            sines, LaneMath.CosineOfHalfTurns(azimuthShare), Vector512.FusedMultiplyAdd(-cosine, versine, cosine));

        // A direction exactly along the faces would never meet one.
        turned = Vector512.Min(one, Vector512.Max(-one, turned));
        return Vector512.ConditionalSelect(
            Vector512.LessThan(Vector512.Abs(turned), Vector512.Create(1e-7f)), Vector512.Create(1e-7f), turned);
    }
}
