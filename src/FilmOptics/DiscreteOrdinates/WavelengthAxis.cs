using Colorimetry;

namespace FilmOptics.DiscreteOrdinates;

/// <summary>States at every so many nm, for films in which more than one layer's absorption depends on the wavelength.</summary>
internal sealed class WavelengthAxis
{
    private const int CubicWidth = 4;

    // Where every line is this far below its peak, the nearest state will do.
    private const double FaintShare = 1e-7;

    private readonly int _first;
    private readonly int _stepNm;
    private readonly int _states;

    /// <summary>An axis over the bins of a film's light.</summary>
    /// <param name="lights">The light.</param>
    /// <param name="stepNm">Distance of the states; 1 makes each bin a state of its own.</param>
    public WavelengthAxis(FilmLights lights, int stepNm)
    {
        int[] bins = lights.Bins;
        int range = bins[^1] - bins[0];
        _stepNm = range < stepNm * CubicWidth ? 1 : stepNm;
        _states = ((range + _stepNm - 1) / _stepNm) + 1;
        _first = Math.Max(0, Math.Min(bins[0], WavelengthGrid.Count - 1 - ((_states - 1) * _stepNm)));
        Weights = new StateWeights(bins.Length, _stepNm == 1 ? 1 : CubicWidth);
        var used = new bool[_states];
        bool[] isBright = lights.BrighterThan(_stepNm == 1 ? 0 : FaintShare);
        for (int i = 0; i < bins.Length; i++)
        {
            if (_stepNm == 1)
                (Weights.First[i], Weights.Weights[i]) = (bins[i] - _first, 1);
            else
                Weights.Interpolate(i, (double)(bins[i] - _first) / _stepNm, _states);
            if (isBright[i])
                used.AsSpan(Weights.First[i], Weights.Width).Fill(true);
        }

        Used = [.. Enumerable.Range(0, _states).Where(state => used[state])];
        Bins = [.. Used.Select(state => _first + (state * _stepNm))];
        for (int i = 0; i < bins.Length; i++)
        {
            if (!isBright[i] && used.AsSpan(Weights.First[i], Weights.Width).Contains(false))
                Weights.TakeNearest(i, (bins[i] - _first) / _stepNm, Used, _states);
        }
    }

    /// <summary>How bins draw on states.</summary>
    public StateWeights Weights { get; }

    /// <summary>States, those that no bin draws on counted.</summary>
    public int States => _states;

    /// <summary>States that a bin draws on.</summary>
    public int[] Used { get; }

    /// <summary>Where they lie on the grid.</summary>
    public int[] Bins { get; }
}
