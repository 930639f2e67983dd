using System.Text;
using FilmReports.Drawings;
using FilmReports.Pages;

namespace FilmReports;

/// <summary>Turns a report into files.</summary>
internal static class ReportFiles
{
    /// <summary>The files that were asked for.</summary>
    /// <param name="request">Which.</param>
    /// <param name="textIn">The report with its drawings in a palette: screens and paper differ.</param>
    public static IEnumerable<ReportFile> Of(ReportRequest request, Func<Palette, ReportText> textIn)
    {
        var forms = request.Forms;
        var onScreen = forms.Any(form => form != ReportForm.Pdf) ? textIn(Palette.Light) : null;
        if (forms.Contains(ReportForm.Html))
            yield return Text("report.html", HtmlPage.Of(onScreen!));
        if (forms.Contains(ReportForm.Pdf))
        {
            var onPaper = textIn(Palette.Paper);
            yield return new("report.pdf", PdfRenderer.Write(PaperPages.Of(onPaper, Palette.Paper), onPaper.Title, onPaper.Date));
        }

        foreach (var chart in Charts(onScreen?.Charts ?? [], forms))
            yield return chart;
    }

    /// <summary>Drawings as files of their own.</summary>
    public static IReadOnlyList<ReportFile> Charts(IReadOnlyList<Drawing> drawings, IReadOnlyCollection<ReportForm> forms)
    {
        var files = new List<ReportFile>();
        foreach (var drawing in drawings)
        {
            if (forms.Contains(ReportForm.Png))
                files.Add(new($"{drawing.Name}.png", CanvasRenderer.Png(drawing, Palette.Light.Ground)));
            if (forms.Contains(ReportForm.Svg))
                files.Add(Text($"{drawing.Name}.svg", SvgRenderer.Write(drawing, Palette.Light.Ground, standalone: true)));
        }

        return files;
    }

    /// <summary>A text file.</summary>
    public static ReportFile Text(string name, string text) => new(name, new UTF8Encoding(encoderShouldEmitUTF8Identifier: false).GetBytes(text));
}
