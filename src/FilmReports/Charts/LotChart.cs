using System.Globalization;
using Colorimetry;
using FilmOptics;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>Optical density that each lot gives the film at its loading, with its emission and the source: what overlaps with what.</summary>
internal static class LotChart
{
    private const double RowHeight = 150, RowPitch = RowHeight + 66, FirstTop = 66, Left = 66, Right = 586;

    public static Drawing Of(FilmCase filmCase, Palette palette)
    {
        var film = filmCase.Film;
        int[] used = [.. Enumerable.Range(0, film.Lots.Count).Where(i => LayersWith(film, film.Lots[i]).Any())];
        var marks = new List<Mark>
        {
            new Words("Lots in the film: absorption and emission", new(Left, 26), TextAnchor.Start, 13, TextWeight.SemiBold, palette.Ink),
            new Words("emission and source: relative", new(Right, 26), TextAnchor.End, 9, TextWeight.Regular, palette.Faint),
        };
        for (int row = 0; row < used.Length; row++)
            marks.AddRange(Row(film, used[row], FirstTop + (row * RowPitch), palette));
        if (used.Length == 0)
            marks.Add(new Words("No layer holds dots.", new(Left, 60), TextAnchor.Start, 10, TextWeight.Regular, palette.Ink));
        return new Drawing(
            "lots",
            "Absorption and emission of the lots in the film",
            used.Length == 0 ? "No layer holds dots." : string.Join(' ', used.Select(i => string.Create(
                CultureInfo.InvariantCulture, $"{film.Lots[i].Name}: emission peak {LightMarks.PeakNm(film.Lots[i].Emission)} nm, yield in film {film.Lots[i].FilmYieldShare:0.000}."))),
            640,
            used.Length == 0 ? 90 : FirstTop + (used.Length * RowPitch) - 22,
            marks);
    }

    private static IReadOnlyList<Mark> Row(Film film, int index, double top, Palette palette)
    {
        var lot = film.Lots[index];
        var (fromNm, toNm) = LightMarks.Range([lot.Emission, film.Backlight.Photons]);
        int[] axis = [.. Enumerable.Range(fromNm, toNm - fromNm + 1)];
        double[] density = [.. axis.Select(nm => OpticalDensity(film, lot, nm))];
        double highest = Math.Max(density.Max(), 1e-6), step = Plot.NiceStep(highest, 4), limit = Math.Ceiling(highest * 1.15 / step) * step;
        var plot = new Plot(palette, new Box(Left, top, Right, top + RowHeight), (fromNm, toNm), (0, limit));
        plot.Axes(20, "wavelength / nm", step, "optical density");
        var (colour, dash, mark) = palette.OfEmitter(LightMarks.PeakNm(lot.Emission));
        Area(plot, film.Backlight.Photons, palette.Source);
        Area(plot, lot.Emission, colour);
        plot.Line(axis.Select((nm, i) => ((double)nm, density[i])), new Stroke(palette.Ink, 1.8));
        plot.Line(axis.Select(nm => ((double)nm, Relative(lot.Emission, nm, limit))), new Stroke(colour, 1.8, dash));
        int peakNm = LightMarks.PeakNm(lot.Emission), sourceNm = LightMarks.PeakNm(film.Backlight.Photons);
        var peak = plot.At(peakNm, Relative(lot.Emission, peakNm, limit));
        plot.Over(LightMarks.Sign(mark, peak, 4, colour));
        plot.Labels.KeepOff(Box.About(peak, 5));
        Label("emission", peak, (1, 0));
        Label("source", plot.At(sourceNm, Relative(film.Backlight.Photons, sourceNm, limit)), (1, 0));
        Label("absorption", plot.At(fromNm, density[0]), (1, -1));
        // A long name gives way to the figures.
        string figures = string.Create(CultureInfo.InvariantCulture, $": {LoadingText(film, lot)}, yield in film {lot.FilmYieldShare:0.000}");
        double room = Math.Max(150, Right - Left - InterFont.WidthOf(figures, 10.5, TextWeight.SemiBold));
        string heading = InterFont.Fitted(ChartNames.OfLot(film, index), 10.5, TextWeight.SemiBold, room) + figures;
        return
        [
            new Words(InterFont.Fitted(heading, 10.5, TextWeight.SemiBold, Right - Left), new(Left, top - 10), TextAnchor.Start, 10.5, TextWeight.SemiBold, palette.Ink),
            .. plot.Marks,
        ];

        void Label(string text, Spot at, (double X, double Y) prefer) =>
            plot.Over(plot.Labels.Place(text, at, 9.5, palette.Ink, palette.Ground, 8, prefer));
    }

    private static double Relative(Spectrum<PhotonPerNm> light, int nm, double limit) => light[nm] / light.Peak * limit * 0.92;

    private static void Area(Plot plot, Spectrum<PhotonPerNm> light, string colour)
    {
        var (fromNm, toNm) = ((int)plot.X.From, (int)plot.X.To);
        plot.Inside(new Shape(
            [plot.At(fromNm, 0), .. Enumerable.Range(fromNm, toNm - fromNm + 1).Select(nm => plot.At(nm, Relative(light, nm, plot.Y.To))), plot.At(toNm, 0)],
            Closed: true, colour, 0.1, null));
    }

    // Decadic, along the normal, this lot alone, all layers.
    private static double OpticalDensity(Film film, DotLot lot, int nm) => film.Layers.Sum(layer =>
        layer.Dots.Where(dots => dots.Lot.Name == lot.Name).Sum(dots => dots.AbsorptionPerMm(WavelengthGrid.IndexOf(nm))) * layer.ThicknessMm) / Math.Log(10);

    private static IEnumerable<int> LayersWith(Film film, DotLot lot) =>
        Enumerable.Range(0, film.Layers.Count).Where(i => film.Layers[i].Dots.Any(dots => dots.Lot.Name == lot.Name));

    private static string LoadingText(Film film, DotLot lot) => string.Join(", ", LayersWith(film, lot).Select(i => string.Create(
        CultureInfo.InvariantCulture,
        $"{film.Layers[i].Dots.First(dots => dots.Lot.Name == lot.Name).LoadingMgPerMl:0.###}\u2009mg/mL in {InterFont.Fitted(ChartNames.OfLayer(film, i), 10.5, TextWeight.SemiBold, 100)}")));
}
