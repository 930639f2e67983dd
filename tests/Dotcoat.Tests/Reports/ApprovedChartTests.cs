using Colorimetry;
using FilmDesign;
using FilmOptics;
using FilmReports;
using FilmReports.Charts;
using FilmReports.Drawings;

namespace Dotcoat.Tests.Reports;

/// <summary>
/// Charts that no demo report holds, and dark ones, against pictures in approved/. To approve a change, run with DOTCOAT_APPROVE=1, look at every
/// picture that changed, and commit it.
/// </summary>
public sealed class ApprovedChartTests
{
    private static readonly Dictionary<string, Func<Drawing>> Drawers = new(StringComparer.Ordinal)
    {
        ["control"] = () => ChartPartTests.Control([.. ChartPartTests.FlowRates, 56]),
        ["bars"] = () => ChartPartTests.ABarChart(Palette.Light),
        ["scatter"] = ScatterWithWindows,
        ["loading-map"] = () => LoadingMapChart.Of(Desk, LoadingMap.Compute(Desk, new BeerLambertModel(), 9, null, TestContext.Current.CancellationToken), Palette.Light),
        ["halo"] = () => ZoneChart.Of([("A", Profile(0.15)), ("B", Profile(0.45)), ("C", Profile(0.9))], Palette.Light),
        ["colour-over-angle"] = Angles,
        ["spectra"] = () => FilmSpectraChart.Of(Films, Palette.Light),
        ["whites"] = () => FilmWhitesChart.Of(Films, Palette.Light),
    };

    private static readonly string[] DarkOfDesk = ["spectrum", "chromaticity-1931", "chromaticity-1976", "photon-fates", "lots"];

    public static TheoryData<string> Names => [.. Drawers.Keys];

    private static IReadOnlyList<ReportedFilm> Films =>
        [.. new[] { "desk-monitor", "living-room-tv", "off target" }.Select(ReportFilms.Named).Select(film => new ReportedFilm(film.Case, film.Appraisal))];

    private static FilmCase Desk => ReportFilms.Demo("desk-monitor");

    [Theory]
    [MemberData(nameof(Names))]
    public void Chart_Redrawn_IsTheApprovedPicture(string name)
    {
        var drawing = Drawers[name]();
        RequireLegible(drawing);
        RequireApproved(name, CanvasRenderer.Png(drawing, Palette.Light.Ground));
    }

    [Fact]
    public void DarkCharts_Redrawn_AreTheApprovedPictures()
    {
        var (filmCase, appraisal) = ReportFilms.Named("desk-monitor");
        foreach (var drawing in FilmReport.Drawings(filmCase, appraisal, Palette.Dark))
        {
            Assert.Contains(drawing.Name, DarkOfDesk, StringComparer.Ordinal);
            RequireApproved($"dark-{drawing.Name}", CanvasRenderer.Png(drawing, Palette.Dark.Ground, 1));
        }
    }

    private static void RequireLegible(Drawing drawing)
    {
        var boxes = TextBox.AllOf(drawing);
        Assert.All(boxes, box => Assert.True(box.LiesInside(drawing.Width, drawing.Height), box.Words.Text));
        for (int i = 0; i < boxes.Count; i++)
            Assert.All(boxes.Take(i), box => Assert.False(box.Overlaps(boxes[i]), $"{box.Words.Text} covers {boxes[i].Words.Text}"));
    }

    private static void RequireApproved(string name, byte[] png)
    {
        string path = Path.Combine(Commands.Repository.Root, "tests", "Dotcoat.Tests", "Reports", "approved", $"{name}.png");
        if (Environment.GetEnvironmentVariable("DOTCOAT_APPROVE") == "1")
        {
            Directory.CreateDirectory(Path.GetDirectoryName(path)!);
            File.WriteAllBytes(path, png);
        }

        Assert.True(File.Exists(path), $"{name}.png is not approved");
        Assert.Null(ApprovedPicture.Difference(File.ReadAllBytes(path), png));
    }

    private static Drawing ScatterWithWindows()
    {
        var frame = new ChartFrame(
            new("scatter", "Whites of a lot", "Four whites and a window.", "stroke through a dot: outside"), new("x", 0.30, 0.33, 0.005), new("y", 0.32, 0.34, 0.005), Palette.Light, 300, 200);
        Scatter.Draw(
            frame.Plot,
            [new(0.3127, 0.329, "A"), new(0.314, 0.3305, "B"), new(0.3275, 0.338, "C"), new(0.309, 0.327, "D", IsFilled: false)],
            [new("window", [(0.306, 0.324), (0.32, 0.326), (0.322, 0.336), (0.308, 0.333)])],
            Palette.Light);
        return frame.Finish();
    }

    // Invented: an exponential halo, ever yellower outside.
    private static ZoneProfile Profile(double reachMm) => new(20, [.. Enumerable.Range(0, 181).Select(i => i / 10.0).Select(distanceMm =>
    {
        double beyond = (distanceMm - 10) / reachMm;
        double luminance = beyond < 0 ? 1 - (0.5 * Math.Exp(beyond)) : 0.5 * Math.Exp(-beyond);
        return new ZonePoint(distanceMm, luminance, 0.001, Chromaticity.FromUvPrime(0.1978, 0.4683 + (0.05 / (1 + Math.Exp(-beyond)))));
    })]);

    private static Drawing Angles()
    {
        var output = new DiscreteOrdinatesModel(withAngles: true).Solve(Desk.Film, TestContext.Current.CancellationToken);
        return AngleChart.Of(Desk, output.Angles!, Palette.Light);
    }
}
