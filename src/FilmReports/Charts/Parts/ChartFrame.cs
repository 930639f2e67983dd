using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>What a chart is called and says.</summary>
/// <param name="Name">File name without ending.</param>
/// <param name="Title">What it shows, in a few words.</param>
/// <param name="Description">What can be read off it, for people who cannot see it.</param>
/// <param name="Note">A few words at the right above the field.</param>
internal sealed record ChartText(string Name, string Title, string Description, string Note = "");

/// <summary>The frame of a chart of one field: title, axes, note.</summary>
internal sealed class ChartFrame
{
    private const double Left = 66, Top = 48;
    private readonly ChartText _text;
    private readonly Palette _palette;

    /// <summary>An empty chart.</summary>
    /// <param name="text">What it is called.</param>
    /// <param name="across">Axis to the right.</param>
    /// <param name="up">Axis upward.</param>
    /// <param name="palette">Colours.</param>
    /// <param name="width">Width of the field, points.</param>
    /// <param name="height">Height of the field, points.</param>
    public ChartFrame(ChartText text, Axis across, Axis up, Palette palette, double width = 520, double height = 300)
    {
        (_text, _palette) = (text, palette);
        Plot = new Plot(palette, new Box(Left, Top, Left + width, Top + height), (across.From, across.To), (up.From, up.To), isLogUp: up.IsLog);
        Plot.Axes(across.Step, across.Title, up.Step, up.Title);
    }

    /// <summary>Where to draw.</summary>
    public Plot Plot { get; }

    /// <summary>The finished drawing.</summary>
    public Drawing Finish()
    {
        var field = Plot.Field;
        return new Drawing(
            _text.Name,
            _text.Title,
            _text.Description,
            field.Right + 54,
            field.Bottom + 46,
            [
                new Words(_text.Title, new(field.Left, 26), TextAnchor.Start, 13, TextWeight.SemiBold, _palette.Ink),
                .. _text.Note.Length == 0 ? Array.Empty<Mark>() : [new Words(_text.Note, new(field.Right, 26), TextAnchor.End, 9, TextWeight.Regular, _palette.Faint)],
                .. Plot.Marks,
            ]);
    }
}
