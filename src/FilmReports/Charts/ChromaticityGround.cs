using System.Globalization;
using Colorimetry;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>The inside of the spectral locus, tinted with what sRGB can show of each colour: pale, and fading where sRGB ends.</summary>
/// <remarks>A screen cannot show these colours; the tint only says which way green, red and blue lie.</remarks>
internal static class ChromaticityGround
{
    private const double Saturation = 0.25;

    // Tiles are this wide and high, points, and tints differ by this much: neither step can be seen.
    private const double Tile = 4, Overlap = 0.6;
    private const int TintStep = 3;

    // How far beyond sRGB, in units of its most negative channel, the tint takes to fade, and what is left of it.
    private const double FadeChannel = 0.9, FadedShare = 0.25;

    /// <summary>The ground, cut off at the locus.</summary>
    /// <param name="scale">Where chromaticities lie.</param>
    /// <param name="ground">Colour of the paper, #rrggbb.</param>
    /// <param name="locus">The spectral locus, a convex outline.</param>
    public static IEnumerable<Mark> Marks(ChromaticityScale scale, string ground, IReadOnlyList<Spot> locus)
    {
        var tiles = new Dictionary<string, List<Box>>(StringComparer.Ordinal);
        double firstTop = Math.Floor(locus.Min(s => s.Y) / Tile) * Tile, bottom = locus.Max(s => s.Y);
        for (double top = firstTop; top < bottom; top += Tile)
        {
            var (left, right) = Extent(locus, top, top + Tile);
            double from = Math.Floor(left / Tile) * Tile;
            string? run = null;
            for (double x = from; x < right; x += Tile)
            {
                string tint = Tint(scale.ChromaticityAt(new(x + (Tile / 2), top + (Tile / 2))), ground);
                if (run is not null && tint != run)
                {
                    Keep(run, new(from, top, x, top + Tile));
                    from = x;
                }

                run = tint;
            }

            if (run is not null)
                Keep(run, new(from, top, Math.Ceiling(right / Tile) * Tile, top + Tile));
        }

        yield return new Window(locus, [.. tiles.Select(t => new Tiles(t.Key, t.Value))]);

        void Keep(string tint, Box box)
        {
            if (!tiles.TryGetValue(tint, out var boxes))
                tiles.Add(tint, boxes = []);
            // A little into the next: where a reader smooths edges, no seam shines through.
            boxes.Add(box with { Right = box.Right + Overlap, Bottom = box.Bottom + Overlap });
        }
    }

    // How far a convex outline reaches to the left and right between two heights.
    private static (double Left, double Right) Extent(IReadOnlyList<Spot> outline, double top, double bottom)
    {
        double left = double.PositiveInfinity, right = double.NegativeInfinity;
        for (int i = 0; i < outline.Count; i++)
        {
            var (a, b) = outline[i].Y <= outline[(i + 1) % outline.Count].Y
                ? (outline[i], outline[(i + 1) % outline.Count])
                : (outline[(i + 1) % outline.Count], outline[i]);
            if (b.Y < top || a.Y > bottom)
                continue;
            foreach (double y in new[] { Math.Clamp(top, a.Y, b.Y), Math.Clamp(bottom, a.Y, b.Y) })
            {
                double x = b.Y > a.Y ? a.X + ((y - a.Y) / (b.Y - a.Y) * (b.X - a.X)) : b.X;
                (left, right) = (Math.Min(left, x), Math.Max(right, x));
            }
        }

        return (left, right);
    }

    private static string Tint(Chromaticity colour, string ground)
    {
        // Just outside the locus a coordinate may be 0 or below: the tile is cut off there, its tint is that of the edge.
        double y = Math.Max(colour.Y, 0.005), bigX = Math.Max(0, colour.X) / y, bigZ = Math.Max(0, 1 - colour.X - colour.Y) / y;
        // Linear sRGB from XYZ: IEC 61966-2-1.
        double[] rgb =
        [
            (3.2406 * bigX) - 1.5372 - (0.4986 * bigZ),
            (-0.9689 * bigX) + 1.8758 + (0.0415 * bigZ),
            (0.0557 * bigX) - 0.2040 + (1.0570 * bigZ),
        ];
        double highest = rgb.Max(), beyond = Math.Max(0, -rgb.Min() / highest);
        double strength = Saturation * Math.Max(FadedShare, 1 - (beyond / FadeChannel));
        var result = "#";
        for (int c = 0; c < 3; c++)
        {
            double encoded = Encode(Math.Max(rgb[c], 0) / highest) * 255;
            int paper = int.Parse(ground.AsSpan(1 + (2 * c), 2), NumberStyles.HexNumber, CultureInfo.InvariantCulture);
            int channel = (int)Math.Round((paper + (strength * (encoded - paper))) / TintStep) * TintStep;
            result += Math.Min(channel, 255).ToString("x2", CultureInfo.InvariantCulture);
        }

        return result;
    }

    private static double Encode(double linear) => linear <= 0.0031308 ? 12.92 * linear : (1.055 * Math.Pow(linear, 1 / 2.4)) - 0.055;
}
