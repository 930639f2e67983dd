using System.Globalization;
using System.Text;

namespace Dotcoat.Terminal;

/// <summary>Plain text of at most 80 columns that pastes into a mail.</summary>
internal sealed class TerminalText
{
    /// <summary>Columns that no line exceeds.</summary>
    public const int Width = 80;

    private readonly StringBuilder _text = new();

    /// <summary>A paragraph, broken at spaces; later lines are indented by <paramref name="indent"/>.</summary>
    public TerminalText Paragraph(string text, int indent = 0)
    {
        string line = "", margin = new(' ', indent);
        foreach (string word in text.Split(' '))
        {
            // A word longer than a line (a path) is cut into pieces rather than run out.
            foreach (char[] chunk in word.Chunk(Width - indent))
            {
                string piece = new(chunk);
                if (line.Length > 0 && line.Length + 1 + piece.Length > Width)
                {
                    AppendLine(line);
                    line = margin + piece;
                }
                else
                {
                    line = line.Length == 0 ? piece : line.Length == indent && line.Trim().Length == 0 ? line + piece : $"{line} {piece}";
                }
            }
        }

        AppendLine(line);
        return this;
    }

    /// <summary>A line that is to be copied as it is: a path or a command. It may be longer than a line.</summary>
    public TerminalText Verbatim(string line)
    {
        AppendLine(line);
        return this;
    }

    /// <summary>An empty line.</summary>
    public TerminalText Gap()
    {
        _text.Append('\n');
        return this;
    }

    /// <summary>A table: the first column to the left, the others to the right, two spaces between.</summary>
    /// <param name="header">One text per column.</param>
    /// <param name="rows">Cells, as many as the header has.</param>
    public TerminalText Table(IReadOnlyList<string> header, IReadOnlyList<IReadOnlyList<string>> rows)
    {
        var widths = new int[header.Count];
        for (int c = 0; c < widths.Length; c++)
            widths[c] = Math.Max(header[c].Length, rows.Count == 0 ? 0 : rows.Max(r => r[c].Length));
        // Numbers are never cut; a long name is.
        widths[0] = Math.Min(widths[0], Width - widths.Skip(1).Sum(w => w + 2));
        AppendRow(header, widths);
        AppendLine(string.Join("  ", widths.Select(w => new string('-', w))));
        foreach (var row in rows)
            AppendRow(row, widths);
        return this;
    }

    /// <summary>A list of sentences under a heading; nothing where there is none.</summary>
    public TerminalText Sentences(string heading, IReadOnlyList<string> sentences)
    {
        if (sentences.Count == 0)
            return this;
        Gap().Paragraph(heading);
        foreach (string sentence in sentences)
            Paragraph($"- {sentence}", indent: 2);
        return this;
    }

    /// <inheritdoc/>
    public override string ToString() => _text.ToString();

    private void AppendRow(IReadOnlyList<string> cells, int[] widths)
    {
        string first = cells[0].Length <= widths[0] ? cells[0].PadRight(widths[0]) : $"{cells[0].AsSpan(0, widths[0] - 1)}…";
        AppendLine(string.Join("  ", cells.Skip(1).Select((cell, c) => cell.PadLeft(widths[c + 1])).Prepend(first)));
    }

    private void AppendLine(string line) => _text.Append(line.AsSpan().TrimEnd()).Append('\n');
}

/// <summary>Numbers as the terminal shows them: invariant, with a true minus, and a dash for what is not known.</summary>
internal static class Figure
{
    /// <summary>With a fixed number of decimals.</summary>
    public static string Fixed(double? value, int decimals) =>
        value is not { } number ? "–" : WithMinus(number.ToString($"F{decimals}", CultureInfo.InvariantCulture));

    /// <summary>With a fixed number of decimals and a sign always.</summary>
    public static string Signed(double? value, int decimals) =>
        value is not { } number ? "–" : (number < 0 ? "" : "+") + Fixed(number, decimals);

    /// <summary>With a fixed number of significant digits.</summary>
    public static string Digits(double? value, int digits) =>
        value is not { } number ? "–" : WithMinus(Rounded(number, digits).ToString(Math.Abs(number) is >= 1e4 and < 1e9 ? "F0" : $"G{digits}", CultureInfo.InvariantCulture));

    private static double Rounded(double number, int digits) =>
        double.Parse(number.ToString($"G{digits}", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);

    private static string WithMinus(string number) => number.Replace('-', '−');
}
