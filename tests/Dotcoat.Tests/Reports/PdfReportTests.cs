using System.Text;
using System.Xml.Linq;
using FilmReports;
using FilmReports.Drawings;
using FilmReports.Pages;
using UglyToad.PdfPig;

namespace Dotcoat.Tests.Reports;

public sealed class PdfReportTests
{
    public static TheoryData<string> Films => ReportFilms.Names;

    [Fact]
    public void Pdf_ReadBack_HasTitleDatePagesAndText()
    {
        byte[] pdf = Pdf("desk-monitor", new DateOnly(2026, 3, 31));
        using var document = PdfDocument.Open(pdf);
        Assert.Equal("Desk monitor, cadmium-based demo", document.Information.Title);
        Assert.Contains("20260331", document.Information.CreationDate, StringComparison.Ordinal);
        var pages = PdfText.Pages(pdf);
        Assert.InRange(pages.Count, 4, 9);
        for (int i = 0; i < pages.Count; i++)
            Assert.Contains($"2026-03-31 page {i + 1} of {pages.Count}", pages[i], StringComparison.Ordinal);
        string text = string.Join(' ', pages);
        foreach (string phrase in (string[])["on target", "coverage of BT.2020 in u′v′", "Where each source photon goes", "green K07", "panel white", "mm⁻¹", "2011/65/EU", "safety data sheets"])
            Assert.Contains(phrase, text, StringComparison.Ordinal);
        // The answer stands on the first page, and so do the pictures that explain it.
        Assert.Contains("wavelength / nm", pages[0], StringComparison.Ordinal);
        Assert.Contains("1 source photon", pages[0], StringComparison.Ordinal);
    }

    [Fact]
    public void Pdf_WithoutADate_HasNone()
    {
        byte[] pdf = Pdf("desk-monitor", date: null);
        using var document = PdfDocument.Open(pdf);
        Assert.True(string.IsNullOrEmpty(document.Information.CreationDate));
        Assert.DoesNotContain(DateTime.UtcNow.Year.ToString(System.Globalization.CultureInfo.InvariantCulture) + "-", PdfText.Of(pdf), StringComparison.Ordinal);
        Assert.Equal(pdf, Pdf("desk-monitor", date: null));
    }

    // A halo drawn as text would be found a second time.
    [Fact]
    public void Pdf_ALabelWithAHalo_IsFoundOnce()
    {
        var page = new Drawing("x", "x", "x", 200, 100, [new Words("label", new(20, 50), TextAnchor.Start, 9, TextWeight.Regular, "#1d2126", Halo: "#ffffff")]);
        Assert.Equal("label", PdfText.Of(PdfRenderer.Write([page], "x", date: null)));
    }

    [Theory]
    [MemberData(nameof(Films))]
    public void Pages_NoTextCoversAnotherOrRunsOut(string film)
    {
        foreach (var page in Pages(film))
        {
            var boxes = TextBox.AllOf(page);
            for (int i = 0; i < boxes.Count; i++)
            {
                Assert.True(boxes[i].LiesInside(page.Width, page.Height), $"{page.Name}: '{boxes[i].Words.Text}' runs out");
                for (int j = 0; j < i; j++)
                    Assert.False(boxes[i].Overlaps(boxes[j]), $"{page.Name}: '{boxes[i].Words.Text}' covers '{boxes[j].Words.Text}'");
            }
        }
    }

    [Fact]
    public void Pages_OfAnotherScript_ShowABoxForWhatTheFontLacks() =>
        Assert.Contains(Pages("other script").SelectMany(page => TextBox.WordsOf(page.Marks)), words => words.Text.Contains("□□ K07", StringComparison.Ordinal));

    [Fact]
    public void Pages_OfALongTable_RepeatItsHeadAndLoseNoRow()
    {
        var table = Table.Of("Rows", ["row", "value"], Enumerable.Range(0, 120).Select(i => (IReadOnlyList<string>)[$"row {i}", $"{i}"]));
        var pages = PaperPages.Of(new("t", null, [table], []), Palette.Paper);
        Assert.True(pages.Count > 2);
        Assert.All(pages, page => Assert.Contains(TextBox.WordsOf(page.Marks), words => words.Text == "value"));
        Assert.Equal(120, pages.SelectMany(page => TextBox.WordsOf(page.Marks)).Count(words => words.Text.StartsWith("row ", StringComparison.Ordinal)));
    }

    [Theory]
    [InlineData("one two three four", 60)]
    [InlineData("averyveryverylongwordthatfitsnoline", 40)]
    public void Lines_FitAndKeepEveryLetter(string text, double room)
    {
        var lines = TextLines.Of(text, 9, TextWeight.Regular, room);
        Assert.True(lines.Count > 1);
        Assert.All(lines, line => Assert.True(InterFont.WidthOf(line, 9, TextWeight.Regular) <= room, line));
        Assert.Equal(text.Replace(" ", "", StringComparison.Ordinal), string.Concat(lines).Replace(" ", "", StringComparison.Ordinal));
    }

    [Fact]
    public void SideBySide_SaysEveryFilmOnTheFirstPageThenEachInFull()
    {
        ReportedFilm[] films = [.. new[] { "desk-monitor", "living-room-tv", "off target" }.Select(ReportFilms.Named).Select(film => new ReportedFilm(film.Case, film.Appraisal))];
        var files = FilmsReport.Write(films, new ReportRequest([ReportForm.Html, ReportForm.Pdf], null));
        var pages = PdfText.Pages(files.Single(f => f.Name == "report.pdf").Bytes);
        Assert.Contains("3 films side by side", pages[0], StringComparison.Ordinal);
        Assert.Contains("off target", pages[0], StringComparison.Ordinal);
        Assert.All(films, film => Assert.Contains(film.Case.Film.Title, pages[0], StringComparison.Ordinal));
        Assert.Contains(pages, page => page.Contains("C · Cautions", StringComparison.Ordinal));
        // One page, one name each: a browser would send every reference to the first.
        string html = Encoding.UTF8.GetString(files.Single(f => f.Name == "report.html").Bytes);
        string[] ids = [.. XDocument.Parse(html["<!DOCTYPE html>\n".Length..]).Descendants().Attributes("id").Select(a => a.Value)];
        Assert.Equal(ids.Length, ids.Distinct(StringComparer.Ordinal).Count());
    }

    private static IReadOnlyList<Drawing> Pages(string film)
    {
        var (filmCase, appraisal) = ReportFilms.Named(film);
        var drawings = FilmReport.Drawings(filmCase, appraisal, Palette.Paper);
        return PaperPages.Of(new(filmCase.Film.Title, null, ReportPage.Of(filmCase, appraisal, null, drawings), drawings), Palette.Paper);
    }

    private static byte[] Pdf(string film, DateOnly? date)
    {
        var (filmCase, appraisal) = ReportFilms.Named(film);
        return FilmReport.Write(filmCase, appraisal, null, new ReportRequest([ReportForm.Pdf], date)).Single(f => f.Name == "report.pdf").Bytes;
    }
}
