using FilmOptics;

namespace FilmReports;

/// <summary>The JSON document of dot, schema dotcoat/1.</summary>
public static class DotJson
{
    /// <summary>The document.</summary>
    public static string Write(DotEstimate dot)
    {
        ArgumentNullException.ThrowIfNull(dot);
        return JsonDocumentText.Of(json =>
        {
            json.WriteString("schema", "dotcoat/1");
            json.WriteString("title", $"dot of {dot.Material.Name}");
            json.WriteStartObject("material");
            json.WriteString("name", dot.Material.Name);
            json.WriteNumber("gap_ev", dot.Material.GapEv);
            json.WriteNumber("electron_mass", dot.Material.ElectronMassFactor);
            json.WriteNumber("hole_mass", dot.Material.HoleMassFactor);
            json.WriteNumber("permittivity", dot.Material.PermittivityFactor);
            json.WriteNumber("bohr_radius_nm", dot.Material.BohrRadiusNm);
            json.WriteEndObject();
            json.WriteStartArray("sizing_curves");
            foreach (var curve in dot.Curves)
            {
                json.WriteStartObject();
                json.WriteString("name", curve.Name);
                json.WriteNumber("diameter_nm", curve.DiameterNm);
                json.WriteNumber("peak_nm", curve.PeakNm);
                json.WriteNumber("extinction_per_m_per_cm", curve.ExtinctionPerMPerCm);
                json.WriteEndObject();
            }

            json.WriteEndArray();
            json.WriteStartArray("models");
            foreach (var model in dot.Models)
            {
                json.WriteStartObject();
                json.WriteString("name", model.Name);
                json.WriteNumber("diameter_nm", model.DiameterNm);
                json.WriteNumber("band_edge_ev", model.BandEdgeEv);
                json.WriteNumber("peak_nm", EffectiveMass.PhotonEvNm / model.BandEdgeEv);
                json.WriteEndObject();
            }

            json.WriteEndArray();
            json.Number("extinction_350_nm_per_m_per_cm", dot.Extinction350PerMPerCm);
            json.Number("spread_fwhm_mev", dot.SpreadFwhmMev);
            json.Number("total_fwhm_mev", dot.TotalFwhmMev);
            json.Number("total_fwhm_nm", dot.TotalFwhmNm);
            json.Number("heat_shift_nm", dot.HeatShiftNm);
            json.Sentences("sources", dot.Sources);
            json.Sentences("warnings", dot.Warnings);
        });
    }
}
