using SkiaSharp;

namespace FilmReports.Drawings;

/// <summary>The font that ships with the build. No other font is ever used: on a machine without fonts, text would vanish silently.</summary>
internal static class InterFont
{
    private static readonly Lazy<SKTypeface> Regular = new(() => Load("Inter-Regular"));
    private static readonly Lazy<SKTypeface> SemiBold = new(() => Load("Inter-SemiBold"));

    /// <summary>A font for drawing or measuring; the caller disposes of it.</summary>
    public static SKFont Of(double size, TextWeight weight) => new(TypefaceOf(weight), (float)size)
    {
        LinearMetrics = true,
        Hinting = SKFontHinting.None,
        Subpixel = true,
        Edging = SKFontEdging.Antialias,
    };

    /// <summary>Width of a text, points.</summary>
    /// <exception cref="ArgumentException">The font lacks a character: it would be drawn as nothing.</exception>
    public static double WidthOf(string text, double size, TextWeight weight)
    {
        using var font = Of(size, weight);
        RequireGlyphs(text, font);
        return font.MeasureText(text);
    }

    /// <summary>Throws where a character cannot be drawn.</summary>
    public static void RequireGlyphs(string text, SKFont font)
    {
        for (int i = 0; i < text.Length; i += char.IsSurrogatePair(text, i) ? 2 : 1)
        {
            int character = char.ConvertToUtf32(text, i);
            if (!font.ContainsGlyph(character))
                throw new ArgumentException($"The font has no U+{character:X4}, needed by '{text}'.", nameof(text));
        }
    }

    private static SKTypeface TypefaceOf(TextWeight weight) => weight == TextWeight.Regular ? Regular.Value : SemiBold.Value;

    private static SKTypeface Load(string name)
    {
        using var stream = typeof(InterFont).Assembly.GetManifestResourceStream($"fonts/{name}.ttf")
            ?? throw new InvalidOperationException($"The font {name} was not built in.");
        var typeface = SKTypeface.FromStream(stream);
        if (typeface is null || typeface.GlyphCount == 0)
            throw new InvalidOperationException($"The font {name} has no glyphs; text would vanish.");
        return typeface;
    }
}
