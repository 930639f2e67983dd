using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>Writes a triangle's name along one of its edges, where it is farthest from all other lines.</summary>
internal static class EdgeLabel
{
    private const double Size = 8.5, Offset = 6;

    // Farther than this from any other line is as good as it gets.
    private const double EnoughClearance = 12;

    /// <summary>The name as text turned into an edge's direction.</summary>
    /// <param name="labels">Knows what is taken, and learns what the name takes.</param>
    /// <param name="name">The name.</param>
    /// <param name="own">Which triangle it names.</param>
    /// <param name="triangles">All triangles, each red, green, blue.</param>
    /// <param name="palette">Colours.</param>
    public static IEnumerable<Mark> Place(LabelPlacer labels, string name, int own, IReadOnlyList<Spot[]> triangles, Palette palette)
    {
        double width = InterFont.WidthOf(name, Size, TextWeight.Regular);
        (double Clearance, Spot From, double X, double Y, double Side)? best = null;
        foreach (var (a, b) in Edges(triangles[own]))
        {
            // Text reads from left to right.
            var (from, to) = a.X <= b.X ? (a, b) : (b, a);
            double dx = to.X - from.X, dy = to.Y - from.Y, length = Math.Sqrt((dx * dx) + (dy * dy));
            (dx, dy) = (dx / length, dy / length);
            for (double along = 12; along + width + 12 < length; along += 8)
            {
                foreach (double side in new[] { 1.0, -1.0 })
                {
                    var start = new Spot(from.X + (dx * along) + (side * dy * Offset), from.Y + (dy * along) - (side * dx * Offset));
                    if (IsTaken(labels, start, dx, dy, width))
                        continue;
                    double clearance = Math.Min(EnoughClearance, Clearance(start, dx, dy, width, own, triangles));
                    if (best is null || clearance > best.Value.Clearance + 0.5)
                        best = (clearance, start, dx, dy, side);
                }
            }
        }

        if (best is not { } place)
            return labels.Place(name, triangles[own][1], Size, palette.Ink, palette.Ground);
        foreach (var box in Boxes(place.From, place.X, place.Y, width))
            labels.KeepOff(box);
        // The baseline lies a third of the size below the middle line of the text.
        var baseline = new Spot(place.From.X - (place.Y * Size / 3), place.From.Y + (place.X * Size / 3));
        double turnDeg = Math.Atan2(place.Y, place.X) * 180 / Math.PI;
        return [new Words(name, baseline, TextAnchor.Start, Size, TextWeight.Regular, palette.Ink, turnDeg)];
    }

    private static IEnumerable<(Spot A, Spot B)> Edges(Spot[] triangle) =>
        [(triangle[1], triangle[2]), (triangle[1], triangle[0]), (triangle[2], triangle[0])];

    private static IEnumerable<Box> Boxes(Spot start, double dx, double dy, double width)
    {
        for (double t = 0; t <= width; t += 5)
            yield return Box.About(new(start.X + (dx * t), start.Y + (dy * t)), 4.5);
    }

    // A picture asks this thousands of times.
    private static bool IsTaken(LabelPlacer labels, Spot start, double dx, double dy, double width)
    {
        for (double t = 0; t <= width; t += 5)
        {
            if (labels.IsTaken(Box.About(new(start.X + (dx * t), start.Y + (dy * t)), 4.5)))
                return true;
        }

        return false;
    }

    private static double Clearance(Spot start, double dx, double dy, double width, int own, IReadOnlyList<Spot[]> triangles)
    {
        double least = double.PositiveInfinity;
        for (double t = 0; t <= width; t += width / 6)
        {
            var at = new Spot(start.X + (dx * t), start.Y + (dy * t));
            for (int i = 0; i < triangles.Count; i++)
            {
                if (i == own)
                    continue;
                foreach (var (a, b) in Edges(triangles[i]))
                    least = Math.Min(least, Distance(at, a, b));
            }
        }

        return least;
    }

    private static double Distance(Spot at, Spot a, Spot b)
    {
        double dx = b.X - a.X, dy = b.Y - a.Y;
        double share = Math.Clamp((((at.X - a.X) * dx) + ((at.Y - a.Y) * dy)) / ((dx * dx) + (dy * dy)), 0, 1);
        double x = at.X - a.X - (share * dx), y = at.Y - a.Y - (share * dy);
        return Math.Sqrt((x * x) + (y * y));
    }
}
