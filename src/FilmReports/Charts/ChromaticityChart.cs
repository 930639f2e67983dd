using System.Globalization;
using Colorimetry;
using FilmOptics;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>A chromaticity diagram with standards, panel, whites and target, and an inset around the white.</summary>
internal static class ChromaticityChart
{
    private static readonly int[] LabelledNm = [450, 470, 480, 490, 500, 510, 520, 530, 540, 550, 560, 570, 580, 590, 600, 620, 700];
    private static readonly int[] LabelledKelvin = [2000, 3000, 4000, 6500, 10000];

    public static Drawing Of(FilmCase filmCase, FilmAppraisal appraisal, ChromaticityDiagram diagram, Palette palette)
    {
        bool xy = diagram == ChromaticityDiagram.Xy1931;
        var field = new Box(62, 44, 602, xy ? 644 : 584);
        var plot = new Plot(palette, field, xy ? (0, 0.8) : (0, 0.65), xy ? (0, 0.9) : (0, 0.65), new Box(8, 44, 632, field.Bottom));
        Locus(plot, diagram, palette);
        plot.Axes(0.1, xy ? "x" : "u′", 0.1, xy ? "y" : "v′", "0.0");
        Planckian(plot, diagram, palette, labelled: true);
        StandardTriangles(plot, [.. Standards(filmCase)], appraisal, diagram, palette);
        if (appraisal.Panel is { } panel)
            plot.Inside(new Shape([.. new[] { panel.Red, panel.Green, panel.Blue }.Select(c => At(plot, diagram, c))], Closed: true, palette.Ink, 0.08, new Stroke(palette.Ink, 1.8)));
        Whites(plot, filmCase, appraisal, diagram, palette, labelled: false);
        var inset = Inset(filmCase, appraisal, diagram, palette, xy ? new Box(398, 70, 592, 264) : new Box(392, 380, 586, 570));
        return new Drawing(
            xy ? "chromaticity-1931" : "chromaticity-1976",
            xy ? "CIE 1931 chromaticity" : "CIE 1976 chromaticity",
            Description(filmCase, appraisal),
            640,
            field.Bottom + 44,
            [
                new Words(xy ? "CIE 1931 xy" : "CIE 1976 u′v′", new(field.Left, 26), TextAnchor.Start, 13, TextWeight.SemiBold, palette.Ink),
                new Words("tint: what a screen can show, pale; dotted: where sRGB ends", new(602, 26), TextAnchor.End, 9, TextWeight.Regular, palette.Faint),
                .. plot.Marks,
                .. inset,
            ]);
    }

    private static Spot At(Plot plot, ChromaticityDiagram diagram, Chromaticity c) =>
        diagram == ChromaticityDiagram.Xy1931 ? plot.At(c.X, c.Y) : plot.At(c.UPrime, c.VPrime);

    private static IEnumerable<ColourGamut> Standards(FilmCase filmCase) =>
        (filmCase.Target?.Gamuts is { Count: > 0 } names ? names : ["BT.2020", "DCI-P3"])
        .Select(ColourGamut.Named)
        .DistinctBy(standard => (standard.Red, standard.Green, standard.Blue));

    private static void Locus(Plot plot, ChromaticityDiagram diagram, Palette palette)
    {
        var observer = StandardObserver.Cie1931;
        var locus = new List<Spot>();
        for (int nm = 380; nm <= 700; nm++)
            locus.Add(At(plot, diagram, Monochromatic(observer, nm)));
        plot.Inside(ChromaticityGround.Marks(plot, diagram, palette.Ground, locus));
        var srgb = ColourGamut.Named("BT.709");
        plot.Inside(
            new Shape(locus, Closed: true, null, 1, new Stroke(palette.Ink, 1.1)),
            new Shape([At(plot, diagram, srgb.Red), At(plot, diagram, srgb.Green), At(plot, diagram, srgb.Blue)], Closed: true, null, 1, new Stroke(palette.Faint, 2.2, [1.2, 3])));
        foreach (int nm in LabelledNm)
        {
            var on = At(plot, diagram, Monochromatic(observer, nm));
            var (before, after) = (At(plot, diagram, Monochromatic(observer, nm - 3)), At(plot, diagram, Monochromatic(observer, nm + 3)));
            // The locus runs with the colours inside on its right, so outward is to the left of its direction.
            double dx = after.X - before.X, dy = after.Y - before.Y, length = Math.Sqrt((dx * dx) + (dy * dy)) + 1e-9;
            (double X, double Y) outward = (dy / length, -dx / length);
            plot.Over(new Shape([on, new(on.X + (outward.X * 4), on.Y + (outward.Y * 4))], Closed: false, null, 1, new Stroke(palette.Ink, 0.9)));
            plot.Over(plot.Labels.Place(nm.ToString(CultureInfo.InvariantCulture), on, 8.5, palette.Faint, palette.Ground, 7, outward));
        }
    }

    private static Chromaticity Monochromatic(StandardObserver observer, int nm)
    {
        int i = WavelengthGrid.IndexOf(nm);
        return new Tristimulus(observer.XBar[i], observer.YBar[i], observer.ZBar[i]).Chromaticity;
    }

    private static void Planckian(Plot plot, ChromaticityDiagram diagram, Palette palette, bool labelled)
    {
        var line = Enumerable.Range(0, 120).Select(i => PlanckianLocus.At(1e6 / (40 + (i * 5)))).ToArray();
        plot.Inside(new Shape([.. line.Select(c => At(plot, diagram, c))], Closed: false, null, 1, new Stroke(palette.Faint, 0.9)));
        foreach (int kelvin in labelled ? LabelledKelvin : [])
        {
            var on = At(plot, diagram, PlanckianLocus.At(kelvin));
            plot.Over(new Disc(on, 1.6, palette.Faint, null));
            plot.Over(plot.Labels.Place($"{kelvin.ToString(CultureInfo.InvariantCulture)}\u2009K", on, 8.5, palette.Faint, palette.Ground, 6, (0.2, 1)));
        }
    }

    private static void StandardTriangles(Plot plot, IReadOnlyList<ColourGamut> standards, FilmAppraisal appraisal, ChromaticityDiagram diagram, Palette palette)
    {
        var triangles = standards.Select(s => new[] { At(plot, diagram, s.Red), At(plot, diagram, s.Green), At(plot, diagram, s.Blue) }).ToList();
        foreach (var corners in triangles)
            plot.Inside(new Shape(corners, Closed: true, null, 1, new Stroke(palette.Ink, 0.7)));
        if (appraisal.Panel is { } panel)
            triangles.Add([At(plot, diagram, panel.Red), At(plot, diagram, panel.Green), At(plot, diagram, panel.Blue)]);
        for (int i = 0; i < standards.Count; i++)
            plot.Over(EdgeLabel.Place(plot.Labels, standards[i].Name, i, triangles, palette));
    }

    private static void Whites(Plot plot, FilmCase filmCase, FilmAppraisal appraisal, ChromaticityDiagram diagram, Palette palette, bool labelled)
    {
        double size = labelled ? 1 : 0.8;
        if (filmCase.Target is { } target)
        {
            var wanted = new Chromaticity(target.WhiteX, target.WhiteY);
            var outline = Enumerable.Range(0, 48).Select(i => i * Math.PI / 24).Select(a =>
                At(plot, diagram, new(wanted.X + (target.ToleranceXy * Math.Cos(a)), wanted.Y + (target.ToleranceXy * Math.Sin(a)))));
            var at = At(plot, diagram, wanted);
            plot.Inside(new Shape([.. outline], Closed: true, null, 1, new Stroke(palette.Ink, 0.9)));
            plot.Inside(Cross(at, 6 * size, palette.Ink));
            Label("target", at, (1, -1));
        }

        var film = At(plot, diagram, appraisal.FilmWhite.Chromaticity);
        plot.Inside(new Disc(film, 4.5 * size, null, new Stroke(palette.Ink, 1.6)));
        Label("film white", film, (1, 0));
        if (appraisal.Panel is { } panel)
        {
            var white = At(plot, diagram, panel.White.Chromaticity);
            plot.Inside(new Disc(white, 3.2 * size, palette.Ink, null));
            Label("panel white", white, (-1, 1));
        }

        void Label(string text, Spot at, (double X, double Y) prefer)
        {
            if (!labelled)
                return;
            plot.Labels.KeepOff(Box.About(at, 5));
            plot.Over(plot.Labels.Place(text, at, 9, palette.Ink, palette.Ground, 9, prefer));
        }
    }

    private static IEnumerable<Mark> Cross(Spot at, double arm, string colour)
    {
        var stroke = new Stroke(colour, 1.1);
        yield return new Shape([new(at.X - arm, at.Y), new(at.X + arm, at.Y)], Closed: false, null, 1, stroke);
        yield return new Shape([new(at.X, at.Y - arm), new(at.X, at.Y + arm)], Closed: false, null, 1, stroke);
    }

    private static IReadOnlyList<Mark> Inset(FilmCase filmCase, FilmAppraisal appraisal, ChromaticityDiagram diagram, Palette palette, Box frame)
    {
        var shown = new List<Chromaticity> { appraisal.FilmWhite.Chromaticity };
        if (appraisal.Panel is { } panel)
            shown.Add(panel.White.Chromaticity);
        if (filmCase.Target is { } target)
            shown.Add(new(target.WhiteX, target.WhiteY));
        bool xy = diagram == ChromaticityDiagram.Xy1931;
        var across = shown.Select(c => xy ? c.X : c.UPrime).ToArray();
        var up = shown.Select(c => xy ? c.Y : c.VPrime).ToArray();
        double span = Math.Max(Math.Max(across.Max() - across.Min(), up.Max() - up.Min()) * 1.6, 0.004);
        double midX = (across.Max() + across.Min()) / 2, midY = (up.Max() + up.Min()) / 2;
        var field = new Box(frame.Left + 44, frame.Top + 8, frame.Right - 8, frame.Bottom - 34);
        var plot = new Plot(palette, field, (midX - (span / 2), midX + (span / 2)), (midY - (span / 2), midY + (span / 2)));
        double step = Plot.NiceStep(span, 3);
        plot.Axes(step, xy ? "x" : "u′", step, xy ? "y" : "v′", step < 0.001 ? "0.0000" : step < 0.01 ? "0.000" : "0.00");
        Planckian(plot, diagram, palette, labelled: false);
        Whites(plot, filmCase, appraisal, diagram, palette, labelled: true);
        return [new Shape(frame.Corners, Closed: true, palette.Ground, 1, new Stroke(palette.Hairline, 1)), .. plot.Marks];
    }

    private static string Description(FilmCase filmCase, FilmAppraisal appraisal)
    {
        string text = $"Film white at x {Digits(appraisal.FilmWhite.Chromaticity.X)}, y {Digits(appraisal.FilmWhite.Chromaticity.Y)}.";
        if (appraisal.Panel is { } panel)
        {
            text += $" Panel white at x {Digits(panel.White.Chromaticity.X)}, y {Digits(panel.White.Chromaticity.Y)};"
                + $" red {Digits(panel.Red.X)}, {Digits(panel.Red.Y)}; green {Digits(panel.Green.X)}, {Digits(panel.Green.Y)}; blue {Digits(panel.Blue.X)}, {Digits(panel.Blue.Y)}.";
        }

        return filmCase.Target is { } target ? $"{text} Target x {Digits(target.WhiteX)}, y {Digits(target.WhiteY)}." : text;
    }

    private static string Digits(double value) => value.ToString("0.0000", CultureInfo.InvariantCulture);
}
