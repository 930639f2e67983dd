using System.Buffers;
using System.Collections.Concurrent;
using System.Text;
using SkiaSharp;

namespace FilmReports.Drawings;

/// <summary>The font that ships with the build. No other font is ever used: on a machine without fonts, text would vanish silently.</summary>
internal static class InterFont
{
    private static readonly Lazy<SKTypeface> Regular = new(() => Load("Inter-Regular"));
    private static readonly Lazy<SKTypeface> SemiBold = new(() => Load("Inter-SemiBold"));

    // Labels repeat from drawing to drawing, and measuring makes a native font each time.
    private const int MostWidths = 10_000;
    private static readonly ConcurrentDictionary<(string Text, double Size, TextWeight Weight), double> Widths = new();

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
        if (Widths.Count >= MostWidths)
            Widths.Clear();
        return Widths.GetOrAdd((text, size, weight), Measured);
    }

    /// <summary>Whether every character can be drawn.</summary>
    public static bool CanWrite(string text, TextWeight weight)
    {
        using var font = Of(1, weight);
        return Missing(text, font) is null;
    }

    /// <summary>The text, or as much of its beginning as has room, with an ellipsis.</summary>
    /// <param name="text">Any text.</param>
    /// <param name="size">Points.</param>
    /// <param name="weight">Weight.</param>
    /// <param name="room">Greatest width, points.</param>
    public static string Fitted(string text, double size, TextWeight weight, double room)
    {
        if (WidthOf(text, size, weight) <= room)
            return text;
        int length = text.Length;
        do
            length -= char.IsLowSurrogate(text[length - 1]) ? 2 : 1;
        while (length > 0 && WidthOf($"{text[..length].TrimEnd()}…", size, weight) > room);
        return $"{text[..length].TrimEnd()}…";
    }

    /// <summary>The text with a box in place of each character that cannot be drawn.</summary>
    public static string Writable(string text, TextWeight weight)
    {
        if (CanWrite(text, weight))
            return text;
        using var font = Of(1, weight);
        var written = new StringBuilder();
        for (int i = 0; i < text.Length;)
        {
            bool isWhole = Rune.DecodeFromUtf16(text.AsSpan(i), out var rune, out int length) == OperationStatus.Done;
            written.Append(isWhole && font.ContainsGlyph(rune.Value) ? text.AsSpan(i, length) : "\u25a1");
            i += length;
        }

        return written.ToString();
    }

    /// <summary>Throws where a character cannot be drawn.</summary>
    public static void RequireGlyphs(string text, SKFont font)
    {
        if (Missing(text, font) is { } character)
            throw new ArgumentException($"The font has no {character}, needed by '{text}'.", nameof(text));
    }

    private static double Measured((string Text, double Size, TextWeight Weight) words)
    {
        using var font = Of(words.Size, words.Weight);
        RequireGlyphs(words.Text, font);
        return font.MeasureText(words.Text);
    }

    private static string? Missing(string text, SKFont font)
    {
        int i = 0;
        while (i < text.Length)
        {
            // Half a surrogate pair is no character, and no font has it.
            if (Rune.DecodeFromUtf16(text.AsSpan(i), out var rune, out int length) != OperationStatus.Done || !font.ContainsGlyph(rune.Value))
                return $"U+{(int)text[i]:X4}";
            i += length;
        }

        return null;
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
