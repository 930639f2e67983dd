using FilmOptics;
using FilmReports;

namespace Dotcoat.Commands;

/// <summary>The charts of a film as output files.</summary>
internal static class Charts
{
    public static IEnumerable<OutputFile> Of(FilmCase filmCase, FilmAppraisal appraisal) =>
        FilmReport.WriteCharts(filmCase, appraisal).Select(file => new OutputFile(file.Name, file.Bytes));
}
