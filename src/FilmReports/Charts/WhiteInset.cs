using System.Globalization;
using Colorimetry;
using FilmOptics;
using FilmReports.Drawings;
using FilmReports.Pages;

namespace FilmReports.Charts;

/// <summary>The neighbourhood of the white that is judged, enlarged: a tolerance is far too small to be seen in the whole diagram.</summary>
internal sealed class WhiteInset
{
    // The tolerance outline takes an eighth of the width; a white off target and its target half of it.
    private const double TolerancesAcross = 16, DistancesAcross = 2.6, LeastSpan = 0.002;

    private readonly FilmCase _filmCase;
    private readonly FilmAppraisal _appraisal;
    private readonly Palette _palette;
    private readonly ChromaticityScale _scale;

    /// <summary>An inset for a frame in the drawing.</summary>
    public WhiteInset(FilmCase filmCase, FilmAppraisal appraisal, ChromaticityDiagram diagram, Box frame, Palette palette)
    {
        (_filmCase, _appraisal, _palette, Frame) = (filmCase, appraisal, palette, frame);
        var field = new Box(frame.Left + 52, frame.Top + 22, frame.Right - 10, frame.Bottom - 36);
        var (across, up, span) = Range(diagram);
        // Equal scales here too: the height follows the width.
        double halfUp = span / 2 * (field.Bottom - field.Top) / (field.Right - field.Left);
        var plot = new Plot(palette, field, (across - (span / 2), across + (span / 2)), (up - halfUp, up + halfUp));
        _scale = new(plot, diagram);
    }

    /// <summary>Where it stands.</summary>
    public Box Frame { get; }

    /// <summary>The part of the diagram that is enlarged.</summary>
    public Chromaticity[] Corners => [.. _scale.Plot.Field.Corners.Select(_scale.ChromaticityAt)];

    /// <summary>What is drawn.</summary>
    public IReadOnlyList<Mark> Marks()
    {
        var (plot, palette) = (_scale.Plot, _palette);
        double step = Plot.NiceStep(plot.X.To - plot.X.From, 3);
        plot.Axes(step, _scale.AxisNames.Across, step, _scale.AxisNames.Up);
        plot.Inside(ChromaticityChart.PlanckianLine(_scale, palette));
        plot.Inside(WhiteMarks.Of(_scale, _filmCase, _appraisal, palette, 1));
        if (_filmCase.Target is { } target)
        {
            foreach (var spot in WhiteMarks.ToleranceOutline(_scale, target))
                plot.Labels.KeepOff(Box.About(spot, 1));
            Label("target", new(target.WhiteX, target.WhiteY), (1, -1));
        }

        Label("film white", _appraisal.FilmWhite.Chromaticity, (-1, 1));
        if (_appraisal.Panel is { } panel)
            Label("panel white", panel.White.Chromaticity, (1, 1));
        string title = _filmCase.Target is { } t
            ? string.Create(CultureInfo.InvariantCulture, $"around white; tolerance {t.ToleranceXy:0.#####} in xy")
            : "around white";
        return
        [
            new Shape(Frame.Corners, Closed: true, palette.Ground, 1, new Stroke(palette.Faint, 0.6)),
            new Words(title, new(Frame.Left + 8, Frame.Top + 14), TextAnchor.Start, 8.5, TextWeight.Regular, palette.Faint),
            .. plot.Marks,
        ];

        void Label(string text, Chromaticity white, (double X, double Y) prefer)
        {
            var at = _scale.At(white);
            if (!plot.Field.Contains(Box.About(at, 2)))
                return;
            plot.Labels.KeepOff(Box.About(at, 5));
            plot.Over(plot.Labels.Place(text, at, 8.5, palette.Ink, palette.Ground, 14, prefer));
        }
    }

    private (double Across, double Up, double Span) Range(ChromaticityDiagram diagram)
    {
        var judged = (Findings.IsAtPanel(_filmCase, _appraisal) ? _appraisal.Panel!.White : _appraisal.FilmWhite).Chromaticity;
        var (across, up) = ChromaticityScale.Coordinates(diagram, judged);
        if (_filmCase.Target is not { } target)
            return (across, up, 0.02);
        var wanted = new Chromaticity(target.WhiteX, target.WhiteY);
        var (wantedAcross, wantedUp) = ChromaticityScale.Coordinates(diagram, wanted);
        double distance = Math.Max(Math.Abs(across - wantedAcross), Math.Abs(up - wantedUp));
        double span = Math.Max(Math.Max(target.ToleranceXy * TolerancesAcross, distance * DistancesAcross), LeastSpan);
        // Centred on the target until the judged white would come near the frame.
        return distance < span / 4 ? (wantedAcross, wantedUp, span) : ((across + wantedAcross) / 2, (up + wantedUp) / 2, span);
    }
}
