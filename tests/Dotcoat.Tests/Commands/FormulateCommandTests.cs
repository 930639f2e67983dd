using System.Text.Json.Nodes;

namespace Dotcoat.Tests.Commands;

public sealed class FormulateCommandTests
{
    private const string Monitor = "spectra/demo/desk-monitor.film.yaml";
    private const string Saved = "spectra/demo/new.film.yaml";

    [Fact]
    public void Text_SaysOnTargetThenTheRecipe()
    {
        using var workshop = Workshop.WithDemo();
        string text = workshop.Run("formulate", Monitor).AssertDone().AssertPlain().Output;
        Assert.StartsWith("White is on target", text, StringComparison.Ordinal);
        Assert.True(text.IndexOf("recipe", StringComparison.Ordinal) < text.IndexOf("where each source photon goes", StringComparison.Ordinal));
    }

    [Fact]
    public void FromAnotherStart_FindsTheSameRecipe()
    {
        using var workshop = Workshop.WithDemo();
        var near = Loadings(workshop.Run("formulate", Monitor, "--json").AssertDone());
        var far = Loadings(workshop.Run("formulate", Monitor, "--json",
            "--set", "layers[0].dots[green K07].loading_mg_per_ml=0.5", "--set", "layers[0].dots[red K23].loading_mg_per_ml=20").AssertDone());
        foreach (var (lot, loading) in near)
            Assert.Equal((double)loading!, (double)far[lot]!, 0.02 * (double)loading!);
    }

    [Theory]
    [InlineData("target.white_xy=[0.15, 0.70]")]
    [InlineData("target.free=[{lot: green K07, max_mg_per_ml: 1}, {lot: red K23}]")]
    public void TargetOutOfReach_IsStatusOneWithTheDocument(string change)
    {
        using var workshop = Workshop.WithDemo();
        var outcome = workshop.Run("formulate", Monitor, "--json", "--set", change);
        Assert.Equal(1, outcome.Status);
        var solution = JsonNode.Parse(outcome.Output)!["solution"]!;
        Assert.False((bool)solution["reached"]!);
        Assert.NotEmpty((string)solution["limit"]!);
        Assert.True((double)solution["white_error_xy"]! > 0.0005);
        string text = workshop.Run("formulate", Monitor, "--set", change).AssertPlain().Output;
        Assert.StartsWith("White cannot reach", text, StringComparison.Ordinal);
    }

    [Fact]
    public void WithATracedModel_IsRefusedWithAWayOut()
    {
        using var workshop = Workshop.WithDemo();
        Assert.Contains("simulate --model monte-carlo", workshop.Run("formulate", Monitor, "--model", "monte-carlo").AssertRefused().Error, StringComparison.Ordinal);
    }

    [Fact]
    public void WithoutTarget_IsRefused()
    {
        using var workshop = Workshop.WithDemo();
        string text = workshop.Read(Monitor);
        workshop.Write("spectra/demo/aimless.film.yaml", text[..text.IndexOf("\ntarget:", StringComparison.Ordinal)] + "\n");
        Assert.Contains("target", workshop.Run("formulate", "spectra/demo/aimless.film.yaml").AssertRefused().Error, StringComparison.Ordinal);
    }

    [Fact]
    public void Save_WritesAFilmThatIsOnTargetAndKeepsTheComments()
    {
        using var workshop = Workshop.WithDemo();
        workshop.Run("formulate", Monitor, "--save", Saved).AssertDone();
        Assert.Contains("# light guide and reflector sheet", workshop.Read(Saved), StringComparison.Ordinal);
        Assert.Contains("On target", workshop.Run("simulate", Saved).AssertDone().Output, StringComparison.Ordinal);
        // Its own file may be written again, also from itself.
        workshop.Run("formulate", Monitor, "--save", Saved).AssertDone();
        workshop.Run("formulate", Saved, "--save", Saved).AssertDone();
        Assert.Single(workshop.Read(Saved).Split('\n'), line => line.Contains("dotcoat wrote this file", StringComparison.Ordinal));
    }

    [Fact]
    public void Save_OverAPersonsFile_IsRefused()
    {
        using var workshop = Workshop.WithDemo();
        string before = workshop.Read(Monitor);
        workshop.Run("formulate", Monitor, "--save", Monitor).AssertRefused();
        Assert.Equal(before, workshop.Read(Monitor));
        workshop.Run("formulate", Monitor, "--save", Saved).AssertDone();
        workshop.Write(Saved, workshop.Read(Saved).Replace("title: Desk", "title: My desk", StringComparison.Ordinal));
        workshop.Run("formulate", Monitor, "--save", Saved).AssertRefused();
        Assert.Contains("My desk", workshop.Read(Saved), StringComparison.Ordinal);
    }

    [Fact]
    public void Save_InAnotherFolderWithSet_HoldsTheChangeAndFindsItsSpectra()
    {
        using var workshop = Workshop.WithDemo();
        workshop.Run("formulate", Monitor, "--set", "layers[0].thickness_um=70", "--save", "elsewhere.film.yaml").AssertDone();
        Assert.Contains("thickness_um: 70", workshop.Read("elsewhere.film.yaml"), StringComparison.Ordinal);
        Assert.Contains("On target", workshop.Run("simulate", "elsewhere.film.yaml").AssertDone().Output, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("new.txt")]
    [InlineData("missing/new.film.yaml")]
    public void Save_WhereItCannotBe_IsRefusedAndWritesNothing(string save)
    {
        using var workshop = Workshop.WithDemo();
        var before = workshop.Files();
        workshop.Run("formulate", Monitor, "--save", save, "--out", "result").AssertRefused();
        Assert.Equal(before, workshop.Files());
    }

    [Fact]
    public void Out_HoldsTheDocumentWithTheSolution()
    {
        using var workshop = Workshop.WithDemo();
        string json = workshop.Run("formulate", Monitor, "--json", "--out", "result").AssertDone().Output;
        Assert.Equal(json, workshop.Read("result/formulate.json"));
        Assert.Contains("loadings_mg_per_ml.green K07,", workshop.Read("result/solution.csv"), StringComparison.Ordinal);
    }

    private static JsonObject Loadings(Outcome outcome) => JsonNode.Parse(outcome.Output)!["solution"]!["loadings_mg_per_ml"]!.AsObject();
}
