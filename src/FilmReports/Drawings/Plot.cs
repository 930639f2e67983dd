using System.Globalization;

namespace FilmReports.Drawings;

/// <summary>A field with two axes inside a drawing, and the marks drawn on it. The axis upward may be logarithmic.</summary>
internal sealed class Plot
{
    private const double TickSize = 9.5, TitleSize = 10.5;
    private readonly Palette _palette;
    private readonly List<Mark> _marks = [];
    private readonly List<Mark> _inside = [];

    /// <summary>An empty field.</summary>
    /// <param name="palette">Colours.</param>
    /// <param name="field">Where the axes stand, points.</param>
    /// <param name="x">Range from left to right.</param>
    /// <param name="y">Range from bottom to top.</param>
    /// <param name="labelArea">Where labels may go; the field itself unless given.</param>
    /// <param name="isLogUp">Whether the axis upward is logarithmic; its range is then above 0.</param>
    public Plot(Palette palette, Box field, (double From, double To) x, (double From, double To) y, Box? labelArea = null, bool isLogUp = false)
    {
        (_palette, Field, X, Y, IsLogUp) = (palette, field, x, y, isLogUp);
        Labels = new LabelPlacer(labelArea ?? field);
    }

    /// <summary>Where the axes stand.</summary>
    public Box Field { get; }

    /// <summary>Range from left to right.</summary>
    public (double From, double To) X { get; }

    /// <summary>Range from bottom to top.</summary>
    public (double From, double To) Y { get; }

    /// <summary>Whether the axis upward is logarithmic.</summary>
    public bool IsLogUp { get; }

    /// <summary>Places labels on this field.</summary>
    public LabelPlacer Labels { get; }

    /// <summary>Everything drawn, in order: what is clipped to the field first, then axes and labels.</summary>
    public IReadOnlyList<Mark> Marks => [new Window(Field.Corners, [.. _inside]), .. _marks];

    /// <summary>Where a point of the axes lies in the drawing.</summary>
    public Spot At(double x, double y) => new(
        Field.Left + ((x - X.From) / (X.To - X.From) * (Field.Right - Field.Left)),
        Field.Bottom - (ShareUp(y) * (Field.Bottom - Field.Top)));

    /// <summary>What a point of the drawing stands for on the axes.</summary>
    public (double X, double Y) ValueAt(Spot spot) => (
        X.From + ((spot.X - Field.Left) / (Field.Right - Field.Left) * (X.To - X.From)),
        ValueUp((Field.Bottom - spot.Y) / (Field.Bottom - Field.Top)));

    /// <summary>Adds marks that are cut off at the field.</summary>
    public void Inside(params IEnumerable<Mark> marks) => _inside.AddRange(marks);

    /// <summary>Adds marks that may stand anywhere.</summary>
    public void Over(params IEnumerable<Mark> marks) => _marks.AddRange(marks);

    /// <summary>A line through points of the axes, which labels keep off.</summary>
    public void Line(IEnumerable<(double X, double Y)> points, Stroke stroke)
    {
        Spot[] spots = [.. points.Select(p => At(p.X, p.Y))];
        Inside(new Shape(spots, Closed: false, null, 1, stroke));
        Labels.KeepOffLine(spots);
    }

    /// <summary>Hairline grid, tick labels and titles.</summary>
    /// <param name="stepX">Distance of ticks.</param>
    /// <param name="titleX">Title with unit.</param>
    /// <param name="stepY">Distance of ticks; a logarithmic axis has one at each power of ten.</param>
    /// <param name="titleY">Title with unit.</param>
    public void Axes(double stepX, string titleX, double stepY, string titleY)
    {
        AxisAcross(stepX, titleX);
        double widest = 0;
        foreach (double y in IsLogUp ? Decades(Y) : Ticks(Y, stepY))
        {
            var foot = At(X.From, y);
            string text = IsLogUp ? y.ToString("0.######", CultureInfo.InvariantCulture) : Number(y, stepY);
            widest = Math.Max(widest, InterFont.WidthOf(text, TickSize, TextWeight.Regular));
            Inside(new Shape([foot, At(X.To, y)], Closed: false, null, 1, new Stroke(_palette.Hairline, 0.7)));
            Over(new Words(text, new(Field.Left - 6, foot.Y + 3.4), TextAnchor.End, TickSize, TextWeight.Regular, _palette.Faint));
        }

        Over(new Words(titleY, new(Field.Left - widest - 14, (Field.Top + Field.Bottom) / 2), TextAnchor.Middle, TitleSize, TextWeight.Regular, _palette.Ink, TurnDeg: -90));
    }

    /// <summary>The axis to the right alone, and the line that the axis upward stands on.</summary>
    /// <param name="stepX">Distance of ticks.</param>
    /// <param name="titleX">Title with unit.</param>
    public void AxisAcross(double stepX, string titleX)
    {
        var hair = new Stroke(_palette.Hairline, 0.7);
        foreach (double x in Ticks(X, stepX))
        {
            var foot = At(x, Y.From);
            Inside(new Shape([foot, At(x, Y.To)], Closed: false, null, 1, hair));
            Over(new Words(Number(x, stepX), new(foot.X, Field.Bottom + 13), TextAnchor.Middle, TickSize, TextWeight.Regular, _palette.Faint));
        }

        Over(
            new Shape([new(Field.Left, Field.Top), new(Field.Left, Field.Bottom), new(Field.Right, Field.Bottom)], Closed: false, null, 1, new Stroke(_palette.Ink, 0.9)),
            new Words(titleX, new((Field.Left + Field.Right) / 2, Field.Bottom + 29), TextAnchor.Middle, TitleSize, TextWeight.Regular, _palette.Ink));
    }

    /// <summary>A step of 1, 2 or 5 times a power of ten that gives about that many ticks.</summary>
    public static double NiceStep(double span, int ticks)
    {
        double raw = span / ticks, power = Math.Pow(10, Math.Floor(Math.Log10(raw)));
        double lead = raw / power;
        return power * (lead <= 1 ? 1 : lead <= 2 ? 2 : lead <= 5 ? 5 : 10);
    }

    private double ShareUp(double y) => IsLogUp ? Math.Log(Math.Max(y, Y.From / 10) / Y.From) / Math.Log(Y.To / Y.From) : (y - Y.From) / (Y.To - Y.From);

    private double ValueUp(double share) => IsLogUp ? Y.From * Math.Pow(Y.To / Y.From, share) : Y.From + (share * (Y.To - Y.From));

    private static IEnumerable<double> Decades((double From, double To) range)
    {
        for (double power = Math.Ceiling(Math.Log10(range.From) - 1e-9); power <= Math.Log10(range.To) + 1e-9; power++)
            yield return Math.Pow(10, power);
    }

    private static IEnumerable<double> Ticks((double From, double To) range, double step)
    {
        double slack = step * 1e-9;
        for (double i = Math.Ceiling((range.From - slack) / step); i * step <= range.To + slack; i++)
            yield return i == 0 ? 0 : i * step; // Not the negative zero that the ceiling of a small negative number is.
    }

    // As many decimals as tell one tick from the next.
    private static string Number(double value, double step)
    {
        int decimals = Math.Max(0, (int)Math.Ceiling(-Math.Log10(step) - 1e-9));
        return value.ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture).Replace('-', '\u2212');
    }
}
