namespace FilmReports.Drawings;

/// <summary>The colours of the project: one ground, one ink, one mark for each kind of light.</summary>
/// <param name="Ground">Paper.</param>
/// <param name="Ink">Text, totals and axes.</param>
/// <param name="Hairline">Ink at 12 % on the ground.</param>
/// <param name="Faint">Secondary text.</param>
/// <param name="Source">Unconverted light.</param>
/// <param name="Green">Light of green-emitting lots.</param>
/// <param name="Red">Light of red-emitting lots.</param>
internal sealed record Palette(string Ground, string Ink, string Hairline, string Faint, string Source, string Green, string Red)
{
    /// <summary>Long dash of green-converted light.</summary>
    public static readonly IReadOnlyList<double> LongDash = [9, 3];

    /// <summary>Short dash of red-converted light.</summary>
    public static readonly IReadOnlyList<double> ShortDash = [3.5, 2.5];

    /// <summary>For paper and screens in daylight.</summary>
    public static Palette Light { get; } = new("#fbfbf8", "#1d2126", "#e0e1df", "#555a60", "#2f5fd0", "#2d8a3e", "#c8402f");

    /// <summary>For white paper: the light one, its ground as white as the sheet.</summary>
    public static Palette Paper { get; } = Light with { Ground = "#ffffff" };

    /// <summary>For dark screens.</summary>
    public static Palette Dark { get; } = new("#15181c", "#e8e6e0", "#2e3033", "#a9a9a4", "#7fa2f0", "#62bf74", "#ec7f70");

    /// <summary>Colour and dash of a lot's light, by the colour it emits.</summary>
    /// <param name="peakNm">Peak of its emission, nm.</param>
    public (string Colour, IReadOnlyList<double>? Dash, LightMark Mark) OfEmitter(double peakNm) => peakNm switch
    {
        < 490 => (Source, null, LightMark.Triangle),
        < 580 => (Green, LongDash, LightMark.Square),
        _ => (Red, ShortDash, LightMark.Circle),
    };
}

/// <summary>The shape that stands for a kind of light, so that no meaning hangs on hue alone.</summary>
internal enum LightMark
{
    /// <summary>Unconverted source light.</summary>
    Triangle,

    /// <summary>Green-converted light.</summary>
    Square,

    /// <summary>Red-converted light.</summary>
    Circle,
}
