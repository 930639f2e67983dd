using System.Text.Json;
using Colorimetry;
using FilmDesign;
using FilmOptics;

namespace FilmReports;

/// <summary>The JSON document of a film, schema dotcoat/1. README.md explains each key.</summary>
/// <remarks>
/// Shares are per source photon or source power, in 0…1; spectra per source watt and per source photon. What is not known or not
/// defined is null, never 0 or NaN. The same film gives the same bytes.
/// </remarks>
public static class ReportJson
{
    /// <summary>The document of simulate.</summary>
    /// <param name="filmCase">The film.</param>
    /// <param name="appraisal">Its figures.</param>
    public static string Simulate(FilmCase filmCase, FilmAppraisal appraisal)
    {
        ArgumentNullException.ThrowIfNull(filmCase);
        ArgumentNullException.ThrowIfNull(appraisal);
        return JsonDocumentText.Of(json => WriteFilm(json, filmCase, appraisal));
    }

    /// <summary>The document of formulate: that of its film, and the solution.</summary>
    /// <param name="formulation">The solved, or nearest, film.</param>
    public static string Formulate(Formulation formulation)
    {
        ArgumentNullException.ThrowIfNull(formulation);
        return JsonDocumentText.Of(json =>
        {
            WriteFilm(json, formulation.FilmCase, formulation.Appraisal);
            Solution(json, formulation);
        });
    }

    private static void WriteFilm(Utf8JsonWriter json, FilmCase filmCase, FilmAppraisal appraisal)
    {
        json.WriteString("schema", "dotcoat/1");
        json.WriteString("title", filmCase.Film.Title);
        json.WriteString("model", appraisal.Output.Model);
        json.WriteStartObject("film");
        White(json, appraisal.FilmWhite);
        json.Number("lumens_per_source_watt", appraisal.FilmLumensPerSourceWatt);
        json.WriteEndObject();
        Panel(json, appraisal.Panel);
        Gamut(json, appraisal.Gamut);
        Photons(json, "photons", filmCase.Film, appraisal.Output.Budget, appraisal.Output.Budget.Sum);
        Bands(json, appraisal.Bands);
        Layers(json, appraisal.Layers);
        Efficiency(json, appraisal.Efficiency);
        Spectrum(json, appraisal);
        if (appraisal.Output.Accuracy is { } accuracy)
            Accuracy(json, accuracy);
        if (appraisal.Output.Tracing is { } tracing) // the lines are not independent: their sum has no standard error of its own
            Photons(json, "standard_error", filmCase.Film, tracing.StandardError, sum: null);
        if (appraisal.Output.Angles is { } angles)
            Angles(json, filmCase, angles);
        if (appraisal.Haze is { } haze)
            Haze(json, haze);
        if (appraisal is { Zone: { } zone, Spread: { } spread })
            Zone(json, zone, spread);
        if (appraisal.Edge is { } edge)
            Edge(json, edge);
        json.Sentences("warnings", appraisal.Warnings);
    }

    private static void Solution(Utf8JsonWriter json, Formulation formulation)
    {
        json.WriteStartObject("solution");
        json.WriteStartObject("loadings_mg_per_ml");
        foreach (var lot in formulation.Loadings.GroupBy(l => l.LotName, StringComparer.Ordinal))
        {
            foreach (var loading in lot)
                json.Number(lot.Count() == 1 ? lot.Key : $"{lot.Key} @ {loading.LayerName}", loading.LoadingMgPerMl);
        }

        json.WriteEndObject();
        json.WriteBoolean("reached", formulation.Reached);
        json.Number("white_error_xy", formulation.WhiteErrorXy);
        json.WriteString("limit", formulation.Limit);
        json.WriteNumber("solves", formulation.Solves);
        json.WriteEndObject();
    }

    private static void Panel(Utf8JsonWriter json, PanelColours? panel)
    {
        if (panel is null)
        {
            json.WriteNull("panel");
            return;
        }

        json.WriteStartObject("panel");
        White(json, panel.White);
        Colour(json, "red", panel.Red);
        Colour(json, "green", panel.Green);
        Colour(json, "blue", panel.Blue);
        json.Number("lumens_per_source_watt", panel.LumensPerSourceWatt);
        json.WriteEndObject();
    }

    private static void Gamut(Utf8JsonWriter json, IReadOnlyList<GamutComparison>? gamut)
    {
        if (gamut is null)
        {
            json.WriteNull("gamut");
            return;
        }

        json.WriteStartArray("gamut");
        foreach (var standard in gamut)
        {
            json.WriteStartObject();
            json.WriteString("name", standard.Name);
            json.Number("coverage_xy", standard.CoverageXy);
            json.Number("coverage_uv", standard.CoverageUv);
            json.Number("area_ratio_xy", standard.AreaRatioXy);
            json.Number("area_ratio_uv", standard.AreaRatioUv);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private static void Photons(Utf8JsonWriter json, string key, Film film, PhotonBudget budget, double? sum)
    {
        json.WriteStartObject(key);
        json.Number("unconverted", budget.Unconverted);
        json.Number("converted", budget.Converted);
        json.Number("lost_below", budget.LostBelow);
        json.Number("lost_above", budget.LostAbove);
        json.Number("lost_in_host", budget.LostInHost);
        json.Number("lost_at_edges", budget.LostAtEdges);
        ByLot(json, "lost_in_lots", film, budget.LostInLots);
        ByLot(json, "source_absorbed_by", film, budget.SourceAbsorbedBy);
        ByLot(json, "excitations", film, budget.Excitations);
        json.Number("sum", sum);
        json.WriteEndObject();
    }

    private static void ByLot(Utf8JsonWriter json, string key, Film film, IReadOnlyList<double> values)
    {
        json.WriteStartObject(key);
        for (int i = 0; i < film.Lots.Count; i++)
            json.Number(film.Lots[i].Name, values[i]);
        json.WriteEndObject();
    }

    private static void Bands(Utf8JsonWriter json, IReadOnlyList<EmissionBand> bands)
    {
        json.WriteStartArray("bands");
        foreach (var band in bands)
        {
            json.WriteStartObject();
            json.WriteString("name", band.Name);
            json.Number("photons", band.Photons);
            json.Number("peak_nm", band.PeakNm);
            json.Number("fwhm_nm", band.FwhmNm);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private static void Layers(Utf8JsonWriter json, IReadOnlyList<LayerFigures> layers)
    {
        json.WriteStartArray("layers");
        foreach (var layer in layers)
        {
            json.WriteStartObject();
            json.WriteString("name", layer.Name);
            json.Number("thickness_um", layer.ThicknessUm);
            json.Number("coat_weight_g_per_m2", layer.CoatWeightGPerM2);
            json.Number("optical_density", layer.OpticalDensity);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private static void Efficiency(Utf8JsonWriter json, FilmEfficiency efficiency)
    {
        json.WriteStartObject("efficiency");
        json.Number("blue_leakage_photons", efficiency.BlueLeakagePhotonShare);
        json.Number("blue_leakage_power", efficiency.BlueLeakagePowerShare);
        json.Number("external_photon", efficiency.ExternalPhotonShare);
        json.Number("down_conversion", efficiency.DownConversionShare);
        json.Number("energy", efficiency.EnergyShare);
        json.WriteEndObject();
    }

    private static void Spectrum(Utf8JsonWriter json, FilmAppraisal appraisal)
    {
        json.WriteStartObject("spectrum");
        json.WriteStartArray("wavelength_nm");
        for (int i = 0; i < WavelengthGrid.Count; i++)
            json.WriteNumberValue(WavelengthGrid.NmAt(i));
        json.WriteEndArray();
        Samples(json, "power_per_nm", appraisal.Power.Samples);
        Samples(json, "photons_per_nm", appraisal.Output.Total.Samples);
        json.WriteEndObject();
    }

    private static void Samples(Utf8JsonWriter json, string key, ReadOnlySpan<double> samples)
    {
        json.WriteStartArray(key);
        foreach (double sample in samples)
            json.WriteNumberValue(sample);
        json.WriteEndArray();
    }

    private static void Accuracy(Utf8JsonWriter json, SolverAccuracy accuracy)
    {
        json.WriteStartObject("accuracy");
        json.Number("asked", accuracy.AskedShare);
        json.Number("estimate", accuracy.EstimateShare);
        json.WriteNumber("ordinates", accuracy.Ordinates);
        json.WriteNumber("cells", accuracy.Cells);
        json.WriteNumber("wavelength_bins", accuracy.WavelengthBins);
        json.WriteEndObject();
    }

    private static void Angles(Utf8JsonWriter json, FilmCase filmCase, AngularOutput angles)
    {
        var colours = AngularColour.Of(angles, filmCase.Observer);
        json.WriteStartObject("angles");
        List(json, "angle_deg", colours.Select(c => (double?)c.AngleDeg));
        List(json, "luminance", colours.Select(c => (double?)c.RelativeLuminance));
        List(json, "u_prime", colours.Select(c => c.Chromaticity?.UPrime));
        List(json, "v_prime", colours.Select(c => c.Chromaticity?.VPrime));
        json.WriteEndObject();
    }

    private static void Haze(Utf8JsonWriter json, HazeReading haze)
    {
        json.WriteStartObject("haze");
        json.WriteNumber("wavelength_nm", haze.WavelengthNm);
        json.Number("total_transmittance", haze.TotalTransmittanceShare);
        json.Number("haze", haze.HazeShare);
        json.Number("total_transmittance_error", haze.TotalTransmittanceErrorShare);
        json.Number("haze_error", haze.HazeErrorShare);
        json.WriteEndObject();
    }

    private static void Zone(Utf8JsonWriter json, ZoneProfile zone, IReadOnlyList<ColourSpread> spread)
    {
        json.WriteStartArray("spread");
        foreach (var colour in spread)
        {
            json.WriteStartObject();
            json.WriteString("name", colour.Name);
            json.Number("photons", colour.Photons);
            json.Number("radius_50_mm", colour.Radius50Mm);
            json.Number("radius_90_mm", colour.Radius90Mm);
            json.WriteEndObject();
        }

        json.WriteEndArray();
        json.WriteStartObject("zone");
        List(json, "distance_mm", zone.Points.Select(p => (double?)p.DistanceMm));
        List(json, "luminance", zone.Points.Select(p => (double?)p.LuminanceShare));
        List(json, "luminance_error", zone.Points.Select(p => (double?)p.LuminanceErrorShare));
        List(json, "u_prime", zone.Points.Select(p => p.Chromaticity?.UPrime));
        List(json, "v_prime", zone.Points.Select(p => p.Chromaticity?.VPrime));
        json.WriteEndObject();
    }

    private static void Edge(Utf8JsonWriter json, SheetEdge edge)
    {
        json.WriteStartObject("edge_loss");
        json.Number("width_mm", edge.LostWidthMm);
        json.Number("width_error_mm", edge.LostWidthErrorMm);
        json.WriteEndObject();
        json.WriteStartObject("edge");
        List(json, "distance_mm", edge.Bands.Select(band => (double?)band.DistanceMm));
        List(json, "photons", edge.Bands.Select(band => (double?)band.Photons));
        List(json, "photons_error", edge.Bands.Select(band => (double?)band.PhotonsError));
        List(json, "u_prime", edge.Bands.Select(band => band.Chromaticity?.UPrime));
        List(json, "v_prime", edge.Bands.Select(band => band.Chromaticity?.VPrime));
        json.WriteEndObject();
    }

    private static void List(Utf8JsonWriter json, string key, IEnumerable<double?> values)
    {
        json.WriteStartArray(key);
        foreach (double? value in values)
        {
            if (value is { } number)
                json.WriteNumberValue(number);
            else
                json.WriteNullValue();
        }

        json.WriteEndArray();
    }

    private static void White(Utf8JsonWriter json, WhitePoint white)
    {
        json.WriteStartObject("white");
        json.Number("x", white.Chromaticity.X);
        json.Number("y", white.Chromaticity.Y);
        json.Number("u_prime", white.Chromaticity.UPrime);
        json.Number("v_prime", white.Chromaticity.VPrime);
        json.Number("cct_k", white.CctKelvin);
        json.Number("duv", white.Duv);
        json.WriteEndObject();
    }

    private static void Colour(Utf8JsonWriter json, string key, Chromaticity colour)
    {
        json.WriteStartObject(key);
        json.Number("x", colour.X);
        json.Number("y", colour.Y);
        json.WriteEndObject();
    }
}
