using Colorimetry;
using FilmReports.Charts;
using FilmReports.Drawings;

namespace Dotcoat.Tests.Reports;

public sealed class ChartTests
{
    public static TheoryData<string> Films => ReportFilms.Names;

    [Theory]
    [MemberData(nameof(Films))]
    public void FlowPicture_WidthsOfStreams_AddUpToTheSource(string film)
    {
        var (filmCase, appraisal) = ReportFilms.Named(film);
        var streams = FatesChart.Streams(filmCase, appraisal, Palette.Light);
        Assert.Equal(appraisal.Output.Budget.Sum, streams.Sum(s => s.Share), 1e-9);
        Assert.DoesNotContain(streams, s => s is { LeavesAbove: false, Share: < FatesChart.PooledShare } && s.Name != "other losses");

        var drawing = FatesChart.Of(filmCase, appraisal, Palette.Light);
        // The stream that comes in is the one shape of five corners; the streams are the long ones that begin where it ends.
        var source = drawing.Marks.OfType<Shape>().Single(s => s.Spots.Count == 5);
        double right = source.Spots.Max(s => s.X), top = source.Spots.Min(s => s.Y), bottom = source.Spots.Max(s => s.Y);
        var widths = drawing.Marks.OfType<Shape>().Where(s => s.Spots.Count > 20).Select(s => (From: s.Spots[0], To: s.Spots[^1])).ToList();
        Assert.Equal(streams.Count, widths.Count);
        Assert.All(widths, w => Assert.Equal(right, w.From.X, 1e-9));
        Assert.Equal(bottom - top, widths.Sum(w => w.To.Y - w.From.Y), 1e-9);
        foreach (var (stream, width) in streams.Zip(widths))
            Assert.Equal(stream.Share / streams.Sum(s => s.Share), (width.To.Y - width.From.Y) / (bottom - top), 1e-9);
        // Side by side without gap or overlap: sorted from the top, each begins where the one before ends.
        double at = top;
        foreach (var (from, to) in widths.OrderBy(w => w.From.Y).ThenBy(w => w.To.Y))
        {
            Assert.Equal(at, from.Y, 1e-6);
            at = to.Y;
        }
    }

    [Fact]
    public void FlowPicture_SmallLosses_AreSummedNotDropped()
    {
        var (filmCase, appraisal) = ReportFilms.Named("desk-monitor");
        var budget = appraisal.Output.Budget;
        double small = ((double[])[budget.LostBelow, budget.LostAbove, budget.LostInHost, budget.LostAtEdges, .. budget.LostInLots]).Where(l => l < 0.005).Sum();
        Assert.InRange(small, 1e-6, 0.02);
        Assert.Equal(small, FatesChart.Streams(filmCase, appraisal, Palette.Light).Single(s => s.Name == "other losses").Share, 1e-12);
    }

    [Theory]
    [InlineData(ChromaticityDiagram.Xy1931)]
    [InlineData(ChromaticityDiagram.UvPrime1976)]
    public void Scale_ThereAndBack_IsTheSameChromaticity(ChromaticityDiagram diagram)
    {
        var scale = new ChromaticityScale(new Plot(Palette.Light, new Box(60, 40, 600, 620), (-0.06, 0.78), (-0.02, 0.88)), diagram);
        foreach (var standard in ColourGamut.All)
        {
            foreach (var c in new[] { standard.Red, standard.Green, standard.Blue, standard.White })
            {
                var back = scale.ChromaticityAt(scale.At(c));
                Assert.Equal(c.X, back.X, 1e-12);
                Assert.Equal(c.Y, back.Y, 1e-12);
            }
        }
    }

    // The panel is the only filled triangle, and its corners are the primaries: coordinates read back from the drawing.
    [Theory]
    [InlineData(ChromaticityDiagram.Xy1931)]
    [InlineData(ChromaticityDiagram.UvPrime1976)]
    public void ChromaticityChart_ThePanel_IsTheOnlyFilledTriangle(ChromaticityDiagram diagram)
    {
        var (filmCase, appraisal) = ReportFilms.Named("living-room-tv");
        var drawing = ChromaticityChart.Of(filmCase, appraisal, diagram, Palette.Light);
        var triangles = drawing.Marks.OfType<Window>().SelectMany(w => w.Marks).OfType<Shape>().Where(s => s is { Closed: true, Spots.Count: 3 }).ToList();
        var panel = Assert.Single(triangles, t => t.Fill is not null);
        Assert.Equal(0.08, panel.FillOpacity);
        // sRGB's edge, the standards, the panel.
        Assert.Equal(1 + ChromaticityChart.Standards(appraisal).Count + 1, triangles.Count);
        // Areas on paper are in proportion to areas in the diagram: BT.709's triangle (dotted) against the panel's.
        var srgb = triangles.Single(t => t.Stroke?.Dash is not null);
        double onPaper = Area(panel.Spots) / Area(srgb.Spots);
        double inDiagram = GamutCoverage.AreaRatio(appraisal.Panel!.Red, appraisal.Panel.Green, appraisal.Panel.Blue, ColourGamut.Named("BT.709"), diagram);
        Assert.Equal(inDiagram, onPaper, 1e-9);
    }

    [Fact]
    public void ChromaticityChart_StandardsOfTheSamePrimaries_ShareOneName()
    {
        var (_, appraisal) = ReportFilms.Named("every gamut");
        Assert.Contains("DCI-P3, P3-D65", ChromaticityChart.Standards(appraisal).Select(s => s.Name), StringComparer.Ordinal);
        Assert.Equal(ColourGamut.All.Count - 1, ChromaticityChart.Standards(appraisal).Count);
    }

    // Of what tint the ground is: bluish near the blue primary, and so on; and it never reaches a full colour.
    [Fact]
    public void Ground_IsPaleAndPointsTheRightWay()
    {
        var (filmCase, appraisal) = ReportFilms.Named("desk-monitor");
        var drawing = ChromaticityChart.Of(filmCase, appraisal, ChromaticityDiagram.Xy1931, Palette.Light);
        var tiles = AllTiles(drawing.Marks).ToList();
        Assert.NotEmpty(tiles);
        foreach (var tile in tiles)
        {
            int[] rgb = [.. Enumerable.Range(0, 3).Select(c => Convert.ToInt32(tile.Fill.Substring(1 + (2 * c), 2), 16))];
            Assert.True(rgb.Max() - rgb.Min() <= 0.25 * 255 + 4, tile.Fill);
            Assert.True(rgb.Min() >= 0.74 * 0xf8, tile.Fill);
        }
    }

    // WCAG 2.2, 1.4.3 (text, 4.5) and 1.4.11 (graphics, 3): relative luminance as defined there.
    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void Palette_TextAndLines_HaveEnoughContrast(bool isLight)
    {
        var palette = isLight ? Palette.Light : Palette.Dark;
        Assert.All(new[] { palette.Ink, palette.Faint }, colour => Assert.True(Contrast(colour, palette.Ground) >= 4.5, colour));
        Assert.All(new[] { palette.Source, palette.Green, palette.Red }, colour => Assert.True(Contrast(colour, palette.Ground) >= 3, colour));
    }

    // WCAG 2.2 gives black on white as 21.
    [Fact]
    public void Contrast_OfBlackOnWhite_Is21() => Assert.Equal(21, Contrast("#000000", "#ffffff"), 1e-12);

    private static double Contrast(string a, string b)
    {
        double[] luminances = [.. new[] { a, b }.Select(Luminance).Order()];
        return (luminances[1] + 0.05) / (luminances[0] + 0.05);
    }

    private static double Luminance(string colour)
    {
        double[] linear = [.. Enumerable.Range(0, 3).Select(c => Convert.ToInt32(colour.Substring(1 + (2 * c), 2), 16) / 255.0)
            .Select(v => v <= 0.04045 ? v / 12.92 : Math.Pow((v + 0.055) / 1.055, 2.4))];
        return (0.2126 * linear[0]) + (0.7152 * linear[1]) + (0.0722 * linear[2]);
    }

    private static IEnumerable<Tiles> AllTiles(IEnumerable<Mark> marks) =>
        marks.SelectMany(mark => mark is Tiles tiles ? [tiles] : mark is Window window ? AllTiles(window.Marks) : []);

    private static double Area(IReadOnlyList<Spot> t) =>
        Math.Abs(((t[1].X - t[0].X) * (t[2].Y - t[0].Y)) - ((t[2].X - t[0].X) * (t[1].Y - t[0].Y))) / 2;
}
