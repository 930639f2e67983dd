using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>A named line.</summary>
/// <param name="Name">Written on it.</param>
/// <param name="Points">From left to right.</param>
/// <param name="Stroke">How it is drawn; no two lines of a chart differ by hue alone.</param>
internal sealed record NamedLine(string Name, IReadOnlyList<(double X, double Y)> Points, Stroke Stroke);

/// <summary>Named lines on a plot, each name where its line is farthest from the others.</summary>
internal static class Lines
{
    private const double NameSize = 9.5, ClearEnough = 40;

    // In ink, so told apart by dash and width alone.
    private static readonly (double Width, double[]? Dash)[] Styles =
    [
        (1.8, null), (1.6, [10, 3, 2, 3]), (1.8, [1.6, 2.6]), (1.4, [6, 5]), (0.8, null), (1.6, [10, 3, 2, 3, 2, 3]),
    ];

    /// <summary>A stroke for one of several things that have no colour of their own.</summary>
    public static Stroke StrokeOf(int index, Palette palette)
    {
        var (width, dash) = Styles[index % Styles.Length];
        return new(palette.Ink, width, dash);
    }

    /// <summary>Draws the lines, then their names.</summary>
    public static void Draw(Plot plot, IReadOnlyList<NamedLine> lines, Palette palette)
    {
        Spot[][] spots = [.. lines.Select(line => line.Points.Select(p => plot.At(p.X, p.Y)).ToArray())];
        foreach (var line in lines)
            plot.Line(line.Points, line.Stroke);
        for (int i = 0; i < lines.Count; i++)
        {
            if (BestPlace(plot, spots, i) is { } at)
                plot.Over(plot.Labels.Place(lines[i].Name, at, NameSize, palette.Ink, palette.Ground, 7, (1, -1), TextWeight.SemiBold));
        }
    }

    // The first point, of those inside the field, that is as far from every other line as any.
    private static Spot? BestPlace(Plot plot, Spot[][] spots, int own)
    {
        (Spot At, double Clearance)? best = null;
        int stride = Math.Max(1, spots[own].Length / 40);
        for (int i = spots[own].Length / 20; i < spots[own].Length; i += stride)
        {
            var at = spots[own][i];
            if (!plot.Field.Contains(Box.About(at, 1)))
                continue;
            double clearance = ClearEnough;
            for (int other = 0; other < spots.Length; other++)
            {
                for (int j = 0; other != own && j < spots[other].Length; j++)
                    clearance = Math.Min(clearance, Math.Max(Math.Abs(spots[other][j].X - at.X) / 3, Math.Abs(spots[other][j].Y - at.Y)));
            }

            if (best is null || clearance > best.Value.Clearance + 0.5)
                best = (at, clearance);
        }

        return best?.At;
    }
}
