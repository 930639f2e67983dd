using Colorimetry;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>States at every so many nm, for films in which more than one layer's absorption depends on the wavelength.</summary>
internal sealed class WavelengthAxis
{
    private const int CubicWidth = 4;

    // Where every line is this far below its peak, the nearest state will do.
    private const double FaintShare = 1e-7;

    /// <summary>An axis over the bins of a film's light.</summary>
    /// <param name="lights">The light.</param>
    /// <param name="stepNm">Distance of the states; 1 makes each bin a state of its own.</param>
    public WavelengthAxis(FilmLights lights, int stepNm)
    {
        int[] bins = lights.Bins;
        int range = bins[^1] - bins[0];
        int step = range < stepNm * CubicWidth ? 1 : stepNm;
        int states = Math.Min(((range + step - 1) / step) + 1, ((WavelengthGrid.Count - 1) / step) + 1);
        int start = Math.Min(bins[0], WavelengthGrid.Count - 1 - ((states - 1) * step));
        Weights = new StateWeights(bins.Length, step == 1 ? 1 : CubicWidth);
        bool[] isBright = lights.BrighterThan(step == 1 ? 0 : FaintShare);
        var used = new bool[states];
        for (int i = 0; i < bins.Length; i++)
        {
            Weights.Interpolate(i, (double)(bins[i] - start) / step, states);
            if (isBright[i])
                used.AsSpan(Weights.First[i], Weights.Width).Fill(true);
        }

        int[] solved = [.. Enumerable.Range(0, states).Where(state => used[state])];
        Bins = [.. solved.Select(state => start + (state * step))];

        // From here on only the states that are solved count; those of a bright bin lie side by side among them too.
        for (int i = 0; i < bins.Length; i++)
        {
            if (isBright[i])
                Weights.First[i] = Array.BinarySearch(solved, Weights.First[i]);
            else
                Weights.TakeNearest(i, bins[i], Bins);
        }
    }

    /// <summary>How bins draw on states.</summary>
    public StateWeights Weights { get; }

    /// <summary>Where the states lie on the grid.</summary>
    public int[] Bins { get; }
}
