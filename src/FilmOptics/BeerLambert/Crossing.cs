using System.Numerics;

namespace FilmOptics.BeerLambert;

/// <summary>One crossing of an optical depth, exact to rounding at any depth.</summary>
internal static class Crossing
{
    // Below this depth the series is used: its 13 terms leave under 1e-16 there, and above it the closed forms lose under two digits.
    private const double SeriesBelow = 0.5;

    // 1/2!, −1/3!, 1/4!, … of (x − 1 + exp(−x))/x².
    private static readonly double[] Series = MakeSeries();

    /// <summary>Transmittance and the two means of absorption, for several wavelengths at once.</summary>
    /// <param name="depth">Optical depth x, base e, at least 0.</param>
    /// <returns>
    /// T = exp(−x); (1 − T)/x, which is what of a photon emitted evenly in depth leaves, and x times which is absorbed of one that
    /// crosses; and (1 − (1 − T)/x)/x, x times which is absorbed of one emitted evenly in depth. The last two stay finite at x = 0.
    /// </returns>
    public static (Vector<double> Transmitted, Vector<double> CrossedPerDepth, Vector<double> EmittedPerDepth) Of(Vector<double> depth)
    {
        var transmitted = Vector.Exp(-depth);
        var isThin = Vector.LessThan(depth, new Vector<double>(SeriesBelow));
        var x = Vector.ConditionalSelect(isThin, depth, Vector<double>.Zero);
        var series = new Vector<double>(Series[^1]);
        for (int i = Series.Length - 2; i >= 0; i--)
            series = (series * x) + new Vector<double>(Series[i]);
        var crossed = Vector.ConditionalSelect(isThin, Vector<double>.One - (x * series), (Vector<double>.One - transmitted) / depth);
        return (transmitted, crossed, Vector.ConditionalSelect(isThin, series, (Vector<double>.One - crossed) / depth));
    }

    private static double[] MakeSeries()
    {
        var terms = new double[13];
        double term = 0.5;
        for (int i = 0; i < terms.Length; i++)
        {
            terms[i] = term;
            term /= -(i + 3);
        }

        return terms;
    }
}
