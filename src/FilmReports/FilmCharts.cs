using Colorimetry;
using FilmOptics;
using FilmReports.Charts;
using FilmReports.Drawings;

namespace FilmReports;

/// <summary>A chart as an SVG element for a page.</summary>
/// <param name="Name">Name of the chart, as that of its file.</param>
/// <param name="Title">What it shows, in a few words.</param>
/// <param name="Svg">The element: selectable text, title and description for screen readers, no script.</param>
public sealed record ChartSvg(string Name, string Title, string Svg);

/// <summary>Light or dark ground.</summary>
public enum ChartTheme
{
    /// <summary>Ink on a near-white ground.</summary>
    Light,

    /// <summary>Pale ink on a dark ground.</summary>
    Dark,
}

/// <summary>The charts of a film, one by one, for a page that shows them as figures change.</summary>
public static class FilmCharts
{
    /// <summary>Names of the charts, in the order of the report.</summary>
    public static IReadOnlyList<string> Names { get; } = ["spectrum", "chromaticity-1931", "chromaticity-1976", "photon-fates", "lots"];

    /// <summary>One chart.</summary>
    /// <param name="name">One of <see cref="Names"/>.</param>
    /// <param name="filmCase">The film.</param>
    /// <param name="appraisal">Its figures.</param>
    /// <param name="theme">Ground.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no chart of that name.</exception>
    public static ChartSvg Svg(string name, FilmCase filmCase, FilmAppraisal appraisal, ChartTheme theme)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(appraisal);
        var palette = theme == ChartTheme.Light ? Palette.Light : Palette.Dark;
        var drawing = Named(name, filmCase, appraisal, palette);
        return new(drawing.Name, drawing.Title, SvgRenderer.Write(drawing, palette.Ground, standalone: false));
    }

    internal static Drawing Named(string name, FilmCase filmCase, FilmAppraisal appraisal, Palette palette) => name switch
    {
        "spectrum" => SpectrumChart.Of(filmCase, appraisal, palette),
        "chromaticity-1931" => ChromaticityChart.Of(filmCase, appraisal, ChromaticityDiagram.Xy1931, palette),
        "chromaticity-1976" => ChromaticityChart.Of(filmCase, appraisal, ChromaticityDiagram.UvPrime1976, palette),
        "photon-fates" => FatesChart.Of(filmCase, appraisal, palette),
        "lots" => LotChart.Of(filmCase, palette),
        _ => throw new ArgumentOutOfRangeException(nameof(name), name, $"There are {string.Join(", ", Names)}."),
    };
}
