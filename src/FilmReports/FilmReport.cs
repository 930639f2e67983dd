using System.Text;
using Colorimetry;
using FilmDesign;
using FilmOptics;
using FilmReports.Charts;
using FilmReports.Drawings;
using FilmReports.Pages;

namespace FilmReports;

/// <summary>A file of a report.</summary>
/// <param name="Name">File name.</param>
/// <param name="Bytes">Content.</param>
public sealed record ReportFile(string Name, byte[] Bytes);

/// <summary>The report of one film: a page, its charts and the JSON document. Same input, same bytes: no clock and no machine in it.</summary>
public static class FilmReport
{
    /// <summary>All files of the report.</summary>
    /// <param name="filmCase">The film file.</param>
    /// <param name="appraisal">Its figures.</param>
    /// <param name="formulation">The search behind it, or null where the film was taken as it is.</param>
    public static IReadOnlyList<ReportFile> Write(FilmCase filmCase, FilmAppraisal appraisal, Formulation? formulation)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(appraisal);
        var drawings = Drawings(filmCase, appraisal);
        string json = formulation is null ? ReportJson.Simulate(filmCase, appraisal) : ReportJson.Formulate(formulation);
        return
        [
            Text("report.html", ReportPage.Write(filmCase, appraisal, formulation, drawings)),
            Text(formulation is null ? "simulate.json" : "formulate.json", json),
            .. Charts(drawings),
        ];
    }

    /// <summary>The charts alone, as PNG and SVG.</summary>
    public static IReadOnlyList<ReportFile> WriteCharts(FilmCase filmCase, FilmAppraisal appraisal)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(appraisal);
        return Charts(Drawings(filmCase, appraisal));
    }

    internal static IReadOnlyList<Drawing> Drawings(FilmCase filmCase, FilmAppraisal appraisal) =>
    [
        SpectrumChart.Of(filmCase, appraisal, Palette.Light),
        ChromaticityChart.Of(filmCase, appraisal, ChromaticityDiagram.Xy1931, Palette.Light),
        ChromaticityChart.Of(filmCase, appraisal, ChromaticityDiagram.UvPrime1976, Palette.Light),
        FatesChart.Of(filmCase, appraisal, Palette.Light),
        LotChart.Of(filmCase, Palette.Light),
    ];

    private static IReadOnlyList<ReportFile> Charts(IReadOnlyList<Drawing> drawings) =>
    [
        .. drawings.SelectMany(drawing => new[]
        {
            new ReportFile($"{drawing.Name}.png", CanvasRenderer.Png(drawing, Palette.Light.Ground)),
            Text($"{drawing.Name}.svg", SvgRenderer.Write(drawing, Palette.Light.Ground, standalone: true)),
        }),
    ];

    private static ReportFile Text(string name, string text) => new(name, new UTF8Encoding(encoderShouldEmitUTF8Identifier: false).GetBytes(text));
}
