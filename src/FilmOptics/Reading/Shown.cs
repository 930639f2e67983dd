using System.Globalization;
using System.Text;

namespace FilmOptics.Reading;

/// <summary>How found text and numbers are written into messages.</summary>
internal static class Shown
{
    private const int Longest = 60;

    /// <summary>The text in quotes, cut where it is long, control characters made visible.</summary>
    public static string Quoted(string text)
    {
        var shown = new StringBuilder("'");
        foreach (char c in text.Length > Longest ? text[..Longest] : text)
            shown.Append(char.IsControl(c) || char.IsSurrogate(c) ? '?' : c);
        return shown.Append(text.Length > Longest ? "…'" : "'").ToString();
    }

    /// <summary>Whether the text has no control character and no half of a surrogate pair.</summary>
    public static bool IsOneLine(string text)
    {
        for (int i = 0; i < text.Length; i++)
        {
            bool isPair = i + 1 < text.Length && char.IsSurrogatePair(text[i], text[i + 1]);
            if (char.IsControl(text[i]) || (char.IsSurrogate(text[i]) && !isPair))
                return false;
            i += isPair ? 1 : 0;
        }

        return true;
    }

    /// <summary>A number with up to six digits.</summary>
    public static string Number(double value) => value.ToString("G6", CultureInfo.InvariantCulture);

    /// <summary>The word nearest to what was written, by edits (swapped letters count once), letter case aside.</summary>
    public static string? Nearest(string written, IEnumerable<string> known)
    {
        string start = written.Length > Longest ? written[..Longest] : written;
        return known.MinBy(word => Edits(start.ToUpperInvariant(), word.ToUpperInvariant()));
    }

    private static int Edits(string from, string to)
    {
        var cost = new int[from.Length + 1, to.Length + 1];
        for (int i = 0; i <= from.Length; i++)
        {
            for (int j = 0; j <= to.Length; j++)
            {
                if (i == 0 || j == 0)
                {
                    cost[i, j] = i + j;
                    continue;
                }

                int change = from[i - 1] == to[j - 1] ? 0 : 1;
                cost[i, j] = Math.Min(cost[i - 1, j - 1] + change, Math.Min(cost[i - 1, j], cost[i, j - 1]) + 1);
                if (i > 1 && j > 1 && from[i - 1] == to[j - 2] && from[i - 2] == to[j - 1])
                    cost[i, j] = Math.Min(cost[i, j], cost[i - 2, j - 2] + 1);
            }
        }

        return cost[from.Length, to.Length];
    }
}
