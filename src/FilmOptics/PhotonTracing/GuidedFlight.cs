namespace FilmOptics.PhotonTracing;

/// <summary>Flight between two faces that both reflect all: folded into one step, however many passes it takes.</summary>
internal static class GuidedFlight
{
    /// <summary>Passes after which the depth is as good as evenly spread, and is drawn afresh.</summary>
    public const double CountedPasses = 4096;

    /// <summary>Depth at the end of a flight, measured from the face that the photon then leaves behind it.</summary>
    /// <param name="startMm">Depth at the start, from the face behind.</param>
    /// <param name="riseMm">Flight along the normal, unfolded.</param>
    /// <param name="thicknessMm">Thickness of the layer.</param>
    /// <param name="freshShare">A random number, used when passes are too many to follow.</param>
    /// <param name="turned">Whether the photon now travels the other way.</param>
    public static double Fold(double startMm, double riseMm, double thicknessMm, double freshShare, out bool turned)
    {
        double passes = (startMm + riseMm) / thicknessMm;
        if (passes > CountedPasses)
        {
            turned = freshShare < 0.5;
            return thicknessMm * (turned ? 2 * freshShare : (2 * freshShare) - 1);
        }

        double whole = Math.Floor(passes);
        turned = ((long)whole & 1) != 0;
        return (passes - whole) * thicknessMm;
    }
}
