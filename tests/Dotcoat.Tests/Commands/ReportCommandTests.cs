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

    [Fact]
    public void To_MakesWhatWasAskedForAndNothingElse()
    {
        using var workshop = Workshop.WithDemo();
        workshop.Run("report", "spectra/demo/desk-monitor.film.yaml", "--out", "mine", "--to", "pdf,html", "--date", "2026-03-31").AssertDone();
        Assert.Equal(
            "dotcoat-files.txt|report.html|report.pdf|simulate.json",
            string.Join('|', Directory.EnumerateFiles(workshop.PathOf("mine")).Select(f => Path.GetFileName(f)).Order(StringComparer.Ordinal)));
        Assert.Contains("2026-03-31", workshop.Read("mine/report.html"), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("--to", "html,doc", "there are html, pdf, png, svg")]
    [InlineData("--to", "", "there are html, pdf, png, svg")]
    [InlineData("--date", "31.03.2026", "a date such as 2026-03-31")]
    public void WrongForm_OrDate_IsRefused(string option, string value, string says)
    {
        using var workshop = Workshop.WithDemo();
        var outcome = workshop.Run("report", "spectra/demo/desk-monitor.film.yaml", option, value).AssertRefused(2);
        Assert.Contains(says, outcome.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void SeveralFilms_AreAlsoSetSideBySide()
    {
        using var workshop = Workshop.WithDemo();
        var outcome = workshop.Run("report", "spectra/demo/desk-monitor.film.yaml", "spectra/demo/living-room-tv.film.yaml", "--to", "html").AssertDone();
        Assert.Contains(Path.Combine("reports", "side-by-side", "report.html"), outcome.Output, StringComparison.Ordinal);
        string page = workshop.Read("reports/side-by-side/report.html");
        Assert.Contains("2 films side by side", page, StringComparison.Ordinal);
        Assert.Contains("B · Living-room television", page, StringComparison.Ordinal);
    }

    [Fact]
    public void LoadingMapAnglesAndZone_GoIntoPageAndCharts()
    {
        using var workshop = Workshop.WithDemo();
        workshop.Run("report", "spectra/demo/desk-monitor.film.yaml", "--out", "mine", "--to", "html,svg", "--loading-map", "--angles", "--zone-mm", "20", "--accuracy", "1e-2").AssertDone();
        string page = workshop.Read("mine/report.html");
        foreach (string name in (string[])["loading-map", "colour-over-angle", "halo"])
        {
            Assert.Contains($"id=\"{name}-title\"", page, StringComparison.Ordinal);
            Assert.True(File.Exists(workshop.PathOf($"mine/{name}.svg")), name);
        }
    }

    [Fact]
    public void LoadingMap_WithoutATarget_IsRefused()
    {
        using var workshop = Workshop.WithDemo();
        workshop.Write("spectra/demo/free.film.yaml", workshop.Read("spectra/demo/desk-monitor.film.yaml").Split("\ntarget:", 2)[0] + "\n");
        workshop.Run("report", "spectra/demo/free.film.yaml", "--loading-map").AssertRefused();
    }
}
