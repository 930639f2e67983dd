using System.Collections.Concurrent;
using System.Globalization;
using Colorimetry;
using FilmOptics;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>A chromaticity diagram with standards, panel, whites and target, and an inset around the white that is judged.</summary>
internal static class ChromaticityChart
{
    private const double LabelSize = 8.5, FieldLeft = 60, FieldTop = 48;
    private static readonly int[] LabelledNm = [450, 470, 480, 490, 500, 510, 520, 530, 540, 550, 560, 570, 580, 590, 600, 620, 700];
    private static readonly int[] LabelledKelvin = [2000, 3000, 4000, 5000, 6500, 10000];

    // Neither depends on the film, and a page draws many films after one another.
    private static readonly Lazy<Chromaticity[]> BlackBodies = new(() => [.. Enumerable.Range(0, 121).Select(i => PlanckianLocus.At(1e6 / (40 + (i * 5))))]);
    private static readonly ConcurrentDictionary<(ChromaticityDiagram Diagram, string Ground), IReadOnlyList<Mark>> Grounds = new();

    public static Drawing Of(FilmCase filmCase, FilmAppraisal appraisal, ChromaticityDiagram diagram, Palette palette)
    {
        bool isXy = diagram == ChromaticityDiagram.Xy1931;
        // Equal scales across and up, or triangles would lie about their shape.
        double pointsPerUnit = isXy ? 640 : 800;
        (double From, double To) across = isXy ? (-0.06, 0.78) : (-0.03, 0.65), up = isXy ? (-0.02, 0.88) : (-0.01, 0.63);
        var field = new Box(
            FieldLeft, FieldTop, FieldLeft + ((across.To - across.From) * pointsPerUnit), FieldTop + ((up.To - up.From) * pointsPerUnit));
        var plot = new Plot(palette, field, across, up);
        var scale = new ChromaticityScale(plot, diagram);
        var inset = new WhiteInset(filmCase, appraisal, diagram, isXy
            ? new Box(field.Right - 192, field.Top + 4, field.Right - 4, field.Top + 188)
            : new Box(field.Right - 186, field.Bottom - 176, field.Right - 4, field.Bottom - 4), palette);
        plot.Labels.KeepOff(inset.Frame);
        Locus(scale, palette);
        plot.Axes(0.1, scale.AxisNames.Across, 0.1, scale.AxisNames.Up);
        Triangles(scale, filmCase, appraisal, palette);
        Whites(scale, filmCase, appraisal, palette);
        Planckian(scale, palette);
        plot.Inside(new Shape(scale.At(inset.Corners), Closed: true, null, 1, new Stroke(palette.Faint, 0.6)));
        string name = isXy ? "CIE 1931 xy" : "CIE 1976 u′v′";
        return new Drawing(
            isXy ? "chromaticity-1931" : "chromaticity-1976",
            $"{name} chromaticity diagram",
            Description(filmCase, appraisal, diagram),
            field.Right + 22,
            field.Bottom + 44,
            [
                new Words(name, new(field.Left, 26), TextAnchor.Start, 13, TextWeight.SemiBold, palette.Ink),
                new Words(
                    "tint: the direction of a colour as sRGB can show it; beyond the dotted line it cannot", new(field.Right, 26), TextAnchor.End, 9, TextWeight.Regular, palette.Faint),
                .. plot.Marks,
                .. inset.Marks(),
            ]);
    }

    /// <summary>The standards a film is compared with; those of the same primaries share one triangle and one label.</summary>
    internal static IReadOnlyList<(string Name, ColourGamut Gamut)> Standards(FilmAppraisal appraisal) =>
    [
        .. (appraisal.Gamut ?? [])
            .Select(comparison => ColourGamut.Named(comparison.Name))
            .GroupBy(standard => (standard.Red, standard.Green, standard.Blue))
            .Select(same => (string.Join(", ", same.Select(standard => standard.Name)), same.First())),
    ];

    private static void Locus(ChromaticityScale scale, Palette palette)
    {
        var plot = scale.Plot;
        Spot[] locus = [.. Enumerable.Range(380, 321).Select(nm => scale.At(Monochromatic(nm)))];
        plot.Inside(Grounds.GetOrAdd((scale.Diagram, palette.Ground), _ => [.. ChromaticityGround.Marks(scale, palette.Ground, locus)]));
        var srgb = ColourGamut.Named("BT.709"); // sRGB has its primaries: IEC 61966-2-1.
        plot.Inside(
            new Shape(locus, Closed: true, null, 1, new Stroke(palette.Ink, 1.1)),
            new Shape(scale.At(srgb.Red, srgb.Green, srgb.Blue), Closed: true, null, 1, new Stroke(palette.Faint, 2.2, [1.2, 3])));
        foreach (int nm in LabelledNm)
        {
            var (on, before, after) = (scale.At(Monochromatic(nm)), scale.At(Monochromatic(nm - 3)), scale.At(Monochromatic(nm + 3)));
            // The locus runs with the colours inside on its right, so outward is to the left of its direction.
            double dx = after.X - before.X, dy = after.Y - before.Y, length = Math.Sqrt((dx * dx) + (dy * dy)) + 1e-9;
            (double X, double Y) outward = (dy / length, -dx / length);
            plot.Over(new Shape([on, new(on.X + (outward.X * 4), on.Y + (outward.Y * 4))], Closed: false, null, 1, new Stroke(palette.Ink, 0.9)));
            plot.Over(plot.Labels.Place(nm.ToString(CultureInfo.InvariantCulture), on, LabelSize, palette.Faint, palette.Ground, 7, outward));
        }
    }

    private static Chromaticity Monochromatic(int nm)
    {
        var (observer, i) = (StandardObserver.Cie1931, WavelengthGrid.IndexOf(nm));
        return new Tristimulus(observer.XBar[i], observer.YBar[i], observer.ZBar[i]).Chromaticity;
    }

    private static void Planckian(ChromaticityScale scale, Palette palette)
    {
        scale.Plot.Inside(PlanckianLine(scale, palette));
        foreach (int kelvin in LabelledKelvin)
        {
            var on = scale.At(PlanckianLocus.At(kelvin));
            scale.Plot.Over(new Disc(on, 1.5, palette.Faint, null));
            scale.Plot.Over(scale.Plot.Labels.Place(
                $"{kelvin.ToString(CultureInfo.InvariantCulture)}\u2009K", on, LabelSize, palette.Faint, palette.Ground, 5, (0, 1)));
        }
    }

    /// <summary>Black bodies from 25 000 K to 1560 K.</summary>
    internal static Mark PlanckianLine(ChromaticityScale scale, Palette palette) => new Shape(
        scale.At(BlackBodies.Value), Closed: false, null, 1, new Stroke(palette.Faint, 0.9));

    private static void Triangles(ChromaticityScale scale, FilmCase filmCase, FilmAppraisal appraisal, Palette palette)
    {
        if (appraisal.Panel is not { } panel)
            return;
        var standards = Standards(appraisal);
        List<Spot[]> triangles = [.. standards.Select(s => scale.At(s.Gamut.Red, s.Gamut.Green, s.Gamut.Blue)), scale.At(panel.Red, panel.Green, panel.Blue)];
        foreach (var corners in triangles.SkipLast(1))
            scale.Plot.Inside(new Shape(corners, Closed: true, null, 1, new Stroke(palette.Ink, 0.7)));
        scale.Plot.Inside(new Shape(triangles[^1], Closed: true, palette.Ink, 0.08, new Stroke(palette.Ink, 1.8)));
        // Names keep clear of the whites, which are labelled later.
        foreach (var white in WhitesOf(filmCase, appraisal))
            scale.Plot.Labels.KeepOff(Box.About(scale.At(white), 8));
        for (int i = 0; i < triangles.Count; i++)
            scale.Plot.Over(EdgeLabel.Place(scale.Plot.Labels, i < standards.Count ? standards[i].Name : "panel", i, triangles, palette));
    }

    private static IEnumerable<Chromaticity> WhitesOf(FilmCase filmCase, FilmAppraisal appraisal)
    {
        yield return appraisal.FilmWhite.Chromaticity;
        if (appraisal.Panel is { } panel)
            yield return panel.White.Chromaticity;
        if (filmCase.Target is { } target)
            yield return new(target.WhiteX, target.WhiteY);
    }

    private static void Whites(ChromaticityScale scale, FilmCase filmCase, FilmAppraisal appraisal, Palette palette)
    {
        var plot = scale.Plot;
        plot.Inside(WhiteMarks.Of(scale, filmCase, appraisal, palette, 0.8));
        Label("film white", appraisal.FilmWhite.Chromaticity, (-1, 0));
        if (appraisal.Panel is { } panel)
            Label("panel white", panel.White.Chromaticity, (1, -1));

        void Label(string text, Chromaticity white, (double X, double Y) prefer)
        {
            plot.Labels.KeepOff(Box.About(scale.At(white), 4));
            plot.Over(plot.Labels.Place(text, scale.At(white), LabelSize, palette.Ink, palette.Ground, 12, prefer));
        }
    }

    private static string Description(FilmCase filmCase, FilmAppraisal appraisal, ChromaticityDiagram diagram)
    {
        string text = $"Film white at {Point(appraisal.FilmWhite.Chromaticity)}.";
        if (appraisal.Panel is { } panel)
            text += $" Panel white at {Point(panel.White.Chromaticity)}; red {Point(panel.Red)}; green {Point(panel.Green)}; blue {Point(panel.Blue)}.";
        if (filmCase.Target is { } target)
            text += $" Target {Point(new(target.WhiteX, target.WhiteY))}.";
        var names = Standards(appraisal).Select(s => s.Name).ToList();
        return names.Count > 0 ? $"{text} Triangles of {string.Join(", ", names)}." : text;

        string Point(Chromaticity c)
        {
            var (across, up) = ChromaticityScale.Coordinates(diagram, c);
            return string.Create(CultureInfo.InvariantCulture, $"{across:0.0000}, {up:0.0000}");
        }
    }
}
