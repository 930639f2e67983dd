using SkiaSharp;

namespace Dotcoat.Tests.Reports;

/// <summary>Compares a PNG with an approved one, pixel by pixel, allowing for smoothed edges that fall a shade differently.</summary>
internal static class ApprovedPicture
{
    // A channel may differ by this much anywhere, and by any amount in this share of the pixels: less than a comma of a label.
    private const int ChannelTolerance = 24;
    private const double PixelShare = 2e-5;

    /// <summary>The difference in words; null where there is none.</summary>
    public static string? Difference(byte[] approved, byte[] found)
    {
        using var a = SKBitmap.Decode(approved);
        using var b = SKBitmap.Decode(found);
        if (a.Width != b.Width || a.Height != b.Height)
            return $"{a.Width} x {a.Height} pixels are approved, {b.Width} x {b.Height} were found";
        var (pixelsA, pixelsB) = (a.Pixels, b.Pixels);
        int first = -1, differing = 0;
        for (int i = 0; i < pixelsA.Length; i++)
        {
            if (IsNear(pixelsA[i], pixelsB[i]))
                continue;
            differing++;
            first = first < 0 ? i : first;
        }

        return differing <= pixelsA.Length * PixelShare ? null : $"{differing} pixels differ, the first at {first % a.Width}, {first / a.Width}";
    }

    private static bool IsNear(SKColor a, SKColor b) =>
        Math.Abs(a.Red - b.Red) <= ChannelTolerance && Math.Abs(a.Green - b.Green) <= ChannelTolerance && Math.Abs(a.Blue - b.Blue) <= ChannelTolerance;
}
