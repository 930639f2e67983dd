using System.Globalization;
using FilmOptics;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>The scans of an integrating sphere in both windows: what was absorbed, and what was emitted.</summary>
internal static class SphereScansChart
{
    private const double Left = 66, Right = 586, Height = 190, FirstTop = 62, SecondTop = FirstTop + Height + 92;

    // Solid, long dash, short dash: the scans are told apart without colour.
    private static readonly (string Name, IReadOnlyList<double>? Dash, double Width)[] Looks =
        [("empty sphere", null, 1.1), ("sample beside the beam", Palette.LongDash, 1.5), ("sample in the beam", Palette.ShortDash, 2)];

    public static Drawing Of(SphereMeasurement measurement, SphereYield yield, Palette palette) => new(
        "sphere-scans",
        "Scans of the integrating sphere",
        string.Create(
            CultureInfo.InvariantCulture,
            $"Pump {measurement.Pump.LowNm:0.#} to {measurement.Pump.HighNm:0.#} nm: the sample absorbs {100 * yield.AbsorptanceShare:0.0} %. Emission {measurement.Emission.LowNm:0.#} to {measurement.Emission.HighNm:0.#} nm: {yield.YieldShare:0.000} photons per absorbed photon."),
        640,
        SecondTop + Height + 46,
        [
            new Words("Pump light", new(Left, 26), TextAnchor.Start, 13, TextWeight.SemiBold, palette.Ink),
            .. Window(measurement, measurement.Pump, FirstTop, palette),
            new Words("Emission", new(Left, SecondTop - 36), TextAnchor.Start, 13, TextWeight.SemiBold, palette.Ink),
            .. Window(measurement, measurement.Emission, SecondTop, palette),
        ]);

    private static IReadOnlyList<Mark> Window(SphereMeasurement measurement, WavelengthWindow window, double top, Palette palette)
    {
        SphereScan?[] scans = [measurement.Empty, measurement.Beside, measurement.InBeam];
        double scale = Points(measurement.Empty, measurement.Pump).Max(point => point.Y);
        double highest = scans.OfType<SphereScan>().Max(scan => Points(scan, window).Max(point => point.Y)) / scale;
        double step = Plot.NiceStep(Math.Max(highest, 1e-9), 4), limit = Math.Ceiling(highest * 1.15 / step) * step;
        var plot = new Plot(palette, new Box(Left, top, Right, top + Height), (window.LowNm, window.HighNm), (0, limit));
        plot.Axes(Plot.NiceStep(window.HighNm - window.LowNm, 10), "wavelength / nm", step, "photons per nm ÷ pump peak");
        for (int i = 0; i < scans.Length; i++)
        {
            if (scans[i] is not { } scan)
                continue;
            (double X, double Y)[] points = [.. Points(scan, window).Select(point => (point.X, point.Y / scale))];
            plot.Line(points, new Stroke(palette.Ink, Looks[i].Width, Looks[i].Dash));
            var peak = points.MaxBy(point => point.Y);
            plot.Over(plot.Labels.Place(Looks[i].Name, plot.At(peak.X, peak.Y), 9.5, palette.Ink, palette.Ground, 8, (1, -1 + i)));
        }

        return plot.Marks;
    }

    private static IEnumerable<(double X, double Y)> Points(SphereScan scan, WavelengthWindow window)
    {
        yield return (window.LowNm, scan.At(window.LowNm));
        for (int i = 0; i < scan.WavelengthsNm.Length; i++)
        {
            if (scan.WavelengthsNm[i] > window.LowNm && scan.WavelengthsNm[i] < window.HighNm)
                yield return (scan.WavelengthsNm[i], scan.PhotonsPerNm[i]);
        }

        yield return (window.HighNm, scan.At(window.HighNm));
    }
}
