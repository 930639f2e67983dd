using System.Globalization;
using System.Text;
using System.Xml;

namespace FilmReports.Drawings;

/// <summary>Writes a drawing as SVG with selectable text and a title and description for screen readers.</summary>
internal static class SvgRenderer
{
    private const string SvgNamespace = "http://www.w3.org/2000/svg";

    /// <summary>The drawing as an SVG document (or, inside a page, as an element).</summary>
    /// <param name="drawing">What to draw.</param>
    /// <param name="ground">Colour of the paper, #rrggbb; null leaves it out, so that what lies below shows.</param>
    /// <param name="standalone">Whether an XML declaration goes in front.</param>
    public static string Write(Drawing drawing, string? ground, bool standalone)
    {
        var text = new StringBuilder();
        var settings = new XmlWriterSettings { OmitXmlDeclaration = true, Indent = true, IndentChars = " ", NewLineChars = "\n" };
        using (var svg = XmlWriter.Create(text, settings))
        {
            svg.WriteStartElement("svg", SvgNamespace);
            svg.WriteAttributeString("viewBox", $"0 0 {N(drawing.Width)} {N(drawing.Height)}");
            svg.WriteAttributeString("role", "img");
            svg.WriteAttributeString("aria-labelledby", $"{drawing.Name}-title {drawing.Name}-desc");
            svg.WriteAttributeString("font-family", "Inter, 'Segoe UI', 'Helvetica Neue', Arial, 'DejaVu Sans', sans-serif");
            Element(svg, "title", $"{drawing.Name}-title", drawing.Title);
            Element(svg, "desc", $"{drawing.Name}-desc", drawing.Description);
            if (ground is not null)
                Paper(svg, drawing, ground);
            int windows = 0;
            Draw(svg, drawing.Name, drawing.Marks, ref windows);
            svg.WriteEndElement();
        }

        return (standalone ? "<?xml version=\"1.0\" encoding=\"utf-8\"?>\n" : "") + text + "\n";
    }

    private static void Paper(XmlWriter svg, Drawing drawing, string ground)
    {
        svg.WriteStartElement("rect");
        svg.WriteAttributeString("width", N(drawing.Width));
        svg.WriteAttributeString("height", N(drawing.Height));
        svg.WriteAttributeString("fill", ground);
        svg.WriteEndElement();
    }

    private static void Element(XmlWriter svg, string name, string id, string text)
    {
        svg.WriteStartElement(name);
        svg.WriteAttributeString("id", id);
        svg.WriteString(text);
        svg.WriteEndElement();
    }

    private static void Draw(XmlWriter svg, string name, IEnumerable<Mark> marks, ref int windows)
    {
        foreach (var mark in marks)
        {
            switch (mark)
            {
                case Shape shape:
                    svg.WriteStartElement(shape.Closed ? "polygon" : "polyline");
                    svg.WriteAttributeString("points", Points(shape.Spots));
                    FillAndStroke(svg, shape.Fill, shape.FillOpacity, shape.Stroke);
                    svg.WriteEndElement();
                    break;
                case Disc disc:
                    svg.WriteStartElement("circle");
                    svg.WriteAttributeString("cx", N(disc.Centre.X));
                    svg.WriteAttributeString("cy", N(disc.Centre.Y));
                    svg.WriteAttributeString("r", N(disc.Radius));
                    FillAndStroke(svg, disc.Fill, 1, disc.Stroke);
                    svg.WriteEndElement();
                    break;
                case Words words:
                    Write(svg, words);
                    break;
                case Tiles tiles:
                    svg.WriteStartElement("path");
                    svg.WriteAttributeString("fill", tiles.Fill);
                    svg.WriteAttributeString("shape-rendering", "crispEdges");
                    svg.WriteAttributeString("d", string.Concat(tiles.Boxes.Select(b => $"M{N(b.Left)} {N(b.Top)}H{N(b.Right)}V{N(b.Bottom)}H{N(b.Left)}z")));
                    svg.WriteEndElement();
                    break;
                case Window window:
                    string id = $"{name}-window-{++windows}";
                    svg.WriteStartElement("clipPath");
                    svg.WriteAttributeString("id", id);
                    svg.WriteStartElement("polygon");
                    svg.WriteAttributeString("points", Points(window.Outline));
                    svg.WriteEndElement();
                    svg.WriteEndElement();
                    svg.WriteStartElement("g");
                    svg.WriteAttributeString("clip-path", $"url(#{id})");
                    Draw(svg, name, window.Marks, ref windows);
                    svg.WriteEndElement();
                    break;
                default:
                    throw new NotSupportedException(mark.GetType().Name);
            }
        }
    }

    private static void FillAndStroke(XmlWriter svg, string? fill, double fillOpacity, Stroke? stroke)
    {
        svg.WriteAttributeString("fill", fill ?? "none");
        if (fill is not null && fillOpacity < 1)
            svg.WriteAttributeString("fill-opacity", N(fillOpacity));
        if (stroke is null)
            return;
        svg.WriteAttributeString("stroke", stroke.Colour);
        svg.WriteAttributeString("stroke-width", N(stroke.Width));
        svg.WriteAttributeString("stroke-linejoin", "round");
        if (stroke.Dash is { } dash)
            svg.WriteAttributeString("stroke-dasharray", string.Join(' ', dash.Select(N)));
        if (stroke.Opacity < 1)
            svg.WriteAttributeString("stroke-opacity", N(stroke.Opacity));
    }

    private static void Write(XmlWriter svg, Words words)
    {
        svg.WriteStartElement("text");
        svg.WriteAttributeString("x", N(words.At.X));
        svg.WriteAttributeString("y", N(words.At.Y));
        svg.WriteAttributeString("font-size", N(words.Size));
        // A viewer without Inter takes another font: held to Inter's width, no label grows into its neighbour.
        svg.WriteAttributeString("textLength", N(InterFont.WidthOf(words.Text, words.Size, words.Weight)));
        svg.WriteAttributeString("lengthAdjust", "spacingAndGlyphs");
        if (words.Weight == TextWeight.SemiBold)
            svg.WriteAttributeString("font-weight", "600");
        if (words.Anchor != TextAnchor.Start)
            svg.WriteAttributeString("text-anchor", words.Anchor == TextAnchor.Middle ? "middle" : "end");
        svg.WriteAttributeString("fill", words.Colour);
        if (words.TurnDeg != 0)
            svg.WriteAttributeString("transform", $"rotate({N(words.TurnDeg)} {N(words.At.X)} {N(words.At.Y)})");
        if (words.Halo is { } halo)
        {
            svg.WriteAttributeString("stroke", halo);
            svg.WriteAttributeString("stroke-width", "2.5");
            svg.WriteAttributeString("stroke-opacity", "0.85");
            svg.WriteAttributeString("stroke-linejoin", "round");
            svg.WriteAttributeString("paint-order", "stroke");
        }

        svg.WriteString(words.Text);
        svg.WriteEndElement();
    }

    private static string Points(IReadOnlyList<Spot> spots)
    {
        var text = new StringBuilder(spots.Count * 12);
        foreach (var spot in spots)
            Append(Append(text.Append(text.Length == 0 ? "" : " "), spot.X).Append(','), spot.Y);
        return text.ToString();
    }

    private static string N(double number) => Append(new StringBuilder(8), number).ToString();

    // Two decimals at most, none that is 0: a chart has thousands of these, and a format string takes its time with each.
    private static StringBuilder Append(StringBuilder text, double number)
    {
        long hundredths = (long)Math.Round(Math.Round(number, 2) * 100);
        if (hundredths < 0)
            text.Append('-');
        var (whole, rest) = Math.DivRem(Math.Abs(hundredths), 100);
        text.Append(CultureInfo.InvariantCulture, $"{whole}");
        if (rest > 0)
            text.Append('.').Append((char)('0' + (rest / 10)));
        if (rest % 10 > 0)
            text.Append((char)('0' + (rest % 10)));
        return text;
    }
}
