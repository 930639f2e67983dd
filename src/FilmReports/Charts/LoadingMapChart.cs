using System.Globalization;
using Colorimetry;
using FilmDesign;
using FilmOptics;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>White error, blue leakage and coverage over the loadings of the two free lots, with the film and where white is on target.</summary>
internal static class LoadingMapChart
{
    // Between two solved films this many more are drawn, by cubic interpolation of what varies smoothly: white, leakage, coverage.
    private const int Finer = 16;
    private static readonly double[] WhiteErrors = [0.002, 0.005, 0.01, 0.02, 0.05, 0.1];

    public static Drawing Of(FilmCase filmCase, LoadingMap map, Palette palette)
    {
        var target = filmCase.Target!;
        double[] first = [.. FineGrid.Axis(map.FirstMgPerMl, Finer)], second = [.. FineGrid.Axis(map.SecondMgPerMl, Finer)];
        double[,] x = Field(map, p => p.White.X), y = Field(map, p => p.White.Y), leakage = Field(map, p => p.LeakageShare);
        double[,] error = new double[first.Length, second.Length];
        var best = (First: 0, Second: 0);
        for (int i = 0; i < first.Length; i++)
        {
            for (int j = 0; j < second.Length; j++)
            {
                error[i, j] = new Chromaticity(x[i, j], y[i, j]).DistanceXyTo(new(target.WhiteX, target.WhiteY));
                if (error[i, j] < error[best.First, best.Second])
                    best = (i, j);
            }
        }

        string standard = map.StandardName ?? "";
        var frame = new ChartFrame(
            new("loading-map", "What the two loadings do", Description(map, target, first, second, error, best), "solid: white error in xy; dots: blue leakage; dashes and dots: coverage"),
            AxisOf(map.FirstLot, first), AxisOf(map.SecondLot, second), palette, 520, 400);
        var plot = frame.Plot;
        Levels(plot, first, second, error, WhiteErrors, new(palette.Ink, 1.1), level => level.ToString("0.###", CultureInfo.InvariantCulture), palette);
        Levels(plot, first, second, leakage, Nice(leakage), new(palette.Source, 1.6, [1.8, 2.8]), level => $"leakage {Percent(level)}", palette);
        if (map.StandardName is not null)
        {
            var coverage = Field(map, p => p.CoverageXyShare ?? 0);
            Levels(plot, first, second, coverage, Nice(coverage), new(palette.Faint, 1.3, [9, 3, 2, 3]), level => $"{standard} {Percent(level)}", palette);
        }

        var (firstMgPerMl, secondMgPerMl) = (Loading(filmCase.Film, map.FirstLot), Loading(filmCase.Film, map.SecondLot));
        plot.Inside(new Disc(plot.At(firstMgPerMl, secondMgPerMl), 5, null, new Stroke(palette.Ink, 1.6)));
        if (error[best.First, best.Second] <= WhiteErrors[0])
        {
            var at = plot.At(first[best.First], second[best.Second]);
            plot.Inside(new Shape([new(at.X - 8, at.Y), new(at.X + 8, at.Y)], Closed: false, null, 1, new Stroke(palette.Ink, 1)));
            plot.Inside(new Shape([new(at.X, at.Y - 8), new(at.X, at.Y + 8)], Closed: false, null, 1, new Stroke(palette.Ink, 1)));
            plot.Labels.KeepOff(Box.About(at, 8));
        }

        plot.Over(plot.Labels.Place("this film", plot.At(firstMgPerMl, secondMgPerMl), 9.5, palette.Ink, palette.Ground, 12, (1, -1), TextWeight.SemiBold));
        return frame.Finish();
    }

    private static double[,] Field(LoadingMap map, Func<LoadingMapPoint, double> value)
    {
        var coarse = new double[map.FirstMgPerMl.Count, map.SecondMgPerMl.Count];
        for (int i = 0; i < coarse.GetLength(0); i++)
        {
            for (int j = 0; j < coarse.GetLength(1); j++)
                coarse[i, j] = value(map.Points[i][j]);
        }

        return FineGrid.Refined(coarse, Finer);
    }

    private static void Levels(
        Plot plot, double[] first, double[] second, double[,] values, IEnumerable<double> levels, Stroke stroke, Func<double, string> name, Palette palette)
    {
        foreach (double level in levels)
        {
            var lines = Contours.Of(first, second, values, level);
            foreach (var line in lines)
                plot.Inside(new Shape([.. line.Select(p => plot.At(p.X, p.Y))], Closed: false, null, 1, stroke));
            if (lines.Count == 0 || lines.MaxBy(line => line.Count) is not { Count: > 9 } longest)
                continue;
            var middle = longest[longest.Count / 3];
            plot.Over(plot.Labels.Place(name(level), plot.At(middle.X, middle.Y), 8.5, palette.Ink, palette.Ground, 1, (0, -1)));
        }
    }

    private static IEnumerable<double> Nice(double[,] values)
    {
        double low = values.Cast<double>().Min(), high = values.Cast<double>().Max();
        if (!(high - low > 1e-4))
            yield break;
        double step = Plot.NiceStep(high - low, 5);
        for (double level = Math.Ceiling(low / step) * step; level < high; level += step)
            yield return level;
    }

    private static Axis AxisOf(string lot, double[] loadings) => new(
        $"{InterFont.Fitted(InterFont.Writable(lot, TextWeight.Regular), 10.5, TextWeight.Regular, 300)} / mg/mL", loadings[0], loadings[^1], Plot.NiceStep(loadings[^1] - loadings[0], 9));

    private static double Loading(Film film, string lot) =>
        film.Layers.SelectMany(layer => layer.Dots).Where(dots => dots.Lot.Name == lot).Max(dots => dots.LoadingMgPerMl);

    private static string Description(LoadingMap map, WhiteTarget target, double[] first, double[] second, double[,] error, (int First, int Second) best) => string.Create(
        CultureInfo.InvariantCulture,
        $"Nearest to the target white {target.WhiteX:0.0000}, {target.WhiteY:0.0000} at about {first[best.First]:0.00} mg/mL of {map.FirstLot} and {second[best.Second]:0.00} mg/mL of {map.SecondLot}, {error[best.First, best.Second]:0.0000} in xy away.");

    private static string Percent(double share) => string.Create(CultureInfo.InvariantCulture, $"{share * 100:0.##}\u2009%");
}
