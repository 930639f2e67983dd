using Colorimetry;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>The inside of the spectral locus, tinted with what sRGB can show of each colour: pale, and fading where sRGB ends.</summary>
/// <remarks>A screen cannot show these colours; the tint only says which way green, red and blue lie.</remarks>
internal static class ChromaticityGround
{
    private const double Saturation = 0.25;
    private const int Cells = 60;

    // How far beyond sRGB, in units of its most negative channel, the tint takes to fade.
    private const double FadeChannel = 0.9;

    public static IEnumerable<Mark> Marks(Plot plot, ChromaticityDiagram diagram, string ground, IReadOnlyList<Spot> locus)
    {
        var tiles = new List<Mark>();
        double stepX = (plot.X.To - plot.X.From) / Cells, stepY = (plot.Y.To - plot.Y.From) / Cells;
        for (int i = 0; i < Cells; i++)
        {
            for (int j = 0; j < Cells; j++)
            {
                double x = plot.X.From + (i * stepX), y = plot.Y.From + (j * stepY);
                var middle = Of(diagram, x + (stepX / 2), y + (stepY / 2));
                if (Tint(middle, ground) is not { } tint)
                    continue;
                // Half a point of overlap: neighbours of slightly different tint must not show seams.
                var (a, b) = (plot.At(x, y + stepY), plot.At(x + stepX, y));
                tiles.Add(new Shape(new Box(a.X, a.Y, b.X + 0.5, b.Y + 0.5).Corners, Closed: true, tint, 1, null));
            }
        }

        yield return new Window(locus, tiles);
    }

    /// <summary>A point of either diagram as a chromaticity.</summary>
    public static Chromaticity Of(ChromaticityDiagram diagram, double horizontal, double vertical) =>
        diagram == ChromaticityDiagram.Xy1931 ? new(horizontal, vertical) : Chromaticity.FromUvPrime(horizontal, vertical);

    private static string? Tint(Chromaticity colour, string ground)
    {
        if (!(colour.Y > 0.005) || colour.X < -0.02 || colour.X + colour.Y > 1.03)
            return null;
        double bigX = colour.X / colour.Y, bigZ = Math.Max(0, 1 - colour.X - colour.Y) / colour.Y;
        // Linear sRGB from XYZ: IEC 61966-2-1.
        double[] rgb =
        [
            (3.2406 * bigX) - 1.5372 - (0.4986 * bigZ),
            (-0.9689 * bigX) + 1.8758 + (0.0415 * bigZ),
            (0.0557 * bigX) - 0.2040 + (1.0570 * bigZ),
        ];
        double top = rgb.Max(), beyond = Math.Max(0, -rgb.Min() / top);
        double strength = Saturation * Math.Max(0.25, 1 - (beyond / FadeChannel));
        var result = "#";
        for (int c = 0; c < 3; c++)
        {
            double encoded = Encode(Math.Max(rgb[c], 0) / top) * 255;
            int paper = Convert.ToInt32(ground.Substring(1 + (2 * c), 2), 16);
            result += ((int)Math.Round(paper + (strength * (encoded - paper)))).ToString("x2", System.Globalization.CultureInfo.InvariantCulture);
        }

        return result;
    }

    private static double Encode(double linear) => linear <= 0.0031308 ? 12.92 * linear : (1.055 * Math.Pow(linear, 1 / 2.4)) - 0.055;
}
