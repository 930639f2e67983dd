using FilmReports.Drawings;

namespace FilmReports.Pages;

/// <summary>A piece of a report. The HTML page and the PDF are two readers of the same list.</summary>
internal abstract record Block;

/// <summary>A heading.</summary>
/// <param name="Level">1 for the name of a film or report, 2 for a section.</param>
/// <param name="Text">Its words.</param>
internal sealed record Heading(int Level, string Text) : Block;

/// <summary>A paragraph.</summary>
/// <param name="Text">Its sentences.</param>
/// <param name="Role">What they are to the reader.</param>
internal sealed record Paragraph(string Text, ParagraphRole Role = ParagraphRole.Plain) : Block;

/// <summary>A table; the first column holds what a row is about.</summary>
/// <param name="Caption">What the table holds.</param>
/// <param name="Head">Heads of the columns, units with them.</param>
/// <param name="Rows">As many cells each as heads.</param>
/// <param name="Kind">Figures align to the right, words to the left; a last row may be the sum.</param>
internal sealed record Table(string Caption, IReadOnlyList<string> Head, IReadOnlyList<IReadOnlyList<string>> Rows, TableKind Kind) : Block
{
    /// <summary>A table of rows that are made as they are asked for.</summary>
    public static Table Of(string caption, IReadOnlyList<string> head, IEnumerable<IReadOnlyList<string>> rows, TableKind kind = TableKind.Figures) =>
        new(caption, head, [.. rows], kind);
}

/// <summary>A list of sentences.</summary>
internal sealed record Sentences(IReadOnlyList<string> Items) : Block;

/// <summary>Figures that answer first: name and value pairs.</summary>
internal sealed record Answers(IReadOnlyList<(string Name, string Value)> Figures) : Block;

/// <summary>A drawing.</summary>
internal sealed record Figure(Drawing Drawing) : Block;

/// <summary>What belongs on one page: drawings in it shrink together until the whole fits, and what follows begins a new page.</summary>
internal sealed record OnePage(IReadOnlyList<Block> Blocks) : Block;

/// <summary>What a paragraph is to the reader.</summary>
internal enum ParagraphRole
{
    /// <summary>Text.</summary>
    Plain,

    /// <summary>How the figures were made.</summary>
    Made,

    /// <summary>The answer.</summary>
    Found,
}

/// <summary>What the cells of a table hold.</summary>
internal enum TableKind
{
    /// <summary>Figures.</summary>
    Figures,

    /// <summary>Figures, and their sum in the last row.</summary>
    WithSum,

    /// <summary>Words.</summary>
    Words,
}

/// <summary>A report before it is written: its title, its date if it has one, and its blocks.</summary>
/// <param name="Title">Title of the document.</param>
/// <param name="Date">The date to print, given by whoever asks for the report; no clock is read.</param>
/// <param name="Blocks">Everything in it.</param>
/// <param name="Charts">Those of its drawings that become files of their own.</param>
internal sealed record ReportText(string Title, DateOnly? Date, IReadOnlyList<Block> Blocks, IReadOnlyList<Drawing> Charts);
