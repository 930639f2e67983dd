using System.Globalization;
using System.Text;
using FilmDesign;
using FilmOptics;
using FilmReports.Charts;
using FilmReports.Drawings;
using FilmReports.Pages;

namespace FilmReports;

/// <summary>A quantum yield with its scans, as a page and as pictures.</summary>
public static class QuantumYieldReport
{
    /// <summary>report.html, sphere-scans.png and sphere-scans.svg.</summary>
    /// <param name="measurement">The scans.</param>
    /// <param name="yield">What they give.</param>
    /// <param name="fit">The yield in film; null where the sample is no film.</param>
    public static IReadOnlyList<ReportFile> Write(SphereMeasurement measurement, SphereYield yield, FilmYieldFit? fit)
    {
        ArgumentNullException.ThrowIfNull(measurement);
        ArgumentNullException.ThrowIfNull(yield);
        var drawing = SphereScansChart.Of(measurement, yield, Palette.Light);
        return
        [
            Text("report.html", Page(measurement, yield, fit, drawing)),
            new("sphere-scans.png", CanvasRenderer.Png(drawing, Palette.Light.Ground)),
            Text("sphere-scans.svg", SvgRenderer.Write(drawing, Palette.Light.Ground, standalone: true)),
        ];
    }

    private static string Page(SphereMeasurement measurement, SphereYield yield, FilmYieldFit? fit, Drawing drawing)
    {
        using var page = new PageWriter($"Quantum yield of {measurement.InBeam.Name}");
        page.Heading(1, $"Quantum yield of {measurement.InBeam.Name}");
        page.Paragraph(Finding(yield, fit));
        page.Table("Figures", ["figure", "value", "standard uncertainty"], Rows(yield, fit));
        page.Figure(drawing);
        foreach (string warning in yield.Warnings)
            page.Paragraph(warning);
        return page.Finish();
    }

    /// <summary>The finding in a sentence.</summary>
    public static string Finding(SphereYield yield, FilmYieldFit? fit)
    {
        ArgumentNullException.ThrowIfNull(yield);
        return fit is null
            ? string.Create(CultureInfo.InvariantCulture, $"quantum_yield: {yield.BestYieldShare:0.000} ± {yield.BestUncertaintyShare:0.000} ({yield.Method}{(yield.SelfAbsorption is null ? "" : ", corrected for self-absorption")}).")
            : string.Create(CultureInfo.InvariantCulture, $"film_yield_factor: {fit.FilmYieldFactor:0.000} ± {fit.UncertaintyFactor:0.000} explains the external yield of {yield.YieldShare:0.000} ({yield.Method}; light at the cut edges is in it): a yield of {fit.FilmYieldShare:0.000} in the film.");
    }

    /// <summary>Every figure with its uncertainty; empty cells where there is none.</summary>
    public static IReadOnlyList<IReadOnlyList<string>> Rows(SphereYield yield, FilmYieldFit? fit)
    {
        ArgumentNullException.ThrowIfNull(yield);
        List<IReadOnlyList<string>> rows =
        [
            [fit is null ? "quantum yield, observed" : "external yield", Figure(yield.YieldShare, 4), Figure(yield.YieldUncertaintyShare, 4)],
            ["absorptance", Figure(yield.AbsorptanceShare, 4), Figure(yield.AbsorptanceUncertaintyShare, 4)],
        ];
        if (yield.SelfAbsorption is { } self)
        {
            rows.Add(["emission re-absorbed", Figure(self.ReabsorbedShare, 4), ""]);
            rows.Add(["quantum yield without that", Figure(self.YieldShare, 4), Figure(self.YieldUncertaintyShare, 4)]);
        }

        if (fit is not null)
        {
            rows.Add(["film_yield_factor", Figure(fit.FilmYieldFactor, 4), Figure(fit.UncertaintyFactor, 4)]);
            rows.Add(["absorptance, computed from the film file", Figure(fit.AbsorptanceShare, 4), ""]);
        }

        return rows;
    }

    private static string Figure(double value, int decimals) => value.ToString($"F{decimals}", CultureInfo.InvariantCulture);

    private static ReportFile Text(string name, string text) => new(name, new UTF8Encoding(encoderShouldEmitUTF8Identifier: false).GetBytes(text));
}
