using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>An axis of a chart: its title with unit, its range and the distance of its ticks.</summary>
/// <param name="Title">Title with unit.</param>
/// <param name="From">Where it begins.</param>
/// <param name="To">Where it ends.</param>
/// <param name="Step">Distance of ticks.</param>
/// <param name="IsLog">Whether it is logarithmic, with a tick at each power of ten.</param>
internal sealed record Axis(string Title, double From, double To, double Step, bool IsLog = false)
{
    /// <summary>An axis that holds values with a little room at its ends, beginning and ending at ticks.</summary>
    /// <param name="title">Title with unit.</param>
    /// <param name="values">What it has to hold; values that are no numbers are passed over.</param>
    /// <param name="ticks">About how many ticks.</param>
    /// <param name="leastSpan">What it spans at least: rounding noise is no shape.</param>
    public static Axis Holding(string title, IEnumerable<double> values, int ticks = 5, double leastSpan = 1e-12)
    {
        double[] finite = [.. values.Where(double.IsFinite).DefaultIfEmpty(0)];
        double low = finite.Min(), high = finite.Max(), span = high - low;
        if (span < Math.Max(leastSpan, 1e-12 * Math.Max(Math.Abs(low), Math.Abs(high))))
        {
            span = leastSpan > 1e-12 ? leastSpan : high == 0 ? 1 : Math.Abs(high) * 0.1;
            (low, high) = (Math.Min(low, ((low + high) / 2) - (span / 2)), Math.Max(high, ((low + high) / 2) + (span / 2)));
        }

        double step = Plot.NiceStep(span * 1.1, ticks), room = span * 0.05;
        return new(title, Math.Floor((low - (low == 0 ? 0 : room)) / step) * step, Math.Ceiling((high + room) / step) * step, step);
    }
}
