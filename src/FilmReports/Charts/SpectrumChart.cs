using System.Globalization;
using Colorimetry;
using FilmOptics;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>The light leaving above by last emitter, with the panel's filters.</summary>
internal static class SpectrumChart
{
    private const int FromNm = 400, ToNm = 740;

    public static Drawing Of(FilmCase filmCase, FilmAppraisal appraisal, Palette palette)
    {
        double peak = appraisal.Power.Peak;
        double top = Math.Ceiling(peak * 1.12 / Plot.NiceStep(peak, 5)) * Plot.NiceStep(peak, 5);
        var plot = new Plot(palette, new Box(66, 44, 586, 344), (FromNm, ToNm), (0, top));
        if (filmCase.Panel is { } panel)
            Filters(plot, panel, top, palette);
        plot.Axes(20, "wavelength / nm", Plot.NiceStep(peak, 5), "power per nm and source watt / nm⁻¹", "0", top < 0.05 ? "0.000" : "0.00");
        Line(plot, appraisal.Power, new Stroke(palette.Ink, 2.4, Opacity: 0.35));
        KeepPeaksFree(plot, appraisal);
        Band(plot, "unconverted", appraisal.UnconvertedPower, palette.Source, null, LightMark.Triangle, palette);
        for (int i = 0; i < filmCase.Film.Lots.Count; i++)
        {
            var light = appraisal.ConvertedPowerByLot[i];
            if (light.Peak <= 0)
                continue;
            var (colour, dash, mark) = palette.OfEmitter(PeakNm(light));
            Band(plot, filmCase.Film.Lots[i].Name, light, colour, dash, mark, palette);
        }

        return new Drawing(
            "spectrum",
            "Light leaving above the film",
            string.Join(' ', appraisal.Bands.Where(b => b.PeakNm is not null).Select(b => string.Create(
                CultureInfo.InvariantCulture, $"{b.Name}: peak {b.PeakNm:0.0} nm, {b.Photons:0.0000} photons per source photon."))),
            640,
            388,
            [
                new Words("Light leaving above the film, by last emitter", new(66, 26), TextAnchor.Start, 13, TextWeight.SemiBold, palette.Ink),
                .. plot.Marks,
            ]);
    }

    /// <summary>Wavelength of the highest sample.</summary>
    internal static int PeakNm<TUnit>(Spectrum<TUnit> light)
        where TUnit : struct, ILightUnit => WavelengthGrid.NmAt(light.Samples.IndexOf(light.Peak));

    /// <summary>The sign of a kind of light: filled triangle, square or circle.</summary>
    internal static Mark Sign(LightMark mark, Spot at, double size, string colour) => mark switch
    {
        LightMark.Triangle => new Shape([new(at.X, at.Y - size), new(at.X + size, at.Y + (size * 0.8)), new(at.X - size, at.Y + (size * 0.8))], Closed: true, colour, 1, null),
        LightMark.Square => new Shape(Box.About(at, size * 0.85).Corners, Closed: true, colour, 1, null),
        _ => new Disc(at, size, colour, null),
    };

    private static void Line(Plot plot, Spectrum<WattPerNm> light, Stroke stroke) =>
        plot.Line(Enumerable.Range(FromNm, ToNm - FromNm + 1).Select(nm => ((double)nm, light[nm])), stroke);

    private static void KeepPeaksFree(Plot plot, FilmAppraisal appraisal)
    {
        for (int nm = FromNm; nm <= ToNm; nm += 3)
            plot.Labels.KeepOff(Box.About(plot.At(nm, appraisal.Power[nm]), 2.5));
    }

    private static void Band(Plot plot, string name, Spectrum<WattPerNm> light, string colour, IReadOnlyList<double>? dash, LightMark mark, Palette palette)
    {
        Line(plot, light, new Stroke(colour, 1.8, dash));
        if (light.Peak <= 0)
            return;
        var at = plot.At(PeakNm(light), light.Peak);
        plot.Labels.KeepOff(Box.About(at, 5));
        plot.Over(Sign(mark, at, 4, colour));
        plot.Over(plot.Labels.Place(name, at, 9.5, palette.Ink, palette.Ground, 8, (1, -1), TextWeight.SemiBold));
    }

    private static void Filters(Plot plot, Panel panel, double top, Palette palette)
    {
        foreach (var (filter, name, colour, nm) in new[] { (panel.Blue, "blue", palette.Source, 410), (panel.Green, "green", palette.Green, 505), (panel.Red, "red", palette.Red, 715) })
        {
            var line = Enumerable.Range(FromNm, ToNm - FromNm + 1).Select(w => plot.At(w, filter[w] * top)).ToList();
            plot.Inside(new Shape([plot.At(FromNm, 0), .. line, plot.At(ToNm, 0)], Closed: true, colour, 0.07, null), new Shape(line, Closed: false, null, 1, new Stroke(colour, 0.8, [2, 2], 0.7)));
            int highest = Enumerable.Range(nm - 8, 17).MaxBy(w => filter[w]);
            plot.Over(plot.Labels.Place($"{name} filter", plot.At(highest, filter[highest] * top), 8.5, palette.Faint, palette.Ground, 5, (0, -1)));
        }

        var scale = new Stroke(palette.Faint, 0.8);
        plot.Over(new Shape([new(plot.Field.Right, plot.Field.Top), new(plot.Field.Right, plot.Field.Bottom)], Closed: false, null, 1, scale));
        foreach (double t in new[] { 0, 0.5, 1 })
            plot.Over(new Words(t.ToString("0.0", CultureInfo.InvariantCulture), new(plot.Field.Right + 5, plot.At(ToNm, t * top).Y + 3), TextAnchor.Start, 8.5, TextWeight.Regular, palette.Faint));
        plot.Over(new Words("filter transmittance", new(plot.Field.Right + 36, (plot.Field.Top + plot.Field.Bottom) / 2), TextAnchor.Middle, 9.5, TextWeight.Regular, palette.Faint, TurnDeg: -90));
    }
}
