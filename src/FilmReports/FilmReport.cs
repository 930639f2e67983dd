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
    /// <param name="request">Which files; null for all, without a date.</param>
    /// <param name="map">What other loadings would do, where it was computed.</param>
    public static IReadOnlyList<ReportFile> Write(
        FilmCase filmCase, FilmAppraisal appraisal, Formulation? formulation, ReportRequest? request = null, LoadingMap? map = null)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(appraisal);
        request ??= ReportRequest.Everything;
        string json = formulation is null ? ReportJson.Simulate(filmCase, appraisal) : ReportJson.Formulate(formulation);
        return
        [
            .. ReportFiles.Of(request, Text),
            ReportFiles.Text(formulation is null ? "simulate.json" : "formulate.json", json),
        ];

        ReportText Text(Palette palette)
        {
            var drawings = Drawings(filmCase, appraisal, palette, map);
            return new(filmCase.Film.Title, request.Date, ReportPage.Of(filmCase, appraisal, formulation, drawings), drawings);
        }
    }

    /// <summary>The charts alone, as PNG and SVG.</summary>
    public static IReadOnlyList<ReportFile> WriteCharts(FilmCase filmCase, FilmAppraisal appraisal)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(appraisal);
        return ReportFiles.Charts(Drawings(filmCase, appraisal, Palette.Light), ReportRequest.Everything.Forms);
    }

    internal static IReadOnlyList<Drawing> Drawings(FilmCase filmCase, FilmAppraisal appraisal, Palette palette, LoadingMap? map = null) =>
    [
        SpectrumChart.Of(filmCase, appraisal, palette),
        ChromaticityChart.Of(filmCase, appraisal, ChromaticityDiagram.Xy1931, palette),
        ChromaticityChart.Of(filmCase, appraisal, ChromaticityDiagram.UvPrime1976, palette),
        FatesChart.Of(filmCase, appraisal, palette),
        LotChart.Of(filmCase, palette),
        .. appraisal.Output.Angles is null ? Array.Empty<Drawing>() : [AngleChart.Of(filmCase, appraisal.Output.Angles, palette)],
        .. appraisal.Zone is null ? Array.Empty<Drawing>() : [ZoneChart.Of([("this film", appraisal.Zone)], palette)],
        .. map is null ? Array.Empty<Drawing>() : [LoadingMapChart.Of(filmCase, map, palette)],
    ];
}
