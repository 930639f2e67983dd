namespace Colorimetry;

/// <summary>Sprague's fifth-degree interpolation of evenly spaced values.</summary>
/// <remarks>
/// Source: CIE 167:2005, which recommends it for evenly spaced spectral data, with the four values it adds beyond the ends.
/// It returns the given values at the given points, and between them polynomials up to degree 4; in the two intervals at either end,
/// where the added values count, up to degree 1.
/// </remarks>
internal static class Sprague
{
    /// <summary>Fewest values it works on.</summary>
    public const int FewestValues = 6;

    // Rows of CIE 167's table for the two values before the first one; the two after the last are mirror images.
    private static readonly double[] SecondBefore = [884, -1960, 3033, -2648, 1080, -180];
    private static readonly double[] FirstBefore = [508, -540, 488, -367, 144, -24];

    /// <summary>The values with two more at either end, ready for <see cref="At"/>.</summary>
    /// <param name="values">At least six evenly spaced values.</param>
    public static double[] Extend(ReadOnlySpan<double> values)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(values.Length, FewestValues);
        var extended = new double[values.Length + 4];
        values.CopyTo(extended.AsSpan(2));
        for (int k = 0; k < FewestValues; k++)
        {
            extended[0] += SecondBefore[k] / 209 * values[k];
            extended[1] += FirstBefore[k] / 209 * values[k];
            extended[^2] += FirstBefore[k] / 209 * values[^(k + 1)];
            extended[^1] += SecondBefore[k] / 209 * values[^(k + 1)];
        }

        return extended;
    }

    /// <summary>The value between two given points.</summary>
    /// <param name="extended">What <see cref="Extend"/> made.</param>
    /// <param name="interval">Index of the point at or before, 0 to the last but one.</param>
    /// <param name="intervalShare">Position within the interval, 0 to 1.</param>
    public static double At(ReadOnlySpan<double> extended, int interval, double intervalShare)
    {
        ReadOnlySpan<double> y = extended.Slice(interval, 6);
        double t = intervalShare;
        double a1 = (2 * y[0]) - (16 * y[1]) + (16 * y[3]) - (2 * y[4]);
        double a2 = -y[0] + (16 * y[1]) - (30 * y[2]) + (16 * y[3]) - y[4];
        double a3 = (-9 * y[0]) + (39 * y[1]) - (70 * y[2]) + (66 * y[3]) - (33 * y[4]) + (7 * y[5]);
        double a4 = (13 * y[0]) - (64 * y[1]) + (126 * y[2]) - (124 * y[3]) + (61 * y[4]) - (12 * y[5]);
        double a5 = (-5 * y[0]) + (25 * y[1]) - (50 * y[2]) + (50 * y[3]) - (25 * y[4]) + (5 * y[5]);
        return y[2] + (t * (a1 + (t * (a2 + (t * (a3 + (t * (a4 + (t * a5)))))))) / 24);
    }
}
