using System.Text;
using System.Xml;
using FilmReports.Drawings;

namespace FilmReports.Pages;

/// <summary>Writes a self-contained page: no script, no request, readable offline and on paper.</summary>
internal sealed class PageWriter : IDisposable
{
    private readonly StringBuilder _text = new("<!DOCTYPE html>\n");
    private readonly XmlWriter _xml;

    /// <summary>Begins the page.</summary>
    public PageWriter(string title)
    {
        _xml = XmlWriter.Create(_text, new XmlWriterSettings { OmitXmlDeclaration = true, Indent = true, IndentChars = " ", NewLineChars = "\n" });
        _xml.WriteStartElement("html");
        _xml.WriteAttributeString("lang", "en");
        _xml.WriteStartElement("head");
        _xml.WriteStartElement("meta");
        _xml.WriteAttributeString("charset", "utf-8");
        _xml.WriteEndElement();
        _xml.WriteStartElement("meta");
        _xml.WriteAttributeString("name", "viewport");
        _xml.WriteAttributeString("content", "width=device-width, initial-scale=1");
        _xml.WriteEndElement();
        _xml.WriteElementString("title", title);
        _xml.WriteStartElement("style");
        _xml.WriteRaw(PageStyle.Css);
        _xml.WriteEndElement();
        _xml.WriteEndElement();
        _xml.WriteStartElement("body");
        _xml.WriteStartElement("main");
    }

    /// <summary>A heading.</summary>
    public void Heading(int level, string text) => _xml.WriteElementString($"h{level}", text);

    /// <summary>A paragraph, with a class for its role.</summary>
    public void Paragraph(string text, string? role = null)
    {
        _xml.WriteStartElement("p");
        if (role is not null)
            _xml.WriteAttributeString("class", role);
        _xml.WriteString(text);
        _xml.WriteEndElement();
    }

    /// <summary>A table; the first column holds what a row is about.</summary>
    /// <param name="caption">What the table holds.</param>
    /// <param name="head">Heads of the columns, units with them.</param>
    /// <param name="rows">As many cells as heads.</param>
    /// <param name="kind">Figures align to the right, words to the left; a last row may be the sum.</param>
    public void Table(string caption, IReadOnlyList<string> head, IEnumerable<IReadOnlyList<string>> rows, TableKind kind = TableKind.Figures)
    {
        _xml.WriteStartElement("table");
        if (kind == TableKind.Words)
            _xml.WriteAttributeString("class", "words");
        _xml.WriteElementString("caption", caption);
        _xml.WriteStartElement("thead");
        Row("col", head, firstOnly: false);
        _xml.WriteEndElement();
        _xml.WriteStartElement("tbody");
        IReadOnlyList<string>[] all = [.. rows];
        for (int i = 0; i < all.Length; i++)
            Row("row", all[i], firstOnly: true, isSum: kind == TableKind.WithSum && i == all.Length - 1);
        _xml.WriteEndElement();
        _xml.WriteEndElement();
    }

    /// <summary>A list of sentences.</summary>
    public void List(IEnumerable<string> items)
    {
        _xml.WriteStartElement("ul");
        foreach (string item in items)
            _xml.WriteElementString("li", item);
        _xml.WriteEndElement();
    }

    /// <summary>Figures that answer first: name and value pairs.</summary>
    public void Answers(IEnumerable<(string Name, string Value)> figures)
    {
        _xml.WriteStartElement("dl");
        foreach (var (name, value) in figures)
        {
            _xml.WriteStartElement("div");
            _xml.WriteElementString("dt", name);
            _xml.WriteElementString("dd", value);
            _xml.WriteEndElement();
        }

        _xml.WriteEndElement();
    }

    /// <summary>A drawing, inline.</summary>
    public void Figure(Drawing drawing)
    {
        _xml.WriteStartElement("figure");
        _xml.WriteRaw("\n" + SvgRenderer.Write(drawing, Palette.Light.Ground, standalone: false));
        _xml.WriteEndElement();
    }

    /// <summary>The finished page.</summary>
    public string Finish()
    {
        // main, body, html
        for (int open = 0; open < 3; open++)
            _xml.WriteEndElement();
        _xml.Flush();
        return _text.Append('\n').ToString();
    }

    /// <inheritdoc/>
    public void Dispose() => _xml.Dispose();

    private void Row(string scope, IReadOnlyList<string> cells, bool firstOnly, bool isSum = false)
    {
        _xml.WriteStartElement("tr");
        if (isSum)
            _xml.WriteAttributeString("class", "sum");
        for (int i = 0; i < cells.Count; i++)
        {
            bool head = !firstOnly || i == 0;
            _xml.WriteStartElement(head ? "th" : "td");
            if (head)
                _xml.WriteAttributeString("scope", scope);
            _xml.WriteString(cells[i]);
            // A browser takes a cell closed in its own tag for an open one.
            _xml.WriteFullEndElement();
        }

        _xml.WriteEndElement();
    }
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
