using System.Text.Json;

namespace Dotcoat.Inspection;

/// <summary>The JSON document of inspect.</summary>
internal static class InspectionJson
{
    private static readonly JsonSerializerOptions Indented = new() { WriteIndented = true };

    /// <summary>One document; what is not known or does not apply is null.</summary>
    public static string Of(SpectrumInspection inspection)
    {
        var at = inspection.At;
        string position = inspection.IsAngleTable ? "deg" : "nm";
        var document = new Dictionary<string, object?>(StringComparer.Ordinal)
        {
            ["schema"] = "dotcoat/1",
            ["title"] = inspection.Table.Name,
            ["rows"] = at.Length,
            ["first_column"] = inspection.Table.FirstColumn,
            [$"from_{position}"] = at[0],
            [$"to_{position}"] = at[^1],
            [$"step_{position}"] = inspection.StepAt,
            ["columns"] = inspection.Columns.Select(column => Column(column, position)).ToArray(),
            ["warnings"] = inspection.Warnings,
        };
        return JsonSerializer.Serialize(document, Indented) + "\n";
    }

    private static Dictionary<string, object?> Column(ColumnInspection column, string position) => new(StringComparer.Ordinal)
    {
        ["name"] = column.Name,
        ["kind"] = column.Kind.Words,
        ["unit"] = column.Kind.Unit,
        ["interpolation"] = column.Interpolation,
        [$"peak_{position}"] = column.Figures.PeakAt,
        ["peak"] = column.Figures.Peak,
        ["smallest"] = column.Figures.Smallest,
        [$"fwhm_{position}"] = column.Figures.FullWidth,
        [$"centroid_{position}"] = column.Figures.Centroid,
        ["integral"] = column.Figures.Integral,
        ["hemisphere_mean"] = column.HemisphereMean,
        ["first_exciton_candidates"] = column.Excitons.Select(e => new { wavelength_nm = e.AtNm, shoulder = e.IsShoulder }).ToArray(),
        ["half_peak_edges"] = column.Edges.Select(e => new { wavelength_nm = e.At, rising = e.Rising }).ToArray(),
        ["colour"] = column.Colour is { } c ? Colour(c) : null,
    };

    private static Dictionary<string, object?> Colour(LightColour colour) => new(StringComparer.Ordinal)
    {
        ["observer"] = colour.Observer,
        ["X_per_watt"] = colour.Tristimulus.X,
        ["Y_per_watt"] = colour.Tristimulus.Y,
        ["Z_per_watt"] = colour.Tristimulus.Z,
        ["x"] = colour.Chromaticity.X,
        ["y"] = colour.Chromaticity.Y,
        ["u_prime"] = colour.Chromaticity.UPrime,
        ["v_prime"] = colour.Chromaticity.VPrime,
        ["cct_k"] = colour.CctKelvin,
        ["duv"] = colour.Duv,
        ["dominant_nm"] = colour.Dominant is { IsComplementary: false } d ? d.WavelengthNm : (double?)null,
        ["complementary_nm"] = colour.Dominant is { IsComplementary: true } p ? p.WavelengthNm : (double?)null,
        ["excitation_purity"] = colour.Dominant?.ExcitationPurityShare,
        ["luminous_efficacy_lm_per_w"] = colour.Tristimulus.Y,
    };
}
