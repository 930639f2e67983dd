using Colorimetry;
using FilmOptics;
using FilmReports.Charts;
using FilmReports.Drawings;

namespace FilmReports;

/// <summary>The report's charts one by one, as SVG elements for a page that redraws them.</summary>
public static class PageCharts
{
    private static readonly Dictionary<string, Func<FilmCase, FilmAppraisal, Palette, Drawing>> Drawers = new(StringComparer.Ordinal)
    {
        ["spectrum"] = SpectrumChart.Of,
        ["chromaticity-1931"] = (filmCase, appraisal, palette) => ChromaticityChart.Of(filmCase, appraisal, ChromaticityDiagram.Xy1931, palette),
        ["chromaticity-1976"] = (filmCase, appraisal, palette) => ChromaticityChart.Of(filmCase, appraisal, ChromaticityDiagram.UvPrime1976, palette),
        ["photon-fates"] = FatesChart.Of,
        ["lots"] = (filmCase, _, palette) => LotChart.Of(filmCase, palette),
    };

    /// <summary>Names that <see cref="Svg"/> takes.</summary>
    public static IReadOnlyCollection<string> Names => Drawers.Keys;

    /// <summary>One chart as an SVG element.</summary>
    /// <param name="name">One of <see cref="Names"/>.</param>
    /// <param name="filmCase">The film.</param>
    /// <param name="appraisal">Its figures.</param>
    /// <param name="isDark">Whether the page has a dark ground.</param>
    public static string Svg(string name, FilmCase filmCase, FilmAppraisal appraisal, bool isDark)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(appraisal);
        var palette = isDark ? Palette.Dark : Palette.Light;
        return SvgRenderer.Write(Drawers[name](filmCase, appraisal, palette), palette.Ground, standalone: false);
    }
}
