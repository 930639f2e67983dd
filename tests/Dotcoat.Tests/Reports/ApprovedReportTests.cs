using System.Text;
using System.Text.Json.Nodes;
using Dotcoat.Tests.Commands;
using FilmOptics;
using FilmReports;
using FilmReports.Drawings;

namespace Dotcoat.Tests.Reports;

/// <summary>
/// Every folder of reports/ is redrawn from the film file that its approved.txt names, with the model that its document names, and compared.
/// To approve a change, look at the new pictures and write them, in the repository's own folder: dotcoat report FILM --out reports/NAME.
/// </summary>
public sealed class ApprovedReportTests
{
    // Not drawn: the film's name, and the list by which the command knows its own files.
    private static readonly string[] Besides = ["approved.txt", "dotcoat-files.txt"];

    [Fact]
    public void Report_RedrawnFromItsFilm_IsTheApprovedOne()
    {
        string folder = Path.Combine(Repository.Root, "reports");
        Assert.True(Directory.Exists(folder), "reports/ is missing");
        // A user's own reports may stand beside the approved ones.
        string[] reports = [.. Directory.EnumerateDirectories(folder).Where(f => File.Exists(Path.Combine(f, "approved.txt"))).Order(StringComparer.Ordinal)];
        Assert.Equal("desk-monitor, living-room-tv", string.Join(", ", reports.Select(f => Path.GetFileName(f))));
        Assert.Empty(reports.SelectMany(Differences));
    }

    [Fact]
    public void PictureDifference_OfAMovedLabelOrALostLine_IsSeen()
    {
        byte[] approved = Picture("0.512", 100, 40);
        Assert.Null(ApprovedPicture.Difference(approved, Picture("0.512", 100, 40)));
        Assert.NotNull(ApprovedPicture.Difference(approved, Picture("0.513", 100, 40)));
        Assert.NotNull(ApprovedPicture.Difference(approved, Picture("0.512", 103, 40)));
        Assert.NotNull(ApprovedPicture.Difference(approved, Picture("0.512", 100, 0)));
    }

    [Theory]
    [InlineData("x 0.3127, 12 lots", "x 0.3127, 12 lots", true)]
    [InlineData("x 0.3127", "x 0.3128", true)]
    [InlineData("x 0.3127", "x 0.3129", false)]
    [InlineData("12 lots", "13 lots", false)]
    [InlineData("Duv −0.0012", "Duv −0.0013", true)]
    [InlineData("Duv −0.0012", "Duv 0.0012", false)]
    [InlineData("1.2345678901234e-7", "1.2345678901239e-7", true)]
    [InlineData("1.2345678e-7", "1.2345688e-7", false)]
    [InlineData("lost above 0.1", "lost below 0.1", false)]
    [InlineData("a 1.0", "a 1.0 b", false)]
    public void TextDifference_SeesWordsAndMoreThanALastDigit(string approved, string found, bool isSame) =>
        Assert.Equal(isSame, ApprovedText.Difference(approved, found) is null);

    private static IEnumerable<string> Differences(string folder)
    {
        string name = Path.GetFileName(folder);
        string filmFile = File.ReadAllText(Path.Combine(folder, "approved.txt")).Trim();
        string model = (string)JsonNode.Parse(File.ReadAllText(Path.Combine(folder, "simulate.json")))!["model"]!;
        var film = ReportFilm.Of(FilmFile.Load(Path.Combine(Repository.Root, filmFile), []), FilmModels.Named(model, new ModelSettings(null, Angles: false, null, null)));
        var redrawn = FilmReport.Write(film.Case, film.Appraisal, null);
        string[] approved = [.. Directory.EnumerateFiles(folder).Select(f => Path.GetFileName(f)).Except(Besides, StringComparer.Ordinal).Order(StringComparer.Ordinal)];
        if (!approved.SequenceEqual(redrawn.Select(f => f.Name).Order(StringComparer.Ordinal), StringComparer.Ordinal))
            yield return $"{name}: approved are {string.Join(", ", approved)}; redrawn were {string.Join(", ", redrawn.Select(f => f.Name))}";
        foreach (var file in redrawn.Where(f => approved.Contains(f.Name, StringComparer.Ordinal)))
        {
            byte[] bytes = File.ReadAllBytes(Path.Combine(folder, file.Name));
            string? difference = file.Name.EndsWith(".png", StringComparison.Ordinal) ? ApprovedPicture.Difference(bytes, file.Bytes)
                : file.Name.EndsWith(".pdf", StringComparison.Ordinal) ? ApprovedText.Difference(PdfText.Of(bytes), PdfText.Of(file.Bytes))
                : ApprovedText.Difference(Encoding.UTF8.GetString(bytes), Encoding.UTF8.GetString(file.Bytes));
            if (difference is not null)
                yield return $"{name}/{file.Name}: {difference}";
        }
    }

    private static byte[] Picture(string text, double x, double lineLength) => CanvasRenderer.Png(
        new Drawing("x", "x", "x", 200, 100,
        [
            new Words(text, new(x, 50), TextAnchor.Start, 9, TextWeight.Regular, "#1d2126"),
            new Shape([new(10, 80), new(10 + lineLength, 80)], Closed: false, null, 1, new Stroke("#1d2126", 0.7)),
        ]),
        "#fbfbf8");
}
