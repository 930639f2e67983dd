using Colorimetry;

namespace FilmOptics;

/// <summary>Peak and width of a band of light.</summary>
internal static class EmissionBands
{
    /// <summary>A band's photons, peak (parabola through the highest samples) and FWHM (straight lines between samples).</summary>
    /// <param name="name">Who emitted it.</param>
    /// <param name="light">Photons per source photon in each bin.</param>
    public static EmissionBand Of(string name, Spectrum<PhotonPerNm> light)
    {
        double peak = light.Peak;
        if (!(peak > 0))
            return new(name, light.Integral, null, null);
        var samples = light.Samples;
        int top = samples.IndexOf(peak);
        double? left = Crossing(samples, top, -1, peak / 2), right = Crossing(samples, top, +1, peak / 2);
        return new(name, light.Integral, WavelengthGrid.NmAt(0) + Summit(samples, top), right - left);
    }

    private static double Summit(ReadOnlySpan<double> samples, int top)
    {
        if (top == 0 || top == samples.Length - 1)
            return top;
        double before = samples[top - 1], at = samples[top], after = samples[top + 1];
        double curvature = before - (2 * at) + after;
        return curvature < 0 ? top + ((before - after) / (2 * curvature)) : top;
    }

    // Index (not whole) where the band falls to the level; null where it does not within the grid.
    private static double? Crossing(ReadOnlySpan<double> samples, int top, int direction, double level)
    {
        for (int i = top; i + direction >= 0 && i + direction < samples.Length; i += direction)
        {
            double here = samples[i], next = samples[i + direction];
            if (next <= level)
                return i + (direction * (here - level) / (here - next));
        }

        return null;
    }
}
