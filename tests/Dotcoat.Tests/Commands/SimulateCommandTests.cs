using System.Text.Json.Nodes;

namespace Dotcoat.Tests.Commands;

public sealed class SimulateCommandTests
{
    private const string Monitor = "spectra/demo/desk-monitor.film.yaml";

    [Theory]
    [InlineData("desk-monitor")]
    [InlineData("living-room-tv")]
    public void Text_IsPlainWithTheAnswerFirstAndCautionsLast(string name)
    {
        using var workshop = Workshop.WithDemo();
        string text = workshop.Run("simulate", $"spectra/demo/{name}.film.yaml").AssertDone().AssertPlain().Output;
        Assert.StartsWith("Panel white x 0.31", text, StringComparison.Ordinal);
        int[] order = [.. new[] { "panel white", "where each source photon goes", "efficiency", "light above", "panel against", "Cautions" }
            .Select(heading => text.IndexOf(heading, 20, StringComparison.Ordinal))];
        Assert.DoesNotContain(-1, order);
        Assert.Equal(order.Order(), order);
    }

    [Fact]
    public void Json_IsOneDocumentOfTheContractsShape()
    {
        using var workshop = Workshop.WithDemo();
        var document = JsonNode.Parse(workshop.Run("simulate", Monitor, "--json").AssertDone().Output)!.AsObject();
        string[] keys = ["schema", "title", "model", "film", "panel", "gamut", "photons", "bands", "layers", "efficiency", "spectrum", "warnings"];
        Assert.Empty(keys.Except(document.Select(p => p.Key), StringComparer.Ordinal));
        Assert.Equal("dotcoat/1", (string)document["schema"]!);
        AssertKeys(document["film"]!, "white", "lumens_per_source_watt");
        AssertKeys(document["film"]!["white"]!, "x", "y", "u_prime", "v_prime", "cct_k", "duv");
        AssertKeys(document["panel"]!, "white", "red", "green", "blue", "lumens_per_source_watt");
        AssertKeys(document["gamut"]![0]!, "name", "coverage_xy", "coverage_uv", "area_ratio_xy", "area_ratio_uv");
        AssertKeys(document["photons"]!, "unconverted", "converted", "lost_below", "lost_above", "lost_in_host", "lost_at_edges", "lost_in_lots", "source_absorbed_by", "excitations", "sum");
        AssertKeys(document["photons"]!["lost_in_lots"]!, "green K07", "red K23");
        AssertKeys(document["bands"]![0]!, "name", "photons", "peak_nm", "fwhm_nm");
        AssertKeys(document["layers"]![0]!, "name", "thickness_um", "coat_weight_g_per_m2", "optical_density");
        AssertKeys(document["efficiency"]!, "blue_leakage_photons", "blue_leakage_power", "external_photon", "down_conversion", "energy");
        AssertKeys(document["spectrum"]!, "wavelength_nm", "power_per_nm", "photons_per_nm");
        Assert.Equal(471, document["spectrum"]!["wavelength_nm"]!.AsArray().Count);
        Assert.Equal(1, (double)document["photons"]!["sum"]!, 1e-9);
    }

    [Fact]
    public void Json_WithoutPanel_HasNullsThere()
    {
        using var workshop = Workshop.WithDemo();
        string text = workshop.Read(Monitor);
        workshop.Write("spectra/demo/bare.film.yaml", text[..text.IndexOf("\npanel:", StringComparison.Ordinal)] + "\n");
        var document = JsonNode.Parse(workshop.Run("simulate", "spectra/demo/bare.film.yaml", "--json").AssertDone().Output)!.AsObject();
        Assert.True(document.ContainsKey("panel") && document["panel"] is null);
        Assert.True(document.ContainsKey("gamut") && document["gamut"] is null);
        Assert.StartsWith("Film white", workshop.Run("simulate", "spectra/demo/bare.film.yaml").AssertDone().AssertPlain().Output, StringComparison.Ordinal);
    }

    [Fact]
    public void Set_OverridesByIndexAndByName()
    {
        using var workshop = Workshop.WithDemo();
        var plain = Photons(workshop);
        var thick = Photons(workshop, "--set", "layers[0].thickness_um=180");
        Assert.True((double)thick["unconverted"]! < 0.8 * (double)plain["unconverted"]!);
        var dim = Photons(workshop, "--set", "lots[green K07].quantum_yield=0.5", "--set", "title=Dim");
        Assert.True((double)dim["lost_in_lots"]!["green K07"]! > 2 * (double)plain["lost_in_lots"]!["green K07"]!);
        Assert.Equal((double)plain["unconverted"]!, (double)dim["unconverted"]!, 1e-12);
    }

    [Fact]
    public void Set_WithAKeyThatIsNone_IsRefused()
    {
        using var workshop = Workshop.WithDemo();
        Assert.Contains("thickness_mu", workshop.Run("simulate", Monitor, "--set", "layers[0].thickness_mu=80").AssertRefused().Error, StringComparison.Ordinal);
    }

    [Fact]
    public void Out_HoldsTheSameDocumentItsTablesAndCharts()
    {
        using var workshop = Workshop.WithDemo();
        string json = workshop.Run("simulate", Monitor, "--json", "--out", "result").AssertDone().Output;
        Assert.Equal(json, workshop.Read("result/simulate.json"));
        string[] files = [.. Directory.EnumerateFiles(workshop.PathOf("result")).Select(f => Path.GetFileName(f))];
        foreach (string table in (string[])["spectrum.csv", "photons.csv", "gamut.csv", "bands.csv", "layers.csv", "efficiency.csv", "film.csv", "panel.csv"])
            Assert.Contains(table, files, StringComparer.Ordinal);
        Assert.Contains(files, f => f.EndsWith(".svg", StringComparison.Ordinal));
        Assert.Contains(files, f => f.EndsWith(".png", StringComparison.Ordinal));
        Assert.Equal(472, workshop.Read("result/spectrum.csv").TrimEnd().Split('\n').Length);
        workshop.Run("simulate", Monitor, "--json", "--out", "result").AssertDone();
    }

    [Fact]
    public void Out_WhereItCannotWrite_PrintsNothing()
    {
        using var workshop = Workshop.WithDemo();
        workshop.Write("result", "a file");
        workshop.Run("simulate", Monitor, "--json", "--out", "result").AssertRefused();
        Assert.Equal("a file", workshop.Read("result"));
    }

    private static JsonNode Photons(Workshop workshop, params string[] more) =>
        JsonNode.Parse(workshop.Run(["simulate", Monitor, "--json", .. more]).AssertDone().Output)!["photons"]!;

    private static void AssertKeys(JsonNode node, params string[] keys) => Assert.Empty(keys.Except(node.AsObject().Select(p => p.Key), StringComparer.Ordinal));
}
