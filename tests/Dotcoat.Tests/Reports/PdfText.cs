using UglyToad.PdfPig;

namespace Dotcoat.Tests.Reports;

/// <summary>Text of a PDF as a general-purpose reader finds it, page after page.</summary>
internal static class PdfText
{
    public static string Of(byte[] pdf) => string.Join("\n\f", Pages(pdf));

    public static IReadOnlyList<string> Pages(byte[] pdf)
    {
        using var document = PdfDocument.Open(pdf);
        return [.. document.GetPages().Select(page => string.Join(' ', page.GetWords().Select(word => word.Text)))];
    }
}
