using System.Globalization;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>Limits of a control chart of single values.</summary>
/// <param name="Centre">Mean.</param>
/// <param name="Lower">Three standard deviations below.</param>
/// <param name="Upper">Three standard deviations above.</param>
internal sealed record ControlLimits(double Centre, double Lower, double Upper)
{
    // Mean range of two values of a normal distribution over its standard deviation, 2/√π.
    private const double MeanRangeOfTwo = 1.128;

    /// <summary>Limits from the mean moving range of two values in a row (ISO 7870-2, chart of individuals).</summary>
    /// <param name="values">At least two, in the order of making.</param>
    public static ControlLimits OfIndividuals(IReadOnlyList<double> values)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(values.Count, 2);
        double centre = values.Average(), range = Enumerable.Range(1, values.Count - 1).Average(i => Math.Abs(values[i] - values[i - 1]));
        double reach = 3 * range / MeanRangeOfTwo;
        return new(centre, centre - reach, centre + reach);
    }
}

/// <summary>Single values in the order of making, with centre and limits; a value beyond a limit carries a ring.</summary>
internal static class ControlChart
{
    /// <summary>The chart.</summary>
    /// <param name="text">What it is called.</param>
    /// <param name="valueTitle">Title of the axis upward, with unit.</param>
    /// <param name="values">In the order of making.</param>
    /// <param name="limits">Centre and limits.</param>
    /// <param name="palette">Colours.</param>
    public static Drawing Of(ChartText text, string valueTitle, IReadOnlyList<double> values, ControlLimits limits, Palette palette)
    {
        var frame = new ChartFrame(
            text,
            new("in the order of making", 0, values.Count + 1, Math.Max(1, Plot.NiceStep(values.Count + 1, 12))),
            Axis.Holding(valueTitle, [.. values, limits.Lower, limits.Upper]),
            palette,
            height: 200);
        var plot = frame.Plot;
        (string Name, double Value, Stroke Stroke)[] lines =
        [
            ("centre", limits.Centre, new(palette.Ink, 0.9)),
            ("upper limit", limits.Upper, new(palette.Ink, 0.9, [6, 4])),
            ("lower limit", limits.Lower, new(palette.Ink, 0.9, [6, 4])),
        ];
        foreach (var line in lines)
            plot.Line([(0, line.Value), (values.Count + 1, line.Value)], line.Stroke);
        plot.Line(values.Select((value, i) => (i + 1.0, value)), new(palette.Faint, 0.9));
        for (int i = 0; i < values.Count; i++)
        {
            var at = plot.At(i + 1, values[i]);
            plot.Over(new Disc(at, 2.5, palette.Ink, null));
            plot.Labels.KeepOff(Box.About(at, 8));
            if (values[i] > limits.Upper || values[i] < limits.Lower)
                plot.Over(new Disc(at, 6, null, new Stroke(palette.Ink, 1.2)));
        }

        foreach (var line in lines)
        {
            string figure = line.Value.ToString("G5", CultureInfo.InvariantCulture).Replace('-', '\u2212');
            plot.Over(plot.Labels.Place($"{line.Name} {figure}", plot.At(0, line.Value), 8.5, palette.Faint, palette.Ground, 4, (1, -1)));
        }

        return frame.Finish();
    }
}
