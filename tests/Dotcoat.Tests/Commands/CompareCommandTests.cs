using System.Text.Json.Nodes;

namespace Dotcoat.Tests.Commands;

public sealed class CompareCommandTests
{
    [Fact]
    public void Compare_OnTheDemo_ExplainsEveryDifferenceBetweenTheExactAndTheTracedModel()
    {
        using var workshop = Workshop.WithDemo();
        var document = JsonNode.Parse(workshop.Run("compare", "spectra/demo/desk-monitor.film.yaml", "--photons", "300000", "--json").AssertDone().Output)!;
        Assert.Equal(
            "discrete-ordinates, monte-carlo, beer-lambert",
            string.Join(", ", document["models"]!.AsArray().Select(m => (string)m!["model"]!)));
        foreach (var difference in document["differences"]!.AsArray().Where(d => (string)d!["model"]! == "monte-carlo"))
        {
            if (difference!["stated_error"] is not null)
                Assert.True((bool)difference["explained"]!, difference.ToJsonString());
        }

        // Every model's fates sum to one photon.
        foreach (var model in document["models"]!.AsArray())
        {
            string[] fates = ["unconverted", "converted", "lost_below", "lost_above", "lost_in_host", "lost_at_edges", "lost_in_lots"];
            Assert.Equal(1, fates.Sum(fate => (double)model![fate]!), 1e-9);
        }
    }

    [Fact]
    public void Compare_SuggestedPaths_GiveTheQuickModelTheLeakageOfTheExactOne()
    {
        using var workshop = Workshop.WithDemo();
        var document = JsonNode.Parse(workshop.Run("compare", "spectra/demo/living-room-tv.film.yaml", "--photons", "1000", "--json").AssertDone().Output)!;
        var paths = document["suggested_beer_lambert"]!;
        var quick = JsonNode.Parse(workshop.Run(
            "simulate", "spectra/demo/living-room-tv.film.yaml", "--model", "beer-lambert", "--json",
            "--set", $"beer_lambert.pump_path={paths["pump_path"]}", "--set", $"beer_lambert.emission_path={paths["emission_path"]}").AssertDone().Output)!;
        Assert.Equal((double)document["models"]![0]!["unconverted"]!, (double)quick["photons"]!["unconverted"]!, 1e-6);
        double du = (double)quick["panel"]!["white"]!["u_prime"]! - (double)document["models"]![0]!["u_prime"]!;
        double dv = (double)quick["panel"]!["white"]!["v_prime"]! - (double)document["models"]![0]!["v_prime"]!;
        Assert.Equal((double)paths["white_error_uv"]!, Math.Sqrt((du * du) + (dv * dv)), 1e-6);
    }

    [Fact]
    public void Compare_WithoutScatterAndFaces_FindsNothingToTakeAway()
    {
        using var workshop = Workshop.WithDemo();
        var document = JsonNode.Parse(workshop.Run(
            "compare", "spectra/demo/desk-monitor.film.yaml", "--photons", "1000", "--json",
            "--set", "layers[0].scattering_per_mm=0", "--set", "host.refractive_index=1").AssertDone().Output)!;
        Assert.Empty(document["without"]!.AsArray());
    }

    [Fact]
    public void Compare_Piped_IsPlainAndNarrow()
    {
        using var workshop = Workshop.WithDemo();
        string text = workshop.Run("compare", "spectra/demo/desk-monitor.film.yaml", "--photons", "1000").AssertDone().Output;
        Assert.All(text.Split('\n'), line => Assert.True(line.Length <= 80, line));
        Assert.DoesNotContain('\u001b', text);
        Assert.Contains("without", text, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("--accuracy", "0.5", "--accuracy 0.5: a number from 1E-05 to 0.01 is expected.")]
    [InlineData("--photons", "none", "--photons none: a number from 1 to 100000000000 is expected.")]
    [InlineData("--seed", "-1", "--seed -1: a whole number from 0 is expected.")]
    public void Compare_WithASettingOutOfRange_SaysWhatIsAllowed(string option, string value, string message)
    {
        using var workshop = Workshop.WithDemo();
        var outcome = workshop.Run("compare", "spectra/demo/desk-monitor.film.yaml", $"{option}={value}");
        Assert.Equal(2, outcome.Status);
        Assert.Empty(outcome.Output);
        Assert.Contains(message, outcome.Error, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("--model=beer-lambert", "--accuracy=1e-4", "--accuracy belongs to --model discrete-ordinates")]
    [InlineData("--model=beer-lambert", "--angles", "--angles belongs to --model discrete-ordinates")]
    [InlineData("--model=discrete-ordinates", "--seed=3", "--seed belongs to --model monte-carlo")]
    public void Simulate_WithASettingOfAnotherModel_RefusesIt(string model, string setting, string message)
    {
        using var workshop = Workshop.WithDemo();
        var outcome = workshop.Run("simulate", "spectra/demo/desk-monitor.film.yaml", model, setting);
        Assert.Equal(2, outcome.Status);
        Assert.Contains(message, outcome.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void Simulate_WithAngles_BeginsAtTheNormalWithLuminanceOne()
    {
        using var workshop = Workshop.WithDemo();
        var angles = JsonNode.Parse(workshop.Run("simulate", "spectra/demo/desk-monitor.film.yaml", "--angles", "--json").AssertDone().Output)!["angles"]!;
        Assert.Equal(0, (double)angles["angle_deg"]![0]!);
        Assert.Equal(80, (double)angles["angle_deg"]!.AsArray()[^1]!);
        Assert.Equal(1, (double)angles["luminance"]![0]!, 1e-12);
        Assert.All(angles["v_prime"]!.AsArray(), v => Assert.InRange((double)v!, 0.4, 0.55));
    }
}
