using System.Globalization;
using FilmReports.Drawings;

namespace FilmReports.Pages;

/// <summary>Lays a report out on A4 pages, each a drawing.</summary>
internal sealed class PaperPages
{
    private const double PageWidth = 595, PageHeight = 842, Left = 42, Right = PageWidth - 42, Top = 44, Bottom = PageHeight - 48, Room = Right - Left;
    private const double TextSize = 9, LineHeight = 12.5, LargestFigureFactor = 0.8;

    private readonly Palette _palette;
    private readonly List<List<Mark>> _pages = [[]];
    private double _y = Top;

    private PaperPages(Palette palette) => _palette = palette;

    private bool IsAtTop => _y <= Top;

    /// <summary>The pages of a report.</summary>
    /// <param name="report">Its blocks; their drawings in the palette's colours.</param>
    /// <param name="palette">Colours.</param>
    public static IReadOnlyList<Drawing> Of(ReportText report, Palette palette)
    {
        var paper = new PaperPages(palette);
        foreach (var block in report.Blocks.Aggregate(new List<List<Block>> { new() }, Grouped))
            paper.Add(block);
        return
        [
            .. paper._pages.Select((marks, i) => new Drawing(
                $"page-{(i + 1).ToString(CultureInfo.InvariantCulture)}", report.Title, "A page of a report.", PageWidth, PageHeight,
                [.. marks, .. paper.Foot(report, i + 1)])),
        ];
    }

    // Runs of blocks flow on; what is to have a page of its own stands alone.
    private static List<List<Block>> Grouped(List<List<Block>> groups, Block block)
    {
        if (block is OnePage)
            groups.AddRange([[block], []]);
        else
            groups[^1].Add(block);
        return groups;
    }

    private void Add(List<Block> blocks)
    {
        if (blocks is [OnePage page])
        {
            NewPage();
            Flow(Fitted(page.Blocks));
            NewPage();
        }
        else
        {
            Flow([.. blocks.SelectMany(block => PiecesOf(block, LargestFigureFactor))]);
        }
    }

    private void NewPage()
    {
        if (!IsAtTop)
            _pages.Add([]);
        _y = Top;
    }

    private List<Piece> Fitted(IReadOnlyList<Block> blocks)
    {
        double factor = LargestFigureFactor;
        while (true)
        {
            List<Piece> pieces = [.. blocks.SelectMany(block => PiecesOf(block, factor))];
            if (pieces.Sum(piece => piece.Before + piece.Height) <= Bottom - Top || factor < 0.4)
                return pieces;
            factor -= 0.02;
        }
    }

    private void Flow(List<Piece> pieces)
    {
        int first = 0;
        while (first < pieces.Count)
        {
            int last = first;
            while (pieces[last].KeepsNext && last + 1 < pieces.Count)
                last++;
            double height = pieces.GetRange(first, last - first + 1).Sum(piece => piece.Before + piece.Height);
            if (_y + height > Bottom && height <= Bottom - Top)
                BreakBefore(pieces[first]);
            for (; first <= last; first++)
                Place(pieces[first]);
        }
    }

    private void BreakBefore(Piece piece)
    {
        if (IsAtTop)
            return;
        NewPage();
        if (piece.Repeated is { } head)
            Place(head);
    }

    private void Place(Piece piece)
    {
        if (_y + piece.Before + piece.Height > Bottom)
            BreakBefore(piece);
        _y += IsAtTop ? 0 : piece.Before;
        _pages[^1].AddRange(piece.Draw(_y));
        _y += piece.Height;
    }

    private IReadOnlyList<Piece> PiecesOf(Block block, double figureFactor) => block switch
    {
        Heading { Level: 1 } heading => [Text(heading.Text, 16, TextWeight.SemiBold, _palette.Ink, 0) with { KeepsNext = true }],
        Heading heading => [Text(heading.Text, 12, TextWeight.SemiBold, _palette.Ink, 22) with { KeepsNext = true }],
        Paragraph { Role: ParagraphRole.Found } found => [Text(found.Text, 11, TextWeight.Regular, _palette.Ink, 8)],
        Paragraph { Role: ParagraphRole.Made } made => [Text(made.Text, 8.5, TextWeight.Regular, _palette.Faint, 4)],
        Paragraph paragraph => [Text(paragraph.Text, TextSize, TextWeight.Regular, _palette.Ink, 6)],
        Table table => PaperTable.Pieces(table, Left, Room, (Bottom - Top) * 0.6, _palette),
        Sentences sentences => [.. sentences.Items.Select(Sentence)],
        Answers answers => Rows(answers),
        Figure figure => [Picture(figure.Drawing, figureFactor)],
        _ => throw new NotSupportedException(block.GetType().Name),
    };

    private static Piece Text(string text, double size, TextWeight weight, string colour, double before)
    {
        double pitch = size * LineHeight / TextSize;
        var lines = TextLines.Of(text, size, weight, Room);
        return new(before, lines.Count * pitch, top => lines.Select((line, i) =>
            new Words(line, new(Left, top + (size * 1.05) + (i * pitch)), TextAnchor.Start, size, weight, colour)));
    }

    private Piece Sentence(string text)
    {
        const double Indent = 10;
        var lines = TextLines.Of(text, TextSize, TextWeight.Regular, Room - Indent);
        return new(4, lines.Count * LineHeight, top =>
        [
            new Disc(new(Left + 2, top + 6.2), 1.3, _palette.Faint, null),
            .. lines.Select((line, i) => new Words(line, new(Left + Indent, top + 9.5 + (i * LineHeight)), TextAnchor.Start, TextSize, TextWeight.Regular, _palette.Ink)),
        ]);
    }

    private List<Piece> Rows(Answers answers)
    {
        // Rows as even as they come.
        int columns = answers.Figures.Count % 3 == 0 ? 3 : 4;
        double pitch = Room / columns;
        return
        [
            .. answers.Figures.Chunk(columns).Select(row => new Piece(10, 27, top => row.SelectMany((figure, i) => new Mark[]
            {
                new Words(InterFont.Fitted(figure.Name, 8, TextWeight.Regular, pitch - 8), new(Left + (i * pitch), top + 8), TextAnchor.Start, 8, TextWeight.Regular, _palette.Faint),
                new Words(figure.Value, new(Left + (i * pitch), top + 23), TextAnchor.Start, 13, TextWeight.Regular, _palette.Ink),
            }))),
        ];
    }

    private static Piece Picture(Drawing drawing, double largest)
    {
        double factor = Math.Min(Math.Min(largest, Room / drawing.Width), (Bottom - Top) / drawing.Height);
        return new(12, drawing.Height * factor, top => drawing.At(new(Left, top), factor));
    }

    private IEnumerable<Mark> Foot(ReportText report, int page)
    {
        const double Baseline = PageHeight - 26;
        string number = string.Create(CultureInfo.InvariantCulture, $"page {page} of {_pages.Count}");
        yield return Small(InterFont.Fitted(InterFont.Writable(report.Title, TextWeight.Regular), 8, TextWeight.Regular, 340), Left, TextAnchor.Start);
        if (report.Date is { } date)
            yield return Small(date.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture), Right - 80, TextAnchor.End);
        yield return Small(number, Right, TextAnchor.End);

        Words Small(string text, double x, TextAnchor anchor) => new(text, new(x, Baseline), anchor, 8, TextWeight.Regular, _palette.Faint);
    }
}
