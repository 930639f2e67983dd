using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>A point of a scatter chart.</summary>
/// <param name="X">Across.</param>
/// <param name="Y">Up.</param>
/// <param name="Name">Written beside it; empty for none.</param>
/// <param name="IsFilled">A dot, or a ring.</param>
internal sealed record ScatterPoint(double X, double Y, string Name = "", bool IsFilled = true);

/// <summary>A region that points should lie in: an outline.</summary>
/// <param name="Name">Written on it; empty for none.</param>
/// <param name="Outline">Its corners.</param>
internal sealed record ScatterWindow(string Name, IReadOnlyList<(double X, double Y)> Outline);

/// <summary>Points with the windows they should lie in. A point outside every window carries a stroke through it.</summary>
internal static class Scatter
{
    private const double NameSize = 9.5;

    /// <summary>Draws windows, points, then names.</summary>
    public static void Draw(Plot plot, IReadOnlyList<ScatterPoint> points, IReadOnlyList<ScatterWindow> windows, Palette palette, double radius = 3)
    {
        foreach (var window in windows)
        {
            Spot[] outline = [.. window.Outline.Select(corner => plot.At(corner.X, corner.Y))];
            plot.Inside(new Shape(outline, Closed: true, null, 1, new Stroke(palette.Ink, 0.9)));
            plot.Labels.KeepOffLine([.. outline, outline[0]]);
        }

        foreach (var point in points)
        {
            var at = plot.At(point.X, point.Y);
            plot.Inside(new Disc(at, radius, point.IsFilled ? palette.Ink : null, point.IsFilled ? null : new Stroke(palette.Ink, radius / 2)));
            if (windows.Count > 0 && !windows.Any(window => Holds(window, point)))
                plot.Inside(new Shape([new(at.X - (2 * radius), at.Y + (2 * radius)), new(at.X + (2 * radius), at.Y - (2 * radius))], Closed: false, null, 1, new Stroke(palette.Ink, 0.9)));
            plot.Labels.KeepOff(Box.About(at, radius + 1));
        }

        foreach (var point in points.Where(point => point.Name.Length > 0 && plot.Field.Contains(Box.About(plot.At(point.X, point.Y), 1))))
            plot.Over(plot.Labels.Place(point.Name, plot.At(point.X, point.Y), NameSize, palette.Ink, palette.Ground, radius + 5, (1, -1)));
        foreach (var window in windows.Where(window => window.Name.Length > 0))
        {
            var top = window.Outline.Select(corner => plot.At(corner.X, corner.Y)).MinBy(spot => spot.Y);
            plot.Over(plot.Labels.Place(window.Name, top, NameSize, palette.Faint, palette.Ground, 5, (0, -1)));
        }
    }

    /// <summary>Whether a point lies inside a window, by the crossings of a ray to the right.</summary>
    public static bool Holds(ScatterWindow window, ScatterPoint point)
    {
        bool inside = false;
        for (int i = 0, j = window.Outline.Count - 1; i < window.Outline.Count; j = i++)
        {
            var (a, b) = (window.Outline[i], window.Outline[j]);
            if (a.Y > point.Y != b.Y > point.Y && point.X < a.X + ((point.Y - a.Y) / (b.Y - a.Y) * (b.X - a.X)))
                inside = !inside;
        }

        return inside;
    }
}
