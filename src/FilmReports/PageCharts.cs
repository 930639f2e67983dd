using Colorimetry;
using FilmOptics;
using FilmReports.Charts;
using FilmReports.Drawings;

namespace FilmReports;

/// <summary>The report's charts one by one, for a page that redraws them: each in two layers, as most of a chromaticity diagram never changes.</summary>
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

    /// <summary>Names of the charts.</summary>
    public static IReadOnlyCollection<string> Names => Drawers.Keys;

    /// <summary>One chart without its tinted ground and paper, as an SVG element.</summary>
    /// <param name="name">One of <see cref="Names"/>.</param>
    /// <param name="filmCase">The film.</param>
    /// <param name="appraisal">Its figures.</param>
    /// <param name="isDark">Whether the page has a dark ground.</param>
    public static string Svg(string name, FilmCase filmCase, FilmAppraisal appraisal, bool isDark)
    {
        var drawing = Draw(name, filmCase, appraisal, isDark);
        return SvgRenderer.Write(drawing with { Marks = Layer(drawing.Marks, isGround: false) }, ground: null, standalone: false);
    }

    /// <summary>The paper and tinted ground of a chart, the same for every film, as PNG; null for a chart that has none.</summary>
    /// <param name="name">One of <see cref="Names"/>.</param>
    /// <param name="filmCase">Any film.</param>
    /// <param name="appraisal">Its figures.</param>
    /// <param name="isDark">Whether the page has a dark ground.</param>
    public static byte[]? GroundPng(string name, FilmCase filmCase, FilmAppraisal appraisal, bool isDark)
    {
        var drawing = Draw(name, filmCase, appraisal, isDark);
        var ground = Layer(drawing.Marks, isGround: true);
        return ground.Count == 0 ? null : CanvasRenderer.Png(drawing with { Marks = ground }, PaletteOf(isDark).Ground);
    }

    private static Drawing Draw(string name, FilmCase filmCase, FilmAppraisal appraisal, bool isDark)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(appraisal);
        return Drawers[name](filmCase, appraisal, PaletteOf(isDark));
    }

    private static Palette PaletteOf(bool isDark) => isDark ? Palette.Dark : Palette.Light;

    // Tiles are ground, everything else is not; what becomes empty goes.
    private static List<Mark> Layer(IEnumerable<Mark> marks, bool isGround)
    {
        var kept = new List<Mark>();
        foreach (var mark in marks)
        {
            if (mark is Window window)
            {
                if (Layer(window.Marks, isGround) is { Count: > 0 } inside)
                    kept.Add(window with { Marks = inside });
            }
            else if (mark is Tiles == isGround)
            {
                kept.Add(mark);
            }
        }

        return kept;
    }
}
