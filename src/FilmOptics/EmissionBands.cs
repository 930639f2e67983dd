using Colorimetry;

namespace FilmOptics;

/// <summary>Peak and width of a band of light.</summary>
internal static class EmissionBands
{
    /// <summary>A band's photons, peak (through the three highest samples) and FWHM (straight lines between samples).</summary>
    /// <param name="name">Who emitted it.</param>
    /// <param name="light">Photons per source photon in each bin.</param>
    public static EmissionBand Of(string name, Spectrum<PhotonPerNm> light)
    {
        double greatest = light.Peak;
        if (!(greatest > 0))
            return new(name, light.Integral, null, null);
        var samples = light.Samples;
        int top = samples.IndexOf(greatest);
        var (offset, height) = Summit(samples, top);
        double? left = Crossing(samples, top, -1, height / 2), right = Crossing(samples, top, +1, height / 2);
        return new(name, light.Integral, WavelengthGrid.NmAt(0) + top + offset, right - left);
    }

    // A parabola through the logarithms: exact for a Gaussian. A line with an empty neighbour peaks at its sample.
    private static (double Offset, double Height) Summit(ReadOnlySpan<double> samples, int top)
    {
        if (top == 0 || top == samples.Length - 1 || samples[top - 1] <= 0 || samples[top + 1] <= 0)
            return (0, samples[top]);
        double before = Math.Log(samples[top - 1] / samples[top]), after = Math.Log(samples[top + 1] / samples[top]);
        double curvature = before + after;
        if (!(curvature < 0))
            return (0, samples[top]);
        double offset = (before - after) / (2 * curvature);
        return (offset, samples[top] * Math.Exp((after - before) * offset / 4));
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
