using System.Globalization;
using Colorimetry;
using FilmOptics;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>Absorption of each lot at its loading and its emission, with the source: what overlaps with what.</summary>
internal static class LotChart
{
    private const int FromNm = 400, ToNm = 740;
    private const double RowHeight = 150;

    public static Drawing Of(FilmCase filmCase, Palette palette)
    {
        var film = filmCase.Film;
        DotLot[] used = [.. film.Lots.Where(lot => film.Layers.Any(layer => layer.Dots.Any(dots => dots.Lot.Name == lot.Name)))];
        var marks = new List<Mark>
        {
            new Words("Lots in the film: absorption and emission", new(66, 26), TextAnchor.Start, 13, TextWeight.SemiBold, palette.Ink),
        };
        for (int i = 0; i < used.Length; i++)
            marks.AddRange(Row(film, used[i], 52 + (i * (RowHeight + 62)), palette));
        if (used.Length == 0)
            marks.Add(new Words("No layer holds dots.", new(66, 60), TextAnchor.Start, 10, TextWeight.Regular, palette.Ink));
        return new Drawing(
            "lots",
            "Absorption and emission of the lots in the film",
            string.Join(' ', used.Select(lot => string.Create(CultureInfo.InvariantCulture, $"{lot.Name}: emission peak {SpectrumChart.PeakNm(lot.Emission)} nm, yield in film {lot.FilmYieldShare:0.000}."))),
            640,
            Math.Max(90, 52 + (used.Length * (RowHeight + 62))),
            marks);
    }

    private static IReadOnlyList<Mark> Row(Film film, DotLot lot, double top, Palette palette)
    {
        var absorptance = Enumerable.Range(FromNm, ToNm - FromNm + 1).Select(nm => (Nm: nm, Share: Absorptance(film, lot, nm))).ToArray();
        double highest = absorptance.Max(a => a.Share);
        double step = Plot.NiceStep(Math.Max(highest, 1e-6), 4);
        double limit = Math.Ceiling(Math.Max(highest, 1e-6) * 1.15 / step) * step;
        var plot = new Plot(palette, new Box(66, top, 586, top + RowHeight), (FromNm, ToNm), (0, limit), new Box(66, top - 16, 632, top + RowHeight));
        plot.Axes(20, "wavelength / nm", step, "absorbed in one pass", "0", step < 0.01 ? "0.000" : step < 0.1 ? "0.00" : "0.0");
        var (colour, dash, mark) = palette.OfEmitter(SpectrumChart.PeakNm(lot.Emission));
        Area(plot, film.Backlight.Photons.Samples, film.Backlight.Photons.Peak, limit, palette.Source);
        Area(plot, lot.Emission.Samples, lot.Emission.Peak, limit, colour);
        plot.Line(absorptance.Select(a => ((double)a.Nm, a.Share)), new Stroke(palette.Ink, 1.8));
        plot.Line(Enumerable.Range(FromNm, ToNm - FromNm + 1).Select(nm => ((double)nm, lot.Emission[nm] / lot.Emission.Peak * limit * 0.95)), new Stroke(colour, 1.8, dash));
        foreach (var (nm, share) in absorptance.Where((_, i) => i % 3 == 0))
            plot.Labels.KeepOff(Box.About(plot.At(nm, share), 2));
        int peakNm = SpectrumChart.PeakNm(lot.Emission);
        var peak = plot.At(peakNm, limit * 0.95);
        plot.Over(SpectrumChart.Sign(mark, peak, 4, colour));
        plot.Labels.KeepOff(Box.About(peak, 5));
        plot.Over(plot.Labels.Place("emission", peak, 9.5, palette.Ink, palette.Ground, 8, (1, 0)));
        int sourceNm = SpectrumChart.PeakNm(film.Backlight.Photons);
        plot.Over(plot.Labels.Place("source", plot.At(sourceNm, limit * 0.3), 9.5, palette.Ink, palette.Ground, 12, (1, 0)));
        plot.Over(plot.Labels.Place("absorption", plot.At(FromNm + 12, absorptance[12].Share), 9.5, palette.Ink, palette.Ground, 8, (1, -1)));
        return
        [
            new Words(
                string.Create(CultureInfo.InvariantCulture, $"{lot.Name}: {Loadings(film, lot)}, yield in film {lot.FilmYieldShare:0.000}"),
                new(66, top - 8), TextAnchor.Start, 10.5, TextWeight.SemiBold, palette.Ink),
            .. plot.Marks,
        ];
    }

    private static void Area(Plot plot, ReadOnlySpan<double> samples, double peak, double limit, string colour)
    {
        var corners = new List<Spot> { plot.At(FromNm, 0) };
        for (int nm = FromNm; nm <= ToNm; nm++)
            corners.Add(plot.At(nm, samples[WavelengthGrid.IndexOf(nm)] / peak * limit * 0.95));
        corners.Add(plot.At(ToNm, 0));
        plot.Inside(new Shape(corners, Closed: true, colour, 0.1, null));
    }

    // Along the normal, this lot alone, all layers.
    private static double Absorptance(Film film, DotLot lot, int nm)
    {
        int index = WavelengthGrid.IndexOf(nm);
        double depth = film.Layers.Sum(layer => layer.Dots.Where(dots => dots.Lot.Name == lot.Name).Sum(dots => dots.AbsorptionPerMm(index)) * layer.ThicknessMm);
        return 1 - Math.Exp(-depth);
    }

    private static string Loadings(Film film, DotLot lot) => string.Join(", ", film.Layers
        .SelectMany(layer => layer.Dots.Where(dots => dots.Lot.Name == lot.Name).Select(dots => string.Create(
            CultureInfo.InvariantCulture, $"{dots.LoadingMgPerMl:0.###} mg/mL in {layer.Name}"))));
}
