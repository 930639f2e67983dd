using System.Globalization;
using System.Text;
using System.Xml;
using FilmReports.Drawings;

namespace FilmReports.Pages;

/// <summary>Writes a self-contained page: no script, no request, readable offline and on paper.</summary>
internal static class HtmlPage
{
    /// <summary>The page of a report.</summary>
    public static string Of(ReportText report)
    {
        var text = new StringBuilder("<!DOCTYPE html>\n");
        using (var xml = XmlWriter.Create(text, new XmlWriterSettings { OmitXmlDeclaration = true, Indent = true, IndentChars = " ", NewLineChars = "\n" }))
            Write(xml, report);
        return text.Append('\n').ToString();
    }

    private static void Write(XmlWriter xml, ReportText report)
    {
        xml.WriteStartElement("html");
        xml.WriteAttributeString("lang", "en");
        xml.WriteStartElement("head");
        Meta(xml, "charset", "utf-8");
        Meta(xml, "name", "viewport", "width=device-width, initial-scale=1");
        xml.WriteElementString("title", report.Title);
        xml.WriteStartElement("style");
        xml.WriteRaw(PageStyle.Css);
        xml.WriteEndElement();
        xml.WriteEndElement();
        xml.WriteStartElement("body");
        xml.WriteStartElement("main");
        if (report.Date is { } date)
            Write(xml, new Paragraph(date.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture), ParagraphRole.Made));
        foreach (var block in report.Blocks)
            Write(xml, block);
        xml.WriteEndElement();
        xml.WriteEndElement();
        xml.WriteEndElement();
    }

    private static void Meta(XmlWriter xml, string name, string value, string? content = null)
    {
        xml.WriteStartElement("meta");
        xml.WriteAttributeString(name, value);
        if (content is not null)
            xml.WriteAttributeString("content", content);
        xml.WriteEndElement();
    }

    private static void Write(XmlWriter xml, Block block)
    {
        switch (block)
        {
            case Heading heading:
                xml.WriteElementString($"h{heading.Level}", heading.Text);
                break;
            case Paragraph paragraph:
                xml.WriteStartElement("p");
                if (paragraph.Role != ParagraphRole.Plain)
                    xml.WriteAttributeString("class", paragraph.Role == ParagraphRole.Found ? "found" : "made");
                xml.WriteString(paragraph.Text);
                xml.WriteEndElement();
                break;
            case Table table:
                Write(xml, table);
                break;
            case Sentences sentences:
                xml.WriteStartElement("ul");
                foreach (string item in sentences.Items)
                    xml.WriteElementString("li", item);
                xml.WriteEndElement();
                break;
            case Answers answers:
                Write(xml, answers);
                break;
            case Figure figure:
                xml.WriteStartElement("figure");
                xml.WriteRaw("\n" + SvgRenderer.Write(figure.Drawing, Palette.Light.Ground, standalone: false));
                xml.WriteEndElement();
                break;
            case OnePage page:
                xml.WriteStartElement("section");
                xml.WriteAttributeString("class", "page");
                foreach (var inner in page.Blocks)
                    Write(xml, inner);
                xml.WriteEndElement();
                break;
            default:
                throw new NotSupportedException(block.GetType().Name);
        }
    }

    private static void Write(XmlWriter xml, Table table)
    {
        xml.WriteStartElement("table");
        if (table.Kind == TableKind.Words)
            xml.WriteAttributeString("class", "words");
        xml.WriteElementString("caption", table.Caption);
        xml.WriteStartElement("thead");
        Row(xml, "col", table.Head, firstOnly: false);
        xml.WriteEndElement();
        xml.WriteStartElement("tbody");
        for (int i = 0; i < table.Rows.Count; i++)
            Row(xml, "row", table.Rows[i], firstOnly: true, isSum: table.Kind == TableKind.WithSum && i == table.Rows.Count - 1);
        xml.WriteEndElement();
        xml.WriteEndElement();
    }

    private static void Write(XmlWriter xml, Answers answers)
    {
        xml.WriteStartElement("dl");
        foreach (var (name, value) in answers.Figures)
        {
            xml.WriteStartElement("div");
            xml.WriteElementString("dt", name);
            xml.WriteElementString("dd", value);
            xml.WriteEndElement();
        }

        xml.WriteEndElement();
    }

    private static void Row(XmlWriter xml, string scope, IReadOnlyList<string> cells, bool firstOnly, bool isSum = false)
    {
        xml.WriteStartElement("tr");
        if (isSum)
            xml.WriteAttributeString("class", "sum");
        for (int i = 0; i < cells.Count; i++)
        {
            bool head = !firstOnly || i == 0;
            xml.WriteStartElement(head ? "th" : "td");
            if (head)
                xml.WriteAttributeString("scope", scope);
            xml.WriteString(cells[i]);
            // A browser takes a cell closed in its own tag for an open one.
            xml.WriteFullEndElement();
        }

        xml.WriteEndElement();
    }
}
