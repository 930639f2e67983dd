using FilmReports.Drawings;

namespace FilmReports.Pages;

/// <summary>Breaks text into lines, for paper.</summary>
internal static class TextLines
{
    /// <summary>The text in lines that fit; a word that does not fit is broken.</summary>
    /// <param name="text">Any text; characters that the font lacks come out as a box.</param>
    /// <param name="size">Points.</param>
    /// <param name="weight">Weight.</param>
    /// <param name="room">Greatest width of a line, points.</param>
    public static IReadOnlyList<string> Of(string text, double size, TextWeight weight, double room)
    {
        var lines = new List<string>();
        string line = "";
        foreach (string word in InterFont.Writable(text, weight).Split(' ', StringSplitOptions.RemoveEmptyEntries))
        {
            if (line.Length > 0 && InterFont.WidthOf($"{line} {word}", size, weight) <= room)
            {
                line = $"{line} {word}";
                continue;
            }

            if (line.Length > 0)
                lines.Add(line);
            line = word;
            while (InterFont.WidthOf(line, size, weight) > room && line.Length > 1)
            {
                int fits = line.Length - 1;
                while (fits > 1 && InterFont.WidthOf(line[..fits], size, weight) > room)
                    fits--;
                lines.Add(line[..fits]);
                line = line[fits..];
            }
        }

        lines.Add(line);
        return lines;
    }

    /// <summary>Width of the widest word, points.</summary>
    public static double WidestWord(string text, double size, TextWeight weight) => InterFont.Writable(text, weight)
        .Split(' ', StringSplitOptions.RemoveEmptyEntries).Select(word => InterFont.WidthOf(word, size, weight)).DefaultIfEmpty(0).Max();
}
