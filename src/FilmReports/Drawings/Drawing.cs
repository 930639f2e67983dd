namespace FilmReports.Drawings;

/// <summary>One picture as a list of marks, in points from the top left corner. Each renderer draws the same list.</summary>
/// <param name="Name">File name without ending.</param>
/// <param name="Title">What the picture shows, in a few words.</param>
/// <param name="Description">What can be read off it, for people who cannot see it.</param>
/// <param name="Width">Width, points.</param>
/// <param name="Height">Height, points.</param>
/// <param name="Marks">What is drawn, bottom first.</param>
internal sealed record Drawing(string Name, string Title, string Description, double Width, double Height, IReadOnlyList<Mark> Marks);

/// <summary>A point of a drawing.</summary>
internal readonly record struct Spot(double X, double Y);

/// <summary>Something drawn.</summary>
internal abstract record Mark;

/// <summary>A line or an area.</summary>
/// <param name="Spots">Corners.</param>
/// <param name="Closed">Whether the last corner joins the first.</param>
/// <param name="Fill">Colour as #rrggbb; null for none.</param>
/// <param name="FillOpacity">0…1.</param>
/// <param name="Stroke">How the outline is drawn; null for none.</param>
internal sealed record Shape(IReadOnlyList<Spot> Spots, bool Closed, string? Fill, double FillOpacity, Stroke? Stroke) : Mark;

/// <summary>A circle.</summary>
internal sealed record Disc(Spot Centre, double Radius, string? Fill, Stroke? Stroke) : Mark;

/// <summary>One line of text.</summary>
/// <param name="Text">Characters that the font has.</param>
/// <param name="At">Where the baseline begins, ends or has its middle.</param>
/// <param name="Anchor">Which of these.</param>
/// <param name="Size">Points.</param>
/// <param name="Weight">Regular or semibold.</param>
/// <param name="Colour">#rrggbb.</param>
/// <param name="TurnDeg">Turned about <paramref name="At"/>, clockwise, degrees.</param>
/// <param name="Halo">Colour of a rim that keeps text legible over lines; null for none.</param>
internal sealed record Words(
    string Text, Spot At, TextAnchor Anchor, double Size, TextWeight Weight, string Colour, double TurnDeg = 0, string? Halo = null) : Mark;

/// <summary>Upright rectangles of one colour that touch without seams: a ground, not data.</summary>
/// <param name="Fill">Colour as #rrggbb.</param>
/// <param name="Boxes">The rectangles.</param>
internal sealed record Tiles(string Fill, IReadOnlyList<Box> Boxes) : Mark;

/// <summary>Marks that show only inside an outline.</summary>
internal sealed record Window(IReadOnlyList<Spot> Outline, IReadOnlyList<Mark> Marks) : Mark;

/// <summary>How a line is drawn.</summary>
/// <param name="Colour">#rrggbb.</param>
/// <param name="Width">Points.</param>
/// <param name="Dash">Lengths of dashes and gaps, points; null for a solid line.</param>
/// <param name="Opacity">0…1.</param>
internal sealed record Stroke(string Colour, double Width, IReadOnlyList<double>? Dash = null, double Opacity = 1);

/// <summary>Which end of a text its position names.</summary>
internal enum TextAnchor
{
    /// <summary>The beginning.</summary>
    Start,

    /// <summary>The middle.</summary>
    Middle,

    /// <summary>The end.</summary>
    End,
}

/// <summary>Weights of the shipped font.</summary>
internal enum TextWeight
{
    /// <summary>Regular.</summary>
    Regular,

    /// <summary>Semibold.</summary>
    SemiBold,
}
