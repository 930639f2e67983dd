using FilmReports.Drawings;

namespace Dotcoat.Tests.Reports;

/// <summary>The rectangle that a text of a drawing covers, turned as the text is: from the top of its capitals to the foot of its tails.</summary>
internal sealed record TextBox(Words Words, Spot[] Corners)
{
    // Of the size: Inter's capitals reach 0.727 above the baseline, its tails about 0.2 below.
    private const double Above = 0.73, Below = 0.2;

    public static IReadOnlyList<TextBox> AllOf(Drawing drawing) => [.. WordsOf(drawing.Marks).Select(Of)];

    public static IEnumerable<Words> WordsOf(IEnumerable<Mark> marks) =>
        marks.SelectMany(mark => mark is Words words ? [words] : mark is Window window ? WordsOf(window.Marks) : []);

    public bool Overlaps(TextBox other) => !Axes(this).Concat(Axes(other)).Any(axis => Apart(axis, this, other));

    public bool LiesInside(double width, double height) => Corners.All(c => c.X >= 0 && c.Y >= 0 && c.X <= width && c.Y <= height);

    private static TextBox Of(Words words)
    {
        double width = InterFont.WidthOf(words.Text, words.Size, words.Weight);
        double left = words.Anchor switch { TextAnchor.Start => 0, TextAnchor.Middle => -width / 2, _ => -width };
        double turn = words.TurnDeg * Math.PI / 180;
        (double X, double Y)[] corners =
        [
            (left, -Above * words.Size), (left + width, -Above * words.Size), (left + width, Below * words.Size), (left, Below * words.Size),
        ];
        return new(words, [.. corners.Select(c => new Spot(
            words.At.X + (c.X * Math.Cos(turn)) - (c.Y * Math.Sin(turn)),
            words.At.Y + (c.X * Math.Sin(turn)) + (c.Y * Math.Cos(turn))))]);
    }

    // Two rectangles lie apart exactly where a line along a side of one of them separates them.
    private static IEnumerable<Spot> Axes(TextBox box) =>
        [new(box.Corners[1].X - box.Corners[0].X, box.Corners[1].Y - box.Corners[0].Y), new(box.Corners[3].X - box.Corners[0].X, box.Corners[3].Y - box.Corners[0].Y)];

    private static bool Apart(Spot axis, TextBox a, TextBox b)
    {
        double[] along = [.. a.Corners.Select(Along)], other = [.. b.Corners.Select(Along)];
        return along.Max() <= other.Min() || other.Max() <= along.Min();

        double Along(Spot c) => (c.X * axis.X) + (c.Y * axis.Y);
    }
}
