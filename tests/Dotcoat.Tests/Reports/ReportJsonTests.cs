using System.Text.Json;
using System.Text.Json.Nodes;
using FilmDesign;
using FilmOptics;
using FilmReports;

namespace Dotcoat.Tests.Reports;

public sealed class ReportJsonTests
{
    // The document of the README, key by key in its order. {} stands for one number per lot, [] for a list of numbers.
    private const string Contract = """
        {
          "schema": "", "title": "", "model": "",
          "film": {"white": {"x": 0, "y": 0, "u_prime": 0, "v_prime": 0, "cct_k": 0, "duv": 0}, "lumens_per_source_watt": 0},
          "panel": {
            "white": {"x": 0, "y": 0, "u_prime": 0, "v_prime": 0, "cct_k": 0, "duv": 0},
            "red": {"x": 0, "y": 0}, "green": {"x": 0, "y": 0}, "blue": {"x": 0, "y": 0},
            "lumens_per_source_watt": 0
          },
          "gamut": [{"name": "", "coverage_xy": 0, "coverage_uv": 0, "area_ratio_xy": 0, "area_ratio_uv": 0}],
          "photons": {
            "unconverted": 0, "converted": 0, "lost_below": 0, "lost_above": 0, "lost_in_host": 0, "lost_at_edges": 0,
            "lost_in_lots": {}, "source_absorbed_by": {}, "excitations": {}, "sum": 0
          },
          "bands": [{"name": "", "photons": 0, "peak_nm": 0, "fwhm_nm": 0}],
          "layers": [{"name": "", "thickness_um": 0, "coat_weight_g_per_m2": 0, "optical_density": 0}],
          "efficiency": {"blue_leakage_photons": 0, "blue_leakage_power": 0, "external_photon": 0, "down_conversion": 0, "energy": 0},
          "spectrum": {"wavelength_nm": [], "power_per_nm": [], "photons_per_nm": []},
          "warnings": [""]
        }
        """;

    // What some models and options add.
    private static readonly string[] Additions = ["accuracy", "standard_error", "angles", "haze"];

    [Theory]
    [InlineData("desk-monitor")]
    [InlineData("living-room-tv")]
    [InlineData("six lots")]
    public void Simulate_HasEveryKeyOfTheContractInItsOrder(string film)
    {
        var (filmCase, appraisal) = ReportFilms.Named(film);
        var document = JsonNode.Parse(ReportJson.Simulate(filmCase, appraisal))!;
        Walk(JsonNode.Parse(Contract)!, document, filmCase.Film, "$");
        Assert.Equal("dotcoat/1", (string)document["schema"]!);
        Assert.Equal(1, (double)document["photons"]!["sum"]!, 1e-9);
    }

    [Fact]
    public void Simulate_NumbersRoundTrip()
    {
        var (filmCase, appraisal) = ReportFilms.Named("desk-monitor");
        var document = JsonNode.Parse(ReportJson.Simulate(filmCase, appraisal))!;
        Assert.Equal(appraisal.Panel!.White.Chromaticity.X, (double)document["panel"]!["white"]!["x"]!);
        Assert.Equal(appraisal.Output.Budget.LostInLots[1], (double)document["photons"]!["lost_in_lots"]!["red K23"]!);
        Assert.Equal(appraisal.Power.Samples[100], (double)document["spectrum"]!["power_per_nm"]![100]!);
        Assert.Equal(appraisal.Power.Integral, document["spectrum"]!["power_per_nm"]!.AsArray().Sum(n => (double)n!), 1e-12);
        Assert.Equal(appraisal.Efficiency.EnergyShare, (double)document["efficiency"]!["energy"]!);
    }

    [Fact]
    public void Simulate_WhatIsNotKnown_IsNull()
    {
        var (filmCase, appraisal) = ReportFilms.Named("no panel");
        var document = JsonNode.Parse(ReportJson.Simulate(filmCase, appraisal))!.AsObject();
        Assert.True(document.ContainsKey("panel") && document["panel"] is null);
        Assert.True(document.ContainsKey("gamut") && document["gamut"] is null);
        var (bare, dark) = ReportFilms.Named("no dots");
        document = JsonNode.Parse(ReportJson.Simulate(bare, dark))!.AsObject();
        // Nothing converts: no share to divide by, no peak of a band without light, no CCT of blue light.
        Assert.Null(document["efficiency"]!["down_conversion"]);
        Assert.Null(document["bands"]![1]!["peak_nm"]);
        Assert.Null(document["film"]!["white"]!["cct_k"]);
    }

    [Fact]
    public void Simulate_OfANumberThatIsNone_IsRefused()
    {
        var (filmCase, appraisal) = ReportFilms.Named("desk-monitor");
        Assert.ThrowsAny<Exception>(() => ReportJson.Simulate(filmCase, appraisal with { FilmLumensPerSourceWatt = double.NaN }));
    }

    [Fact]
    public void Formulate_AddsTheSolution()
    {
        var formulation = LoadingSolver.Formulate(ReportFilms.Demo("desk-monitor"), new BeerLambertModel(), TestContext.Current.CancellationToken);
        var document = JsonNode.Parse(ReportJson.Formulate(formulation))!.AsObject();
        var solution = document["solution"]!.AsObject();
        document.Remove("solution");
        Walk(JsonNode.Parse(Contract)!, document, formulation.FilmCase.Film, "$");
        Assert.Equal((string[])["loadings_mg_per_ml", "reached", "white_error_xy", "limit", "solves"], solution.Select(p => p.Key).ToArray());
        Assert.Equal((string[])["green K07", "red K23"], solution["loadings_mg_per_ml"]!.AsObject().Select(p => p.Key).ToArray());
        Assert.True((bool)solution["reached"]!);
        Assert.True(solution.ContainsKey("limit") && solution["limit"] is null);
    }

    [Fact]
    public void Formulate_OfALotInTwoLayers_NamesBoth()
    {
        var formulation = LoadingSolver.Formulate(ReportFilms.Demo("desk-monitor"), new BeerLambertModel(), TestContext.Current.CancellationToken);
        var twice = formulation with { Loadings = [new("green K07", "lower", 3), new("green K07", "upper", 6), new("red K23", "lower", 1)] };
        Assert.Equal(
            (string[])["green K07 @ lower", "green K07 @ upper", "red K23"],
            JsonNode.Parse(ReportJson.Formulate(twice))!["solution"]!["loadings_mg_per_ml"]!.AsObject().Select(p => p.Key).ToArray());
    }

    [Fact]
    public void Simulate_OfATracedFilm_HasStandardErrorsInTheShapeOfPhotons()
    {
        var (filmCase, appraisal) = ReportFilms.Named("traced");
        var document = JsonNode.Parse(ReportJson.Simulate(filmCase, appraisal))!;
        Assert.Equal(document["photons"]!.AsObject().Select(p => p.Key).ToArray(), document["standard_error"]!.AsObject().Select(p => p.Key).ToArray());
        Assert.InRange((double)document["standard_error"]!["converted"]!, 1e-4, 1e-1);
    }

    [Fact]
    public void Simulate_OfASolverWithAnAccuracy_StatesIt()
    {
        var (filmCase, appraisal) = ReportFilms.Named("desk-monitor");
        var solved = appraisal with { Output = appraisal.Output with { Accuracy = new SolverAccuracy(1e-4, 3e-5, 16, 12, 471) } };
        var accuracy = JsonNode.Parse(ReportJson.Simulate(filmCase, solved))!["accuracy"]!.AsObject();
        Assert.Equal((string[])["asked", "estimate", "ordinates", "cells", "wavelength_bins"], accuracy.Select(p => p.Key).ToArray());
        Assert.Equal(3e-5, (double)accuracy["estimate"]!);
    }

    private static void Walk(JsonNode expected, JsonNode? found, Film film, string path)
    {
        switch (expected)
        {
            case JsonObject { Count: 0 }:
                Assert.Equal(film.Lots.Select(lot => lot.Name).ToArray(), found!.AsObject().Select(p => p.Key).ToArray());
                Assert.All(found.AsObject(), p => AssertNumber(p.Value, $"{path}.{p.Key}"));
                break;
            case JsonObject keys:
                Assert.Equal(keys.Select(p => p.Key).ToArray(), found!.AsObject().Select(p => p.Key).Where(key => path != "$" || !Additions.Contains(key, StringComparer.Ordinal)).ToArray());
                foreach (var (key, value) in keys)
                    Walk(value!, found[key], film, $"{path}.{key}");
                break;
            case JsonArray { Count: 0 }:
                Assert.Equal(471, found!.AsArray().Count);
                Assert.All(found.AsArray(), n => AssertNumber(n, path));
                break;
            case JsonArray list when list[0] is JsonObject:
                Assert.NotEmpty(found!.AsArray());
                Assert.All(found.AsArray(), n => Walk(list[0]!, n, film, path));
                break;
            case JsonArray:
                Assert.All(found!.AsArray(), n => Assert.Equal(JsonValueKind.String, n!.GetValueKind()));
                break;
            case JsonValue text when text.GetValueKind() == JsonValueKind.String:
                Assert.Equal(JsonValueKind.String, found!.GetValueKind());
                break;
            default:
                if (found is not null) // not known
                    AssertNumber(found, path);
                break;
        }
    }

    private static void AssertNumber(JsonNode? node, string path) => Assert.True(node?.GetValueKind() == JsonValueKind.Number, path);
}
