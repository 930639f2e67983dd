namespace FilmReports.Drawings;

/// <summary>Puts a drawing into another one: its marks moved and scaled, text and line widths with them.</summary>
internal static class PlacedMarks
{
    /// <summary>The marks of a drawing with its top left corner at a spot.</summary>
    /// <param name="drawing">What to place.</param>
    /// <param name="at">Where its top left corner goes, points.</param>
    /// <param name="sizeFactor">Size there over its own.</param>
    public static IEnumerable<Mark> At(this Drawing drawing, Spot at, double sizeFactor) => drawing.Marks.Select(mark => Placed(mark, at, sizeFactor));

    /// <summary>One drawing with another below it, under the name and title of the upper.</summary>
    public static Drawing Above(this Drawing upper, Drawing lower) => upper with
    {
        Width = Math.Max(upper.Width, lower.Width),
        Height = upper.Height + lower.Height,
        Description = $"{upper.Description} {lower.Description}".TrimEnd(),
        Marks = [.. upper.Marks, .. lower.At(new(0, upper.Height), 1)],
    };

    private static Mark Placed(Mark mark, Spot at, double factor) => mark switch
    {
        Shape shape => shape with { Spots = Placed(shape.Spots, at, factor), Stroke = Placed(shape.Stroke, factor) },
        Disc disc => disc with { Centre = Placed(disc.Centre, at, factor), Radius = disc.Radius * factor, Stroke = Placed(disc.Stroke, factor) },
        Words words => words with { At = Placed(words.At, at, factor), Size = words.Size * factor },
        Tiles tiles => tiles with
        {
            Boxes = [.. tiles.Boxes.Select(box =>
            {
                var (first, last) = (Placed(new Spot(box.Left, box.Top), at, factor), Placed(new Spot(box.Right, box.Bottom), at, factor));
                return new Box(first.X, first.Y, last.X, last.Y);
            })],
        },
        Window window => new Window(Placed(window.Outline, at, factor), [.. window.Marks.Select(inner => Placed(inner, at, factor))]),
        _ => throw new NotSupportedException(mark.GetType().Name),
    };

    private static Spot Placed(Spot spot, Spot at, double factor) => new(at.X + (spot.X * factor), at.Y + (spot.Y * factor));

    private static Spot[] Placed(IReadOnlyList<Spot> spots, Spot at, double factor) => [.. spots.Select(spot => Placed(spot, at, factor))];

    private static Stroke? Placed(Stroke? stroke, double factor) => stroke is null ? null : stroke with
    {
        Width = stroke.Width * factor,
        Dash = stroke.Dash is { } dash ? [.. dash.Select(length => length * factor)] : null,
    };
}
