using FilmReports.Drawings;

namespace FilmReports.Pages;

/// <summary>A table on paper: columns as wide as their cells, heads and long texts in several lines, hairlines under rows.</summary>
internal sealed class PaperTable
{
    private const double Size = 8.5, LineHeight = 11, Padding = 4, Gap = 16, LeastShare = 0.6;

    private readonly Table _table;
    private readonly Palette _palette;
    private readonly double _left, _room;
    private readonly double[] _widths;
    private readonly double _gap;

    private PaperTable(Table table, double left, double room, Palette palette)
    {
        (_table, _left, _room, _palette) = (table, left, room, palette);
        _widths = Widths();
        double cells = _widths.Sum();
        _gap = Math.Max(Gap, ((room * LeastShare) - cells) / Math.Max(1, _widths.Length - 1));
    }

    private double Right => Math.Min(_left + _room, _left + _widths.Sum() + (_gap * (_widths.Length - 1)));

    /// <summary>Caption and head, then each row.</summary>
    /// <param name="table">The table.</param>
    /// <param name="left">Where it begins, points.</param>
    /// <param name="room">How wide it may be, points.</param>
    /// <param name="together">Height up to which it is not divided, points.</param>
    /// <param name="palette">Colours.</param>
    public static IReadOnlyList<Piece> Pieces(Table table, double left, double room, double together, Palette palette)
    {
        var paper = new PaperTable(table, left, room, palette);
        var head = paper.Row(table.Head, paper._palette.Faint, isHead: true, isSum: false);
        var caption = paper.Caption();
        Piece[] rows = [.. table.Rows.Select((row, i) =>
            paper.Row(row, palette.Ink, isHead: false, isSum: table.Kind == TableKind.WithSum && i == table.Rows.Count - 1) with { Repeated = i > 0 ? head : null })];
        bool whole = caption.Height + head.Height + rows.Sum(row => row.Height) <= together;
        return [caption, head with { KeepsNext = true }, .. rows.Select((row, i) => row with { KeepsNext = i < rows.Length - 1 && (whole || i == 0 || i == rows.Length - 2) })];
    }

    private Piece Caption()
    {
        var lines = TextLines.Of(_table.Caption, Size, TextWeight.Regular, _room);
        return new(14, (lines.Count * LineHeight) + 3, top => lines.Select((line, i) =>
            new Words(line, new(_left, top + 8.5 + (i * LineHeight)), TextAnchor.Start, Size, TextWeight.Regular, _palette.Faint)), KeepsNext: true);
    }

    private Piece Row(IReadOnlyList<string> cells, string colour, bool isHead, bool isSum)
    {
        var weight = isSum ? TextWeight.SemiBold : TextWeight.Regular;
        double size = isHead ? Size - 0.5 : Size;
        IReadOnlyList<string>[] lines = [.. cells.Select((cell, i) => TextLines.Of(cell, size, weight, _widths[i] + 0.01))];
        int most = lines.Max(l => l.Count);
        double height = (most * LineHeight) + (2 * Padding) - 2;
        return new(0, height, Draw);

        IEnumerable<Mark> Draw(double top)
        {
            double x = _left;
            for (int column = 0; column < lines.Length; column++)
            {
                bool isLeft = column == 0 || _table.Kind == TableKind.Words;
                for (int i = 0; i < lines[column].Count; i++)
                {
                    // Heads stand on their line, cells hang from theirs.
                    int line = isHead ? most - lines[column].Count + i : i;
                    double baseline = top + Padding + 7.5 + (line * LineHeight);
                    yield return isLeft
                        ? new Words(lines[column][i], new(x, baseline), TextAnchor.Start, size, weight, colour)
                        : new Words(lines[column][i], new(x + _widths[column], baseline), TextAnchor.End, size, weight, colour);
                }

                x += _widths[column] + _gap;
            }

            if (isSum)
                yield return Rule(top, _palette.Ink, 0.7);
            yield return Rule(top + height, _palette.Hairline, 0.7);
        }
    }

    private Shape Rule(double y, string colour, double width) => new([new(_left, y), new(Right, y)], Closed: false, null, 1, new Stroke(colour, width));

    private double[] Widths()
    {
        int columns = _table.Head.Count;
        double room = _room - (Gap * (columns - 1));
        double[] cells = [.. Enumerable.Range(0, columns).Select(i => _table.Rows.Select(row => Width(row[i])).DefaultIfEmpty(0).Max())];
        double[] widths = [.. Enumerable.Range(0, columns).Select(i => Math.Max(cells[i], Width(_table.Head[i])))];
        if (widths.Sum() <= room)
            return widths;
        // Heads give way first, then whichever column is widest.
        widths = [.. Enumerable.Range(0, columns).Select(i => Math.Max(cells[i], TextLines.WidestWord(_table.Head[i], Size, TextWeight.Regular)))];
        while (widths.Sum() > room)
        {
            int widest = Array.IndexOf(widths, widths.Max());
            double second = widths.Where((_, i) => i != widest).DefaultIfEmpty(0).Max();
            widths[widest] -= Math.Max(1, Math.Min(widths.Sum() - room, widths[widest] - second));
        }

        // What is left goes to heads that would rather stand in one line.
        double spare = room - widths.Sum();
        foreach (int i in Enumerable.Range(0, columns).OrderBy(i => Width(_table.Head[i]) - widths[i]))
        {
            double more = Math.Clamp(Width(_table.Head[i]) - widths[i], 0, spare);
            widths[i] += more;
            spare -= more;
        }

        return widths;
    }

    private static double Width(string cell) => InterFont.WidthOf(InterFont.Writable(cell, TextWeight.SemiBold), Size, TextWeight.SemiBold);
}
