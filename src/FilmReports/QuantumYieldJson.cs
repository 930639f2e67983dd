using FilmDesign;
using FilmOptics;

namespace FilmReports;

/// <summary>The JSON document of quantum-yield, schema dotcoat/1.</summary>
public static class QuantumYieldJson
{
    /// <summary>The document.</summary>
    /// <param name="measurement">The scans.</param>
    /// <param name="yield">What they give.</param>
    /// <param name="fit">The yield in film; null where the sample is no film.</param>
    public static string Write(SphereMeasurement measurement, SphereYield yield, FilmYieldFit? fit)
    {
        ArgumentNullException.ThrowIfNull(measurement);
        ArgumentNullException.ThrowIfNull(yield);
        return JsonDocumentText.Of(json =>
        {
            json.WriteString("schema", "dotcoat/1");
            json.WriteString("title", $"quantum yield of {measurement.InBeam.Name}");
            json.WriteString("method", yield.Method);
            json.WriteStartObject("windows_nm");
            json.WriteNumber("pump_low", measurement.Pump.LowNm);
            json.WriteNumber("pump_high", measurement.Pump.HighNm);
            json.WriteNumber("emission_low", measurement.Emission.LowNm);
            json.WriteNumber("emission_high", measurement.Emission.HighNm);
            json.WriteEndObject();
            json.WriteStartObject(fit is null ? "quantum_yield" : "external_yield");
            json.WriteNumber("observed", yield.YieldShare);
            json.WriteNumber("standard_uncertainty", yield.YieldUncertaintyShare);
            json.WriteNumber("absorptance", yield.AbsorptanceShare);
            json.WriteNumber("absorptance_standard_uncertainty", yield.AbsorptanceUncertaintyShare);
            json.WriteEndObject();
            if (yield.SelfAbsorption is { } self)
            {
                json.WriteStartObject("self_absorption");
                json.WriteNumber("reabsorbed", self.ReabsorbedShare);
                json.WriteNumber("tail_from_nm", self.TailFromNm);
                json.WriteNumber("quantum_yield", self.YieldShare);
                json.WriteNumber("standard_uncertainty", self.YieldUncertaintyShare);
                json.WriteEndObject();
            }

            if (fit is not null)
            {
                json.WriteStartObject("film");
                json.WriteString("lot", fit.LotName);
                json.WriteNumber("film_yield_factor", fit.FilmYieldFactor);
                json.WriteNumber("standard_uncertainty", fit.UncertaintyFactor);
                json.WriteNumber("quantum_yield_in_film", fit.FilmYieldShare);
                json.WriteNumber("absorptance_computed", fit.AbsorptanceShare);
                json.WriteString("model", fit.Model);
                json.WriteEndObject();
            }

            json.Sentences("warnings", yield.Warnings);
        });
    }
}
