using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>A bar with its error.</summary>
/// <param name="Name">What it stands for.</param>
/// <param name="Value">How long it is.</param>
/// <param name="Error">Half of the whisker at its end; 0 for none.</param>
internal sealed record Bar(string Name, double Value, double Error = 0);

/// <summary>Bars from 0 to the right, one below another, with the errors of their ends.</summary>
internal static class Bars
{
    private const double Pitch = 24, Thickness = 12, Left = 170, Width = 416, Top = 48, NameSize = 9.5;

    /// <summary>The chart.</summary>
    /// <param name="text">What it is called.</param>
    /// <param name="axisTitle">Title of the axis, with unit.</param>
    /// <param name="bars">At least one.</param>
    /// <param name="palette">Colours.</param>
    public static Drawing Of(ChartText text, string axisTitle, IReadOnlyList<Bar> bars, Palette palette)
    {
        var axis = Axis.Holding(axisTitle, bars.SelectMany(bar => new[] { 0, bar.Value - bar.Error, bar.Value + bar.Error }));
        var field = new Box(Left, Top, Left + Width, Top + (bars.Count * Pitch) + 6);
        var plot = new Plot(palette, field, (axis.From, axis.To), (0, 1));
        plot.AxisAcross(axis.Step, axis.Title);
        for (int i = 0; i < bars.Count; i++)
        {
            double y = Top + 3 + ((i + 0.5) * Pitch), from = plot.At(0, 0).X, to = plot.At(bars[i].Value, 0).X;
            plot.Over(
                new Shape(new Box(Math.Min(from, to), y - (Thickness / 2), Math.Max(from, to), y + (Thickness / 2)).Corners, Closed: true, palette.Ink, 0.3, null),
                new Words(InterFont.Fitted(bars[i].Name, NameSize, TextWeight.Regular, Left - 16), new(Left - 8, y + 3.4), TextAnchor.End, NameSize, TextWeight.Regular, palette.Ink));
            if (bars[i].Error > 0)
                plot.Over(Whisker(plot, bars[i], y, new Stroke(palette.Ink, 1.2)));
        }

        return new Drawing(
            text.Name,
            text.Title,
            text.Description,
            field.Right + 34,
            field.Bottom + 46,
            [
                new Words(text.Title, new(24, 26), TextAnchor.Start, 13, TextWeight.SemiBold, palette.Ink),
                .. text.Note.Length == 0 ? Array.Empty<Mark>() : [new Words(text.Note, new(field.Right, 26), TextAnchor.End, 9, TextWeight.Regular, palette.Faint)],
                .. plot.Marks,
            ]);
    }

    private static IEnumerable<Mark> Whisker(Plot plot, Bar bar, double y, Stroke stroke)
    {
        double low = plot.At(bar.Value - bar.Error, 0).X, high = plot.At(bar.Value + bar.Error, 0).X;
        yield return new Shape([new(low, y), new(high, y)], Closed: false, null, 1, stroke);
        yield return new Shape([new(low, y - 4), new(low, y + 4)], Closed: false, null, 1, stroke);
        yield return new Shape([new(high, y - 4), new(high, y + 4)], Closed: false, null, 1, stroke);
    }
}
