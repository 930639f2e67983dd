using System.Globalization;
using System.Text.Json.Nodes;

namespace Dotcoat.Tests.Commands;

/// <summary>Particles in the film file, a haze meter's reading and the way back from it, through the whole program.</summary>
public sealed class ScatteringTests
{
    private const string Monitor = "spectra/demo/desk-monitor.film.yaml";
    private const string Layer = "layers[0]";

    // White pigment of 0.25 µm in a host of 1.5; mean index at 450 nm from Devore 1951, computed row: g 0.409.
    private static readonly string Pigment = "{radius_um: 0.125, refractive_index: 2.9295, volume_percent: 0.05}";

    [Fact]
    public void Particles_TakeThePlaceOfScatteringAndAnisotropy()
    {
        using var workshop = Workshop.WithDemo();
        workshop.Write(Monitor, WithParticles(workshop, Pigment));
        var document = JsonNode.Parse(workshop.Run("simulate", Monitor, "--json").AssertDone().Output)!;
        Assert.Equal(1, (double)document["photons"]!["sum"]!, 1e-9);
        // 1 vol% of this pigment scatters 233 per mm at 450 nm (computed, independent code): 0.05 vol% 11.7 per mm, with a third of the forward bias
        // of the demo's beads, so that more blue is absorbed than without any scatterer.
        workshop.Write(Monitor, WithParticles(workshop, null));
        double clear = (double)JsonNode.Parse(workshop.Run("simulate", Monitor, "--json").AssertDone().Output)!["photons"]!["unconverted"]!;
        Assert.True((double)document["photons"]!["unconverted"]! < clear - 0.02);
    }

    [Fact]
    public void Particles_ByWeight_AreThoseByVolume()
    {
        using var workshop = Workshop.WithDemo();
        // 4.23 g/mL in 1.12 g/mL: w = f ρp / (f ρp + (1 − f) ρh).
        double weight = 100 * 0.0005 * 4.23 / ((0.0005 * 4.23) + (0.9995 * 1.12));
        string byWeight = string.Create(CultureInfo.InvariantCulture, $"{{radius_um: 0.125, refractive_index: 2.9295, weight_percent: {weight:R}, density_g_per_ml: 4.23}}");
        workshop.Write(Monitor, WithParticles(workshop, byWeight));
        double first = (double)JsonNode.Parse(workshop.Run("simulate", Monitor, "--json").AssertDone().Output)!["photons"]!["unconverted"]!;
        using var other = Workshop.WithDemo();
        other.Write(Monitor, WithParticles(other, Pigment));
        double second = (double)JsonNode.Parse(other.Run("simulate", Monitor, "--json").AssertDone().Output)!["photons"]!["unconverted"]!;
        Assert.Equal(second, first, 1e-12);
    }

    [Theory]
    [InlineData("{refractive_index: 2.9, volume_percent: 1}", "has no radius_um; it is required")]
    [InlineData("{radius_um: 0.1, volume_percent: 1}", "has no refractive_index; it is required")]
    [InlineData("{radius_um: 0.1, refractive_index: 2.9}", "has no volume_percent and no weight_percent")]
    [InlineData("{radius_um: 0.1, refractive_index: 2.9, volume_percent: 1, weight_percent: 2}", "give one of them")]
    [InlineData("{radius_um: 0.1, refractive_index: 2.9, weight_percent: 2}", "missing: layers[dot layer].particles.density_g_per_ml")]
    [InlineData("{radius_um: -1, refractive_index: 2.9, volume_percent: 1}", "0.001 to 50 µm")]
    [InlineData("{radius_um: 0.1, refractive_index: 20, volume_percent: 1}", "0.1 to 10")]
    [InlineData("{radius_um: 0.1, refractive_index: 2.9, volume_percent: 1, size_spread: 1.2}", "nearest is size_spread_factor")]
    public void Particles_WithAFault_AreRefusedInOneLine(string particles, string message)
    {
        using var workshop = Workshop.WithDemo();
        workshop.Write(Monitor, WithParticles(workshop, particles));
        Assert.Contains(message, workshop.Run("simulate", Monitor).AssertRefused().Error, StringComparison.Ordinal);
    }

    [Fact]
    public void Particles_BesideScattering_AreRefused()
    {
        using var workshop = Workshop.WithDemo();
        var outcome = workshop.Run("simulate", Monitor, "--set", $"{Layer}.particles={Pigment}").AssertRefused(lines: 2);
        Assert.Contains("particles bring their own", outcome.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void Particles_ThatCrowd_AreWarnedOf()
    {
        using var workshop = Workshop.WithDemo();
        workshop.Write(Monitor, WithParticles(workshop, "{radius_um: 1.5, refractive_index: 1.59, volume_percent: 8}"));
        Assert.Contains("crowd", workshop.Run("simulate", Monitor, "--model", "beer-lambert").AssertDone().Output, StringComparison.Ordinal);
    }

    [Fact]
    public void Haze_OfAFilm_AndBack_IsItsScattering()
    {
        using var workshop = Workshop.WithDemo();
        var haze = JsonNode.Parse(workshop.Run("simulate", Monitor, "--haze-nm", "700", "--json").AssertDone().Output)!["haze"]!;
        Assert.Equal(700, (int)haze["wavelength_nm"]!);
        Assert.InRange((double)haze["haze"]!, 0.5, 1);
        var back = JsonNode.Parse(workshop.Run(
            "scatter-from-haze", "--total-transmittance-percent", Percent(haze["total_transmittance"]!), "--haze-percent", Percent(haze["haze"]!),
            "--thickness-um", "90", "--absorption-per-mm", "0.002", "--json").AssertDone().Output)!;
        // The demo's layer: 18 per mm with g 0.80. What a meter fixes well is s(1 − g); s and g apart only within their stated errors.
        double s = (double)back["scattering_per_mm"]!, g = (double)back["anisotropy"]!;
        Assert.InRange(s * (1 - g), 3.6 * 0.97, 3.6 * 1.03);
        Assert.InRange(Math.Abs(s - 18), 0, (3 * (double)back["scattering_error_per_mm"]!) + 0.2);
    }

    [Fact]
    public void Zone_BesideALitSquare_FallsOffWithTheDistance()
    {
        using var workshop = Workshop.WithDemo();
        var document = JsonNode.Parse(workshop.Run("simulate", Monitor, "--zone-mm", "20", "--model", "beer-lambert", "--json").AssertDone().Output)!;
        double[] distance = [.. document["zone"]!["distance_mm"]!.AsArray().Select(d => (double)d!)];
        double[] luminance = [.. document["zone"]!["luminance"]!.AsArray().Select(d => (double)d!)];
        Assert.Equal(0, distance[0]);
        Assert.InRange(luminance[0], 0.5, 1.02);
        Assert.True(luminance[^1] < 0.2 * luminance[0]);
        Assert.Equal(3, document["spread"]!.AsArray().Count);
    }

    [Fact]
    public void Edge_OfTheSheet_IsDarkerThanItsMiddle()
    {
        using var workshop = Workshop.WithDemo();
        var document = JsonNode.Parse(workshop.Run("simulate", Monitor, "--edge-mm", "10", "--json").AssertDone().Output)!;
        double[] photons = [.. document["edge"]!["photons"]!.AsArray().Select(p => (double)p!)];
        double above = (double)document["photons"]!["unconverted"]! + (double)document["photons"]!["converted"]!;
        Assert.True(photons[0] < 0.97 * above, $"{photons[0]} at the cut, {above} in the middle");
        Assert.Equal(above, photons[^1], 0.03);
        Assert.InRange((double)document["edge_loss"]!["width_mm"]!, 0.001, 1);
        Assert.Contains("lost at the cut", workshop.Run("simulate", Monitor, "--edge-mm", "10").AssertDone().Output, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("--edge-mm", "-1", "above 0")]
    [InlineData("--haze-nm", "300", "from 360 to 830")]
    [InlineData("--zone-mm", "0", "above 0")]
    public void TracedExtras_OutOfRange_AreRefused(string option, string value, string message)
    {
        using var workshop = Workshop.WithDemo();
        var outcome = workshop.Run("simulate", Monitor, option, value);
        Assert.Equal(2, outcome.Status);
        Assert.Contains(message, outcome.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void HazeWhereDotsAbsorb_IsRefused()
    {
        using var workshop = Workshop.WithDemo();
        Assert.Contains("450 nm", workshop.Run("simulate", Monitor, "--haze-nm", "450").AssertRefused().Error, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("99", "50", "A clear coat")]
    [InlineData("0", "50", "above 0 and at most 1")]
    [InlineData("90", "0", "Without haze there is no scattering")]
    public void ScatterFromHaze_OfReadingsThatCannotBe_SaysWhy(string transmittance, string haze, string message)
    {
        using var workshop = Workshop.WithDemo();
        var outcome = workshop.Run(
            "scatter-from-haze", "--total-transmittance-percent", transmittance, "--haze-percent", haze, "--thickness-um", "100").AssertRefused();
        Assert.Contains(message, outcome.Error, StringComparison.OrdinalIgnoreCase);
    }

    private static string Percent(JsonNode share) => (100 * (double)share).ToString("R", CultureInfo.InvariantCulture);

    private static string WithParticles(Workshop workshop, string? particles) => string.Join('\n', workshop.Read(Monitor).Split('\n')
        .Where(line => !line.Contains("anisotropy", StringComparison.Ordinal) && !line.Contains("particles", StringComparison.Ordinal))
        .Select(line => !line.Contains("scattering_per_mm", StringComparison.Ordinal) ? line : particles is null ? "" : $"    particles: {particles}"));
}
