using System.Runtime.InteropServices;

namespace FilmReports.Drawings;

/// <summary>Puts labels where they cover neither each other nor what must stay visible, and inside the drawing.</summary>
internal sealed class LabelPlacer(Box area)
{
    // Beyond any drawing: a label is given up only where the whole area is full.
    private const double Farthest = 1000;

    private static readonly (double X, double Y)[] Directions =
    [
        (1, 0), (1, -1), (-1, 0), (0, -1), (0, 1), (-1, -1), (1, 1), (-1, 1),
        (2, -1), (2, 1), (-2, -1), (-2, 1), (1, -2), (1, 2), (-1, -2), (-1, 2),
    ];

    private readonly List<Box> _taken = [];

    /// <summary>Every box that a label has taken, in the order of placing.</summary>
    public IReadOnlyList<Box> Taken => _taken;

    /// <summary>Whether a label or what must stay visible lies there.</summary>
    public bool IsTaken(Box box)
    {
        foreach (ref readonly var taken in CollectionsMarshal.AsSpan(_taken))
        {
            if (taken.Overlaps(box))
                return true;
        }

        return false;
    }

    /// <summary>Keeps labels off a place.</summary>
    public void KeepOff(Box box) => _taken.Add(box);

    /// <summary>Keeps labels off a line, however steep.</summary>
    public void KeepOffLine(IReadOnlyList<Spot> line)
    {
        const double Pitch = 5, Half = 2.5;
        double since = Pitch;
        for (int i = 1; i < line.Count; i++)
        {
            double dx = line[i].X - line[i - 1].X, dy = line[i].Y - line[i - 1].Y, length = Math.Sqrt((dx * dx) + (dy * dy));
            double at = Pitch - since;
            for (; at < length; at += Pitch)
                KeepOff(Box.About(new(line[i - 1].X + (dx * at / length), line[i - 1].Y + (dy * at / length)), Half));
            since = length - at + Pitch;
        }
    }

    /// <summary>A label as near to its point as there is room, starting in the preferred direction.</summary>
    /// <param name="text">What it says.</param>
    /// <param name="of">The point it belongs to.</param>
    /// <param name="size">Points.</param>
    /// <param name="colour">#rrggbb.</param>
    /// <param name="halo">Rim against lines below; null for none.</param>
    /// <param name="gap">Distance from the point, points.</param>
    /// <param name="prefer">Direction tried first, right and down positive.</param>
    /// <param name="weight">Weight of the text.</param>
    /// <exception cref="InvalidOperationException">There is no room anywhere near: the drawing is laid out wrongly.</exception>
    public IEnumerable<Mark> Place(
        string text, Spot of, double size, string colour, string? halo, double gap = 6, (double X, double Y)? prefer = null, TextWeight weight = TextWeight.Regular)
    {
        double width = InterFont.WidthOf(text, size, weight), height = size;
        for (double reach = gap; reach < Farthest; reach += 4)
        {
            foreach (var (dx, dy) in prefer is { } p ? Directions.Prepend(p) : Directions)
            {
                double length = Math.Sqrt((dx * dx) + (dy * dy));
                double x = of.X + (dx / length * reach), y = of.Y + (dy / length * reach);
                double left = dx > 0.3 ? x : dx < -0.3 ? x - width : x - (width / 2);
                double top = dy > 0.3 ? y : dy < -0.3 ? y - height : y - (height / 2);
                var box = new Box(left - 1, top - 1, left + width + 1, top + height + 1);
                if (!area.Contains(box) || IsTaken(box))
                    continue;
                _taken.Add(box);
                var words = new Words(text, new(left, top + (height * 0.8)), TextAnchor.Start, size, weight, colour, Halo: halo);
                return reach > gap + 9
                    ? [new Shape([of, box.NearestTo(of)], Closed: false, null, 1, new Stroke(colour, 0.6, Opacity: 0.6)), words]
                    : [words];
            }
        }

        throw new InvalidOperationException($"No room for the label '{text}'.");
    }
}

/// <summary>An upright rectangle.</summary>
internal readonly record struct Box(double Left, double Top, double Right, double Bottom)
{
    /// <summary>Whether two boxes share any area.</summary>
    public bool Overlaps(Box other) => Left < other.Right && other.Left < Right && Top < other.Bottom && other.Top < Bottom;

    /// <summary>Whether the other box lies inside.</summary>
    public bool Contains(Box other) => other.Left >= Left && other.Top >= Top && other.Right <= Right && other.Bottom <= Bottom;

    /// <summary>The point of the box nearest to a spot.</summary>
    public Spot NearestTo(Spot spot) => new(Math.Clamp(spot.X, Left, Right), Math.Clamp(spot.Y, Top, Bottom));

    /// <summary>A square about a spot.</summary>
    public static Box About(Spot spot, double half) => new(spot.X - half, spot.Y - half, spot.X + half, spot.Y + half);

    /// <summary>Its corners.</summary>
    public IReadOnlyList<Spot> Corners => [new(Left, Top), new(Right, Top), new(Right, Bottom), new(Left, Bottom)];
}
