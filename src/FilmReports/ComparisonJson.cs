using System.Text.Json;
using FilmDesign;
using FilmOptics;

namespace FilmReports;

/// <summary>The JSON document of compare, schema dotcoat/1.</summary>
public static class ComparisonJson
{
    /// <summary>The document.</summary>
    public static string Write(FilmCase filmCase, ModelComparison comparison)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(comparison);
        return JsonDocumentText.Of(json =>
        {
            json.WriteString("schema", "dotcoat/1");
            json.WriteString("title", filmCase.Film.Title);
            Models(json, filmCase, comparison);
            Differences(json, comparison);
            Features(json, comparison);
            json.WriteStartObject("suggested_beer_lambert");
            json.Number("pump_path", comparison.SuggestedPaths.PumpPathFactor);
            json.Number("emission_path", comparison.SuggestedPaths.EmissionPathFactor);
            json.Number("white_error_uv", comparison.SuggestedWhiteErrorUv);
            json.WriteEndObject();
            json.Sentences("warnings", comparison.Models.SelectMany(m => m.Warnings).Distinct(StringComparer.Ordinal));
        });
    }

    private static void Models(Utf8JsonWriter json, FilmCase filmCase, ModelComparison comparison)
    {
        json.WriteStartArray("models");
        foreach (var model in comparison.Models)
        {
            var (white, budget) = (ModelComparison.JudgedWhite(filmCase, model), model.Output.Budget);
            json.WriteStartObject();
            json.WriteString("model", model.Output.Model);
            json.WriteNumber("x", white.X);
            json.WriteNumber("y", white.Y);
            json.WriteNumber("u_prime", white.UPrime);
            json.WriteNumber("v_prime", white.VPrime);
            json.WriteNumber("unconverted", budget.Unconverted);
            json.WriteNumber("converted", budget.Converted);
            json.WriteNumber("lost_below", budget.LostBelow);
            json.WriteNumber("lost_above", budget.LostAbove);
            json.WriteNumber("lost_in_host", budget.LostInHost);
            json.WriteNumber("lost_at_edges", budget.LostAtEdges);
            json.WriteNumber("lost_in_lots", budget.LostInLots.Sum());
            json.WriteNumber("lumens_per_source_watt", model.FilmLumensPerSourceWatt);
            json.WriteNumber("energy", model.Efficiency.EnergyShare);
            json.Number("stated_error", model.Output.Accuracy?.EstimateShare);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private static void Differences(Utf8JsonWriter json, ModelComparison comparison)
    {
        json.WriteStartArray("differences");
        foreach (var difference in comparison.Differences)
        {
            json.WriteStartObject();
            json.WriteString("model", difference.Model);
            json.WriteString("quantity", difference.Quantity);
            json.WriteNumber("reference", difference.ReferenceValue);
            json.WriteNumber("value", difference.Value);
            json.WriteNumber("difference", difference.Difference);
            json.Number("stated_error", difference.StatedErrorShare);
            if (difference.IsExplained is { } explained)
                json.WriteBoolean("explained", explained);
            else
                json.WriteNull("explained");
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private static void Features(Utf8JsonWriter json, ModelComparison comparison)
    {
        json.WriteStartArray("without");
        foreach (var feature in comparison.Features)
        {
            json.WriteStartObject();
            json.WriteString("feature", feature.Feature);
            json.WriteNumber("unconverted", feature.Unconverted);
            json.WriteNumber("converted", feature.Converted);
            json.WriteNumber("x", feature.White.X);
            json.WriteNumber("y", feature.White.Y);
            json.WriteNumber("white_shift_uv", feature.WhiteShiftUv);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }
}
