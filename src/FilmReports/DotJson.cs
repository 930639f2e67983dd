using System.Text.Json;
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
            Number(json, "extinction_350_nm_per_m_per_cm", dot.Extinction350PerMPerCm);
            Number(json, "spread_fwhm_mev", dot.SpreadFwhmMev);
            Number(json, "total_fwhm_mev", dot.TotalFwhmMev);
            Number(json, "total_fwhm_nm", dot.TotalFwhmNm);
            Number(json, "heat_shift_nm", dot.HeatShiftNm);
            Sentences(json, "sources", dot.Sources);
            Sentences(json, "warnings", dot.Warnings);
        });
    }

    private static void Number(Utf8JsonWriter json, string key, double? value)
    {
        if (value is { } number)
            json.WriteNumber(key, number);
        else
            json.WriteNull(key);
    }

    private static void Sentences(Utf8JsonWriter json, string key, IReadOnlyList<string> sentences)
    {
        json.WriteStartArray(key);
        foreach (string sentence in sentences)
            json.WriteStringValue(sentence);
        json.WriteEndArray();
    }
}
