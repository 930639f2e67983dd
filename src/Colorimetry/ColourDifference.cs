namespace Colorimetry;

/// <summary>Colour differences.</summary>
public static class ColourDifference
{
    private const double Pow25To7 = 6103515625;
    private const double DegToRad = Math.PI / 180;

    /// <summary>CIEDE2000 with all parametric factors 1.</summary>
    /// <remarks>
    /// Source: ISO/CIE 11664-6:2022; branch rules for hue as in Sharma, Wu and Dalal 2005. A hue difference of exactly 180 degrees
    /// counts as such in spite of rounding, which decides pair 14 of that paper.
    /// </remarks>
    public static double De2000(Cielab first, Cielab second)
    {
        double meanChroma = (Math.Sqrt((first.A * first.A) + (first.B * first.B)) + Math.Sqrt((second.A * second.A) + (second.B * second.B))) / 2;
        double g = 0.5 * (1 - ChromaWeight(meanChroma));
        var (c1, h1) = Polar((1 + g) * first.A, first.B);
        var (c2, h2) = Polar((1 + g) * second.A, second.B);
        bool grey = c1 * c2 == 0;

        double dh = h2 - h1;
        bool far = Math.Abs(dh) > 180 + 1e-9;
        if (grey)
            dh = 0;
        else if (far)
            dh += dh > 0 ? -360 : 360;
        double dL = second.L - first.L, dC = c2 - c1, dH = 2 * Math.Sqrt(c1 * c2) * Math.Sin(dh / 2 * DegToRad);

        double l = (first.L + second.L) / 2, c = (c1 + c2) / 2;
        double h = grey ? h1 + h2 : !far ? (h1 + h2) / 2 : h1 + h2 < 360 ? (h1 + h2 + 360) / 2 : (h1 + h2 - 360) / 2;
        double t = 1 - (0.17 * Cos(h - 30)) + (0.24 * Cos(2 * h)) + (0.32 * Cos((3 * h) + 6)) - (0.20 * Cos((4 * h) - 63));
        double fromMiddle = (l - 50) * (l - 50);
        double sL = 1 + (0.015 * fromMiddle / Math.Sqrt(20 + fromMiddle)), sC = 1 + (0.045 * c), sH = 1 + (0.015 * c * t);
        double turn = (h - 275) / 25;
        double rotation = -2 * ChromaWeight(c) * Math.Sin(60 * Math.Exp(-turn * turn) * DegToRad);
        double pl = dL / sL, pc = dC / sC, ph = dH / sH;
        return Math.Sqrt((pl * pl) + (pc * pc) + (ph * ph) + (rotation * pc * ph));
    }

    private static double ChromaWeight(double chroma)
    {
        double power = Math.Pow(chroma, 7);
        return Math.Sqrt(power / (power + Pow25To7));
    }

    private static (double Chroma, double HueDeg) Polar(double a, double b)
    {
        if (a == 0 && b == 0)
            return (0, 0);
        double hue = Math.Atan2(b, a) / DegToRad;
        return (Math.Sqrt((a * a) + (b * b)), hue < 0 ? hue + 360 : hue);
    }

    private static double Cos(double deg) => Math.Cos(deg * DegToRad);
}
