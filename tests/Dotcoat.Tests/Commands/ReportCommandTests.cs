using System.Text.Json.Nodes;

namespace Dotcoat.Tests.Commands;

public sealed class ReportCommandTests
{
    [Fact]
    public void Reports_GoIntoFoldersOfTheirNames()
    {
        using var workshop = Workshop.WithDemo();
        var outcome = workshop.Run("report", "spectra/demo/desk-monitor.film.yaml", "spectra/demo/living-room-tv.film.yaml").AssertDone().AssertPlain();
        foreach (string name in (string[])["desk-monitor", "living-room-tv"])
        {
            Assert.Contains(Path.Combine("reports", name, "report.html"), outcome.Output, StringComparison.Ordinal);
            string[] files = [.. Directory.EnumerateFiles(workshop.PathOf($"reports/{name}")).Select(f => Path.GetFileName(f))];
            Assert.Contains("report.html", files, StringComparer.Ordinal);
            Assert.Contains("simulate.json", files, StringComparer.Ordinal);
            Assert.Contains(files, f => f.EndsWith(".svg", StringComparison.Ordinal));
            Assert.Contains(files, f => f.EndsWith(".png", StringComparison.Ordinal));
        }
    }

    [Fact]
    public void Json_NamesEveryFile()
    {
        using var workshop = Workshop.WithDemo();
        var document = JsonNode.Parse(workshop.Run("report", "spectra/demo/desk-monitor.film.yaml", "--out", "mine", "--json").AssertDone().Output)!;
        Assert.Equal("mine", (string)document["reports"]![0]!["folder"]!);
        Assert.All(document["reports"]![0]!["files"]!.AsArray(), file => Assert.True(File.Exists(workshop.PathOf($"mine/{file}"))));
    }

    [Fact]
    public void OneWrongFilmAmongSeveral_WritesNothing()
    {
        using var workshop = Workshop.WithDemo();
        workshop.Write("spectra/demo/wrong.film.yaml", "title: [\n");
        var before = workshop.Files();
        var outcome = workshop.Run("report", "spectra/demo/desk-monitor.film.yaml", "spectra/demo/wrong.film.yaml");
        Assert.Equal(2, outcome.Status);
        Assert.Equal("", outcome.Output);
        Assert.Equal(before, workshop.Files());
    }

    [Fact]
    public void TwoFilmsOfOneName_AreRefused()
    {
        using var workshop = Workshop.WithDemo();
        workshop.Run("report", "spectra/demo/desk-monitor.film.yaml", "./spectra/demo/desk-monitor.film.yaml").AssertRefused();
    }
}
