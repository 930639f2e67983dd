using System.Globalization;
using FilmDesign;
using FilmOptics;
using FilmReports.Charts;
using FilmReports.Drawings;
using FilmReports.Pages;

namespace FilmReports;

/// <summary>A quantum yield with its scans, as a page and as pictures.</summary>
public static class QuantumYieldReport
{
    /// <summary>report.html, report.pdf, sphere-scans.png and sphere-scans.svg.</summary>
    /// <param name="measurement">The scans.</param>
    /// <param name="yield">What they give.</param>
    /// <param name="fit">The yield in film; null where the sample is no film.</param>
    public static IReadOnlyList<ReportFile> Write(SphereMeasurement measurement, SphereYield yield, FilmYieldFit? fit)
    {
        ArgumentNullException.ThrowIfNull(measurement);
        ArgumentNullException.ThrowIfNull(yield);
        return [.. ReportFiles.Of(ReportRequest.Everything, palette => Text(measurement, yield, fit, SphereScansChart.Of(measurement, yield, palette)))];
    }

    private static ReportText Text(SphereMeasurement measurement, SphereYield yield, FilmYieldFit? fit, Drawing drawing)
    {
        string title = $"Quantum yield of {measurement.InBeam.Name}";
        return new(
            title,
            Date: null,
            [
                new Heading(1, title),
                new Paragraph(Finding(yield, fit), ParagraphRole.Found),
                Table.Of("Figures", ["figure", "value", "standard uncertainty"], Rows(yield, fit)),
                new Figure(drawing),
                .. yield.Warnings.Select(warning => new Paragraph(warning)),
            ],
            [drawing]);
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
            [fit is null ? "quantum yield, observed" : "external yield", Fixed(yield.YieldShare, 4), Fixed(yield.YieldUncertaintyShare, 4)],
            ["absorptance", Fixed(yield.AbsorptanceShare, 4), Fixed(yield.AbsorptanceUncertaintyShare, 4)],
        ];
        if (yield.SelfAbsorption is { } self)
        {
            rows.Add(["emission re-absorbed", Fixed(self.ReabsorbedShare, 4), ""]);
            rows.Add(["quantum yield without that", Fixed(self.YieldShare, 4), Fixed(self.YieldUncertaintyShare, 4)]);
        }

        if (fit is not null)
        {
            rows.Add(["film_yield_factor", Fixed(fit.FilmYieldFactor, 4), Fixed(fit.UncertaintyFactor, 4)]);
            rows.Add(["absorptance, computed from the film file", Fixed(fit.AbsorptanceShare, 4), ""]);
        }

        return rows;
    }

    private static string Fixed(double value, int decimals) => value.ToString($"F{decimals}", CultureInfo.InvariantCulture);
}
