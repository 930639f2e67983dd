using Colorimetry;
using FilmDesign;
using FilmOptics;
using FilmReports.Charts;
using FilmReports.Drawings;

namespace Dotcoat.Tests.Reports;

public sealed class ChartPartTests
{
    // NIST/SEMATECH e-Handbook of Statistical Methods, 6.3.2.2, individuals chart of ten flow rates (from memory): limits as printed.
    [Fact]
    public void ControlLimits_OfTheHandbooksTenFlowRates_AreThosePrinted()
    {
        var limits = ControlLimits.OfIndividuals(FlowRates);
        Assert.Equal(50.81, limits.Centre, 0.005);
        Assert.Equal(55.8041, limits.Upper, 0.00005);
        Assert.Equal(45.8159, limits.Lower, 0.00005);
    }

    [Fact]
    public void ControlChart_AValueBeyondALimit_CarriesARing()
    {
        Assert.DoesNotContain(Control(FlowRates).Marks, mark => mark is Disc { Fill: null });
        Assert.Single(Control([.. FlowRates, 56]).Marks, mark => mark is Disc { Fill: null });
    }

    // A cone's contour is a circle: every point lies at its radius, the line closes, its length is the circumference.
    [Fact]
    public void Contours_OfACone_AreACircle()
    {
        double[] axis = [.. Enumerable.Range(0, 201).Select(i => -1 + (i / 100.0))];
        var line = Assert.Single(Contours.Of(axis, axis, Grid(axis, (x, y) => Math.Sqrt((x * x) + (y * y))), 0.6));
        Assert.Equal(line[0], line[^1]);
        Assert.All(line, p => Assert.Equal(0.6, Math.Sqrt((p.X * p.X) + (p.Y * p.Y)), 1e-4));
        double length = line.Zip(line.Skip(1), (a, b) => Math.Sqrt(Math.Pow(b.X - a.X, 2) + Math.Pow(b.Y - a.Y, 2))).Sum();
        Assert.Equal(2 * Math.PI * 0.6, length, 1e-3);
    }

    [Fact]
    public void Contours_OfASaddle_AreTwoLinesThatDoNotCross()
    {
        double[] axis = [.. Enumerable.Range(0, 20).Select(i => -0.95 + (i / 10.0))];
        // So near to the saddle that all four edges of the middle cell are crossed.
        foreach (double level in (double[])[0.001, -0.001])
        {
            var lines = Contours.Of(axis, axis, Grid(axis, (x, y) => x * y), level);
            Assert.Equal(2, lines.Count);
            Assert.All(lines, line => Assert.Single(line.Select(p => Math.Sign(p.X)).Distinct()));
        }
    }

    [Fact]
    public void Contours_OfAPlaneOrOfAnotherLevel_AreOneLineOrNone()
    {
        double[] axis = [0, 1, 2];
        var values = Grid(axis, (x, y) => x);
        Assert.All(Assert.Single(Contours.Of(axis, axis, values, 0.25)), p => Assert.Equal(0.25, p.X, 1e-12));
        Assert.Empty(Contours.Of(axis, axis, values, 5));
    }

    [Fact]
    public void FineGrid_KeepsOldPointsAndFollowsAParabola()
    {
        double[] axis = [0, 1, 2, 3, 4, 5];
        double[] fine = [.. FineGrid.Axis(axis, 4)];
        var refined = FineGrid.Refined(Grid(axis, (x, y) => (x * x) - y), 4);
        for (int i = 0; i < fine.Length; i++)
        {
            for (int j = 0; j < fine.Length; j++)
            {
                // Beyond the first and last step there is a neighbour on both sides, and a parabola is met exactly.
                if (i % 4 == 0 || fine[i] is >= 1 and <= 4)
                    Assert.Equal((fine[i] * fine[i]) - fine[j], refined[i, j], 1e-12);
            }
        }
    }

    [Theory]
    [InlineData(0.5, 0.5, true)]
    [InlineData(1.5, 0.5, false)]
    [InlineData(0.5, -0.1, false)]
    [InlineData(-0.5, 0.5, false)]
    [InlineData(0.9, 0.9, false)]
    public void ScatterWindow_HoldsWhatLiesInside(double x, double y, bool isInside) =>
        Assert.Equal(isInside, Scatter.Holds(new("", [(0, 0), (1, 0), (0.75, 0.75), (0, 1)]), new(x, y)));

    [Theory]
    [InlineData(new[] { 0.0, 0.93 }, 0, 1)]
    [InlineData(new[] { -3.0, 7 }, -4, 8)]
    [InlineData(new[] { 5.0, 5 }, 4.9, 5.1)]
    [InlineData(new double[0], 0, 0)]
    public void Axis_HoldsEveryValue(double[] values, double below, double above)
    {
        var axis = Axis.Holding("x", values);
        Assert.True(axis.From <= below && axis.To >= above && axis.Step > 0, axis.ToString());
        Assert.True((axis.To - axis.From) / axis.Step is >= 1 and < 12, axis.ToString());
    }

    [Fact]
    public void Axis_OfRoundingNoise_SpansTheLeast()
    {
        var axis = Axis.Holding("x", [0, 1e-16, -2e-16], 4, 0.02);
        Assert.True(axis.To - axis.From is >= 0.02 and < 0.05, axis.ToString());
    }

    [Fact]
    public void Bars_EndAtTheirValuesWithWhiskersOfTheirErrors()
    {
        var drawing = ABarChart(Palette.Light);
        Shape[] bars = [.. drawing.Marks.OfType<Shape>().Where(shape => shape.Fill is not null)];
        double perUnit = (bars[0].Spots.Max(s => s.X) - bars[0].Spots.Min(s => s.X)) / 0.254;
        Assert.Equal(0.333 * perUnit, bars[1].Spots.Max(s => s.X) - bars[1].Spots.Min(s => s.X), 1e-9);
        var whisker = drawing.Marks.OfType<Shape>().First(shape => shape is { Closed: false, Spots.Count: 2, Stroke.Width: 1.2 });
        Assert.Equal(2 * 0.012 * perUnit, whisker.Spots[1].X - whisker.Spots[0].X, 1e-9);
    }

    // Greyscale and colour-blind readers: nothing hangs on hue.
    [Fact]
    public void Strokes_WithoutTheirHue_AreStillDifferent()
    {
        var lights = new[] { 450.0, 530, 630 }.Select(peakNm => Palette.Light.OfEmitter(peakNm)).ToList();
        Assert.Equal(3, lights.Select(light => light.Mark).Distinct().Count());
        Assert.Equal(3, lights.Select(light => string.Join(' ', light.Dash ?? [])).Distinct(StringComparer.Ordinal).Count());
        var films = Enumerable.Range(0, 6).Select(i => Lines.StrokeOf(i, Palette.Light)).ToList();
        Assert.Equal(6, films.Select(stroke => $"{stroke.Width} {string.Join(' ', stroke.Dash ?? [])}").Distinct(StringComparer.Ordinal).Count());
    }

    [Fact]
    public void LogPlot_ThereAndBack_IsTheSameValue()
    {
        var plot = new Plot(Palette.Light, new Box(0, 0, 100, 300), (0, 1), (1e-4, 1), isLogUp: true);
        Assert.Equal(150, plot.At(0, 0.01).Y, 1e-9);
        Assert.Equal(0.003, plot.ValueAt(plot.At(0.5, 0.003)).Y, 1e-12);
    }

    [Fact]
    public void LoadingMap_AtTheFilesLoadings_IsTheFileAndItsNeighboursLieWhereLoadingsSay()
    {
        var filmCase = ReportFilms.Demo("desk-monitor");
        var told = new List<double>();
        var map = LoadingMap.Compute(filmCase, new BeerLambertModel(), 3, new Told(told), TestContext.Current.CancellationToken);
        var film = ReportFilm.Of(filmCase, new BeerLambertModel());
        Assert.Equal(film.Appraisal.Panel!.White.Chromaticity.X, map.Points[1][1].White.X, 1e-12);
        Assert.Equal(film.Appraisal.Efficiency.BlueLeakagePhotonShare, map.Points[1][1].LeakageShare, 1e-12);
        Assert.Equal(film.Appraisal.Gamut![0].CoverageXy, map.Points[1][1].CoverageXyShare!.Value, 1e-12);
        Assert.Equal(9, told.Count);
        Assert.Equal(1, told[^1]);
        // More dots of either kind, less blue; more red, white to the right; more green, white upward.
        Assert.True(map.Points[2][2].LeakageShare < map.Points[1][1].LeakageShare);
        Assert.True(map.Points[1][2].White.X > map.Points[1][0].White.X);
        Assert.True(map.Points[2][1].White.Y > map.Points[0][1].White.Y);
    }

    [Fact]
    public void LoadingMap_Cancelled_Stops()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();
        Assert.ThrowsAny<OperationCanceledException>(() => LoadingMap.Compute(ReportFilms.Demo("desk-monitor"), new BeerLambertModel(), 3, null, source.Token));
    }

    [Fact]
    public void LoadingMap_OfLotsThatCannotMove_IsRefused()
    {
        var filmCase = ReportFilms.Demo("desk-monitor");
        var (target, film) = (filmCase.Target!, filmCase.Film);
        RequireRefused(filmCase with { Target = target with { Free = [target.Free[0] with { MinMgPerMl = 6, MaxMgPerMl = 6 }, target.Free[1]] } }, "at one loading");
        RequireRefused(filmCase with { Film = film.WithLoadings((_, _) => 0) }, "loading of 0");

        static void RequireRefused(FilmCase refused, string says) => Assert.Contains(
            says,
            Assert.Throws<InputException>(() => LoadingMap.Compute(refused, new BeerLambertModel(), 3, null, TestContext.Current.CancellationToken)).Message,
            StringComparison.Ordinal);
    }

    internal static double[] FlowRates { get; } = [49.6, 47.6, 49.9, 51.3, 47.8, 51.2, 52.6, 52.4, 53.6, 52.1];

    internal static Drawing Control(double[] values) => ControlChart.Of(
        new("control", "Flow rate", "Ten flow rates."), "flow rate", values, ControlLimits.OfIndividuals(FlowRates), Palette.Light);

    internal static Drawing ABarChart(Palette palette) => Bars.Of(
        new("bars", "Photons leaving above", "Shares of two lots."), "share of source photons", [new("green K07", 0.254, 0.012), new("red K23", 0.333, 0.02), new("other", -0.02)], palette);

    private static double[,] Grid(double[] axis, Func<double, double, double> value)
    {
        var values = new double[axis.Length, axis.Length];
        for (int i = 0; i < axis.Length; i++)
        {
            for (int j = 0; j < axis.Length; j++)
                values[i, j] = value(axis[i], axis[j]);
        }

        return values;
    }

    private sealed class Told(List<double> shares) : IProgress<double>
    {
        public void Report(double value) => shares.Add(value);
    }
}
