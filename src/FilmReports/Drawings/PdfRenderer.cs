using SkiaSharp;

namespace FilmReports.Drawings;

/// <summary>Writes drawings as the pages of a PDF whose text can be searched. The same pages give the same bytes: no clock is read.</summary>
internal static class PdfRenderer
{
    /// <summary>The document.</summary>
    /// <param name="pages">One drawing each, points.</param>
    /// <param name="title">Title of the document.</param>
    /// <param name="date">Its date, or null for none.</param>
    public static byte[] Write(IReadOnlyList<Drawing> pages, string title, DateOnly? date)
    {
        using var stream = new MemoryStream();
        var metadata = new SKDocumentPdfMetadata
        {
            Title = title,
            Creator = "dotcoat",
            Creation = date?.ToDateTime(TimeOnly.MinValue, DateTimeKind.Utc),
            Modified = date?.ToDateTime(TimeOnly.MinValue, DateTimeKind.Utc),
        };
        using (var document = SKDocument.CreatePdf(stream, metadata))
        {
            foreach (var page in pages)
            {
                CanvasRenderer.Draw(page.Marks, document.BeginPage((float)page.Width, (float)page.Height));
                document.EndPage();
            }

            document.Close();
        }

        return stream.ToArray();
    }
}
