using System.Xml.Linq;
using FilmReports.Drawings;
using SkiaSharp;

namespace Dotcoat.Tests.Reports;

public sealed class DrawingTests
{
    private static readonly XNamespace Svg = "http://www.w3.org/2000/svg";

    public static TheoryData<string> Films => ReportFilms.Names;

    [Theory]
    [MemberData(nameof(Films))]
    public void Labels_OverlapNowhereAndLieInside(string film)
    {
        foreach (var drawing in Drawings(film))
        {
            var boxes = TextBox.AllOf(drawing);
            Assert.NotEmpty(boxes);
            for (int i = 0; i < boxes.Count; i++)
            {
                Assert.True(boxes[i].LiesInside(drawing.Width, drawing.Height), $"{drawing.Name}: '{boxes[i].Words.Text}' runs out");
                for (int j = 0; j < i; j++)
                    Assert.False(boxes[i].Overlaps(boxes[j]), $"{drawing.Name}: '{boxes[i].Words.Text}' covers '{boxes[j].Words.Text}'");
            }
        }
    }

    // A label may be written and then painted over, or written in a glyph that draws nothing.
    [Theory]
    [MemberData(nameof(Films))]
    public void Labels_AreVisibleInThePng(string film)
    {
        foreach (var drawing in Drawings(film))
        {
            using var picture = SKBitmap.Decode(CanvasRenderer.Png(drawing, Palette.Light.Ground));
            var pixels = picture.Pixels;
            const double scale = 2; // pixels per point
            foreach (var box in TextBox.AllOf(drawing))
            {
                var ink = SKColor.Parse(box.Words.Colour);
                int left = (int)(box.Corners.Min(c => c.X) * scale), right = (int)(box.Corners.Max(c => c.X) * scale);
                int top = (int)(box.Corners.Min(c => c.Y) * scale), bottom = (int)(box.Corners.Max(c => c.Y) * scale);
                int inked = 0;
                for (int x = left; x <= Math.Min(right, picture.Width - 1); x++)
                {
                    for (int y = top; y <= Math.Min(bottom, picture.Height - 1); y++)
                        inked += IsNear(pixels[(y * picture.Width) + x], ink) ? 1 : 0;
                }

                Assert.True(inked >= 6 * box.Words.Text.Count(c => !char.IsWhiteSpace(c)), $"{drawing.Name}: '{box.Words.Text}' shows {inked} pixels of its colour");
            }
        }
    }

    [Theory]
    [MemberData(nameof(Films))]
    public void Svg_IsXmlWithATitleADescriptionAndTheSameText(string film)
    {
        foreach (var drawing in Drawings(film))
        {
            var svg = XDocument.Parse(SvgRenderer.Write(drawing, Palette.Light.Ground, standalone: true)).Root!;
            Assert.Equal(Svg + "svg", svg.Name);
            Assert.Equal(drawing.Title, svg.Element(Svg + "title")!.Value);
            Assert.False(string.IsNullOrEmpty(svg.Element(Svg + "desc")!.Value));
            Assert.Equal(TextBox.WordsOf(drawing.Marks).Select(w => w.Text).ToArray(), svg.Descendants(Svg + "text").Select(t => t.Value).ToArray());
            Assert.DoesNotContain(svg.Descendants(), e => e.Name.LocalName is "script" or "image" or "foreignObject");
            string[] ids = [.. svg.DescendantsAndSelf().Attributes("id").Select(a => a.Value)];
            Assert.Equal(ids.Distinct(StringComparer.Ordinal).ToArray(), ids);
        }
    }

    [Fact]
    public void Words_WithACharacterTheFontLacks_AreRefusedNotDropped()
    {
        var drawing = new Drawing("x", "x", "x", 90, 40, [new Words("绿", new(10, 20), TextAnchor.Start, 9, TextWeight.Regular, "#000000")]);
        Assert.Contains("U+7EFF", Assert.Throws<ArgumentException>(() => CanvasRenderer.Png(drawing, "#ffffff")).Message, StringComparison.Ordinal);
        Assert.Contains("U+7EFF", Assert.Throws<ArgumentException>(() => SvgRenderer.Write(drawing, "#ffffff", standalone: true)).Message, StringComparison.Ordinal);
    }

    // The signs that trade and page need: Greek, primes, minus, thin space, superscripts.
    [Fact]
    public void Font_HasEverySignOfTheTrade() => Assert.All(
        Enum.GetValues<TextWeight>(), weight => Assert.True(InterFont.CanWrite("λθφµΔΣ′″−–…·×°±≤≥²³⁻¹₀₁₂äöüßéñçøåЖЯ/%\u2009", weight)));

    [Theory]
    [InlineData("green K07", 200, "green K07")]
    [InlineData("green K07 of the trial", 60, "green K07…")]
    public void Fitted_KeepsWhatHasRoom(string text, double room, string expected)
    {
        string fitted = InterFont.Fitted(text, 10, TextWeight.Regular, room);
        Assert.True(InterFont.WidthOf(fitted, 10, TextWeight.Regular) <= room);
        Assert.Equal(expected, fitted);
    }

    [Fact]
    public void LabelPlacer_InACrowd_FindsRoomForAll()
    {
        var area = new Box(0, 0, 200, 120);
        var labels = new LabelPlacer(area);
        var marks = Enumerable.Range(0, 24).SelectMany(i => labels.Place($"label {i}", new(100, 60), 9, "#000000", null)).ToList();
        var boxes = TextBox.AllOf(new Drawing("x", "x", "x", 200, 120, marks));
        Assert.Equal(24, boxes.Count);
        Assert.All(boxes, box => Assert.True(box.LiesInside(200, 120)));
        Assert.All(boxes, box => Assert.DoesNotContain(boxes, other => !ReferenceEquals(other, box) && other.Overlaps(box)));
        Assert.Throws<InvalidOperationException>(() => Enumerable.Range(0, 200).SelectMany(i => labels.Place("no room", new(100, 60), 9, "#000000", null)).ToList());
    }

    private static IReadOnlyList<Drawing> Drawings(string film) => ReportFilms.Named(film).Drawings;

    private static bool IsNear(SKColor a, SKColor b) =>
        Math.Abs(a.Red - b.Red) + Math.Abs(a.Green - b.Green) + Math.Abs(a.Blue - b.Blue) < 150;
}
