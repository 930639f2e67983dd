using FilmOptics;

namespace FilmReports;

/// <summary>The JSON document of scatter-from-haze, schema dotcoat/1.</summary>
public static class ScatterJson
{
    /// <summary>The document.</summary>
    public static string Write(HazeMeasurement measurement, ScatterEstimate estimate)
    {
        ArgumentNullException.ThrowIfNull(measurement);
        ArgumentNullException.ThrowIfNull(estimate);
        return JsonDocumentText.Of(json =>
        {
            json.WriteString("schema", "dotcoat/1");
            json.WriteString("title", "scattering from haze");
            json.WriteNumber("scattering_per_mm", estimate.ScatteringPerMm);
            json.WriteNumber("anisotropy", estimate.MeanCosine);
            json.WriteNumber("scattering_error_per_mm", estimate.ScatteringErrorPerMm);
            json.WriteNumber("anisotropy_error", estimate.MeanCosineError);
            json.WriteStartObject("measured");
            json.WriteNumber("total_transmittance", measurement.TotalTransmittanceShare);
            json.WriteNumber("haze", measurement.HazeShare);
            json.WriteNumber("thickness_um", measurement.ThicknessMm * 1000);
            json.WriteEndObject();
            json.WriteStartObject("found");
            json.WriteNumber("total_transmittance", estimate.Reading.TotalTransmittanceShare);
            json.WriteNumber("haze", estimate.Reading.HazeShare);
            json.WriteEndObject();
            json.Sentences("warnings", estimate.Warnings);
        });
    }
}
