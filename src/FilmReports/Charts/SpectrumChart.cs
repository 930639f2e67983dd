using System.Globalization;
using Colorimetry;
using FilmOptics;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>The light leaving above by last emitter, with the panel's filters.</summary>
internal sealed class SpectrumChart
{
    private readonly Palette _palette;
    private readonly Plot _plot;
    private readonly int _fromNm, _toNm;
    private readonly double _top;

    private SpectrumChart(FilmAppraisal appraisal, Palette palette)
    {
        (_fromNm, _toNm) = LightMarks.Range([appraisal.Power]);
        double step = Plot.NiceStep(appraisal.Power.Peak, 5);
        _top = Math.Ceiling(appraisal.Power.Peak * 1.12 / step) * step;
        _palette = palette;
        _plot = new Plot(palette, new Box(66, 48, 586, 348), (_fromNm, _toNm), (0, _top));
    }

    public static Drawing Of(FilmCase filmCase, FilmAppraisal appraisal, Palette palette)
    {
        var chart = new SpectrumChart(appraisal, palette);
        chart.Draw(filmCase, appraisal);
        return new Drawing(
            "spectrum",
            "Spectrum of the light leaving above the film",
            string.Join(' ', appraisal.Bands.Where(b => b.PeakNm is not null).Select(b => string.Create(
                CultureInfo.InvariantCulture, $"{b.Name}: peak {b.PeakNm:0.0} nm, {b.Photons:0.0000} photons per source photon."))),
            640,
            394,
            [
                new Words("Light leaving above the film, by last emitter", new(66, 26), TextAnchor.Start, 13, TextWeight.SemiBold, palette.Ink),
                new Words("grey: all light", new(586, 26), TextAnchor.End, 9, TextWeight.Regular, palette.Faint),
                .. chart._plot.Marks,
            ]);
    }

    private void Draw(FilmCase filmCase, FilmAppraisal appraisal)
    {
        if (filmCase.Panel is { } panel)
            Filters(panel);
        _plot.Axes(20, "wavelength / nm", Plot.NiceStep(appraisal.Power.Peak, 5), "power per nm and source watt / nm⁻¹");
        Line(appraisal.Power, new Stroke(_palette.Ink, 2.6, Opacity: 0.4));
        Band("unconverted", appraisal.UnconvertedPower, _palette.Source, null, LightMark.Triangle);
        for (int i = 0; i < filmCase.Film.Lots.Count; i++)
        {
            var light = appraisal.ConvertedPowerByLot[i];
            var (colour, dash, mark) = _palette.OfEmitter(LightMarks.PeakNm(filmCase.Film.Lots[i].Emission));
            Band(ChartNames.OfLot(filmCase.Film, i), light, colour, dash, mark);
        }

        if (filmCase.Panel is { } named)
            FilterNames(named);
    }

    private void Line(Spectrum<WattPerNm> light, Stroke stroke) =>
        _plot.Line(Enumerable.Range(_fromNm, _toNm - _fromNm + 1).Select(nm => ((double)nm, light[nm])), stroke);

    private void Band(string name, Spectrum<WattPerNm> light, string colour, IReadOnlyList<double>? dash, LightMark mark)
    {
        if (light.Peak <= 0)
            return;
        Line(light, new Stroke(colour, 1.8, dash));
        var at = _plot.At(LightMarks.PeakNm(light), light.Peak);
        _plot.Labels.KeepOff(Box.About(at, 5));
        _plot.Over(LightMarks.Sign(mark, at, 4, colour));
        _plot.Over(_plot.Labels.Place(
            InterFont.Fitted(name, 9.5, TextWeight.SemiBold, 130), at, 9.5, _palette.Ink, _palette.Ground, 8, (1, -1), TextWeight.SemiBold));
    }

    private void Filters(Panel panel)
    {
        foreach (var (filter, _, colour) in InOrder(panel))
        {
            Spot[] line = [.. Enumerable.Range(_fromNm, _toNm - _fromNm + 1).Select(nm => _plot.At(nm, filter[nm] * _top))];
            _plot.Inside(
                new Shape([_plot.At(_fromNm, 0), .. line, _plot.At(_toNm, 0)], Closed: true, colour, 0.07, null),
                new Shape(line, Closed: false, null, 1, new Stroke(colour, 0.8, [2, 2], 0.7)));
        }

        var right = _plot.Field.Right;
        _plot.Over(new Shape([new(right, _plot.Field.Top), new(right, _plot.Field.Bottom)], Closed: false, null, 1, new Stroke(_palette.Faint, 0.8)));
        foreach (double share in new[] { 0, 0.5, 1 })
        {
            _plot.Over(new Words(
                share.ToString("0.0", CultureInfo.InvariantCulture), new(right + 5, _plot.At(_toNm, share * _top).Y + 3), TextAnchor.Start, 9, TextWeight.Regular, _palette.Faint));
        }

        _plot.Over(new Words(
            "filter transmittance", new(right + 36, (_plot.Field.Top + _plot.Field.Bottom) / 2), TextAnchor.Middle, 9.5, TextWeight.Regular, _palette.Faint, TurnDeg: -90));
    }

    private void FilterNames(Panel panel)
    {
        foreach (var (filter, name, _) in InOrder(panel))
        {
            // At the middle of the wavelengths that the filter lets through best.
            double least = filter.Peak * 0.97;
            int[] best = [.. Enumerable.Range(_fromNm, _toNm - _fromNm + 1).Where(nm => filter[nm] >= least)];
            int middleNm = best.Length == 0 ? (_fromNm + _toNm) / 2 : best[best.Length / 2];
            _plot.Over(_plot.Labels.Place(
                $"{name} filter", _plot.At(middleNm, filter[middleNm] * _top), 9, _palette.Faint, _palette.Ground, 5, (0, -1)));
        }
    }

    private IEnumerable<(Spectrum<Fraction> Filter, string Name, string Colour)> InOrder(Panel panel) =>
        [(panel.Blue, "blue", _palette.Source), (panel.Green, "green", _palette.Green), (panel.Red, "red", _palette.Red)];
}
