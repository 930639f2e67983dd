using System.Globalization;
using System.Net;
using System.Text.Json.Nodes;
using System.Text.RegularExpressions;
using System.Xml.Linq;
using Dotcoat.Tests.Commands;

namespace Dotcoat.Tests.Desk;

/// <summary>The page shows what the command line prints for the same film.</summary>
public sealed class DeskFiguresTests
{
    [Theory]
    [InlineData("discrete-ordinates")]
    [InlineData("beer-lambert")]
    public async Task Solve_WithChangedFields_ShowsTheCommandsFigures(string model)
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop, model: FilmModels.Named(model, new(null, false, null, null)));
        var fields = OpenDesk.Fields((OpenDesk.Green, "7.5"), (OpenDesk.Thickness, "80"), ("backlight.spectrum.shift_nm", "2"), ("lots[red K23].quantum_yield", "0.9"), ("target.white_xy[0]", "0.31"));
        var reply = (await desk.PostAsync("solve", OpenDesk.Request(fields))).Granted();
        string[] arguments = ["simulate", OpenDesk.Film, "--model", model, .. fields.SelectMany(f => (string[])["--set", $"{f.Key}={f.Value}"])];
        string printed = workshop.Run(arguments).AssertDone().Output;
        Assert.Contains((string)reply["answer"]!, printed.ReplaceLineEndings(" "), StringComparison.Ordinal);
        string[] lines = [.. printed.Split('\n').Select(line => string.Join(' ', line.Split(' ', StringSplitOptions.RemoveEmptyEntries)))];
        int rows = 0;
        foreach (var table in reply["tables"]!.AsArray())
        {
            foreach (var row in table!["rows"]!.AsArray())
            {
                string line = string.Join(' ', row!.AsArray().Select(cell => (string)cell!).Where(cell => cell.Length > 0));
                Assert.Contains(line, lines, StringComparer.Ordinal);
                rows++;
            }
        }

        Assert.True(rows > 25, $"{rows} rows");
    }

    [Fact]
    public async Task Solve_CommandShown_IsTheOneThatPrintsTheFigures()
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        var reply = (await desk.PostAsync("solve", OpenDesk.Request(OpenDesk.Fields((OpenDesk.Thickness, " 80 "))))).Granted();
        string[] command = ShownCommands.In($"```\n{reply["command"]}\n```").Single();
        Assert.Equal(["simulate", OpenDesk.Film, "--set", $"{OpenDesk.Thickness}=80"], command);
        string printed = workshop.Run([.. command, "--model", "beer-lambert"]).AssertDone().Output;
        Assert.Contains((string)reply["answer"]!, printed.ReplaceLineEndings(" "), StringComparison.Ordinal);
    }

    [Fact]
    public async Task Formulate_ThenSolve_IsOnTargetWithTheCommandsRecipe()
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        var changed = OpenDesk.Fields((OpenDesk.Thickness, "70"));
        var found = (await desk.PostAsync("formulate", OpenDesk.Request(changed))).Granted();
        Assert.True((bool)found["reached"]!);
        foreach (var (key, text) in found["fields"]!.AsObject())
            changed[key] = (string)text!;
        Assert.Equal(3, changed.Count);
        var solved = (await desk.PostAsync("solve", OpenDesk.Request(changed))).Granted();
        Assert.True((bool)solved["onTarget"]!);
        var recipe = JsonNode.Parse(workshop.Run("formulate", OpenDesk.Film, "--model", "beer-lambert", "--json", "--set", $"{OpenDesk.Thickness}=70").AssertDone().Output)!["solution"]!["loadings_mg_per_ml"]!;
        Assert.Equal((double)recipe["green K07"]!, double.Parse(changed[OpenDesk.Green], CultureInfo.InvariantCulture), 4);
    }

    [Fact]
    public async Task Formulate_OutOfReach_SaysWhyAndGivesTheNearest()
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        var fields = OpenDesk.Fields(("target.white_xy[0]", "0.1"), ("target.white_xy[1]", "0.8"));
        var found = (await desk.PostAsync("formulate", OpenDesk.Request(fields))).Granted();
        Assert.False((bool)found["reached"]!);
        string printed = workshop.Run("formulate", OpenDesk.Film, "--model", "beer-lambert", "--set", "target.white_xy[0]=0.1", "--set", "target.white_xy[1]=0.8").Output;
        Assert.Contains((string)found["message"]!, printed.ReplaceLineEndings(" "), StringComparison.Ordinal);
    }

    [Fact]
    public async Task Solve_ChartsAskedFor_AreTheReportsOwn()
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        var reply = (await desk.PostAsync("solve", OpenDesk.Request(more: ("charts", new JsonArray("spectrum", "photon-fates", "no-such-chart"))))).Granted();
        workshop.Run("report", OpenDesk.Film, "--model", "beer-lambert", "--out", "r").AssertDone();
        string[] drawn = [.. reply["charts"]!.AsObject().Select(chart => chart.Key).Order(StringComparer.Ordinal)];
        Assert.Equal(["photon-fates", "spectrum"], drawn);
        foreach (var (name, svg) in reply["charts"]!.AsObject())
        {
            // On the page the paper is the page's own.
            string report = Regex.Replace(workshop.Read($"r/{name}.svg"), " <rect width=[^>]*/>\n", "", RegexOptions.None, TimeSpan.FromSeconds(5));
            Assert.EndsWith((string)svg!, report, StringComparison.Ordinal);
        }
    }

    [Theory]
    [InlineData("chromaticity-1931")]
    [InlineData("chromaticity-1976")]
    public async Task Diagram_OnItsGround_HasEveryMarkOfTheReports(string name)
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        var reply = (await desk.PostAsync("solve", OpenDesk.Request(more: ("charts", new JsonArray(name))))).Granted();
        workshop.Run("report", OpenDesk.Film, "--model", "beer-lambert", "--out", "r").AssertDone();
        var marks = (XElement svg) => svg.Descendants().Where(e => e.Name.LocalName is "text" or "polyline" or "circle" or "polygon")
            .Where(e => e.Parent!.Name.LocalName != "clipPath").Select(e => e.ToString()).ToArray();
        Assert.Equal(marks(XDocument.Parse(workshop.Read($"r/{name}.svg")).Root!), marks(XElement.Parse((string)reply["charts"]![name]!)));
        byte[] light = (await desk.GetAsync($"ground/light/{name}")).Bytes, dark = (await desk.GetAsync($"ground/dark/{name}")).Bytes;
        Assert.Equal([0x89, (byte)'P', (byte)'N', (byte)'G'], light[..4]);
        Assert.False(light.AsSpan().SequenceEqual(dark));
        Assert.InRange(light.Length, 1000, 60_000);
        Assert.Equal(HttpStatusCode.NotFound, (await desk.GetAsync("ground/light/spectrum")).Status);
    }

    [Fact]
    public async Task Controls_OfEveryDemoFilm_FollowTheLightAndCoverWhatMoves()
    {
        using var workshop = Workshop.WithDemo();
        foreach (string film in (string[])[OpenDesk.Film, "spectra/demo/living-room-tv.film.yaml"])
        {
            await using var desk = await OpenDesk.StartAsync(workshop, film);
            var groups = (await desk.GetAsync("film")).Granted()["groups"]!.AsArray();
            string[] names = [.. groups.Select(group => ((string)group!["name"]!).Split(' ')[0])];
            Assert.Equal(["Backlight", "Film", "Lot", "Lot", "Cavity", "Panel", "Target"], names);
            string[] keys = [.. groups.SelectMany(group => group!["fields"]!.AsArray()).Select(field => (string)field!["key"]!)];
            Assert.Equal(keys.Length, keys.Distinct(StringComparer.Ordinal).Count());
            Assert.All(
                ["loading", "thickness", "scattering", "quantum_yield", "backlight.spectrum.shift_nm", "cavity.below_reflectance", "cavity.above_reflectance"],
                part => Assert.Contains(keys, key => key.Contains(part, StringComparison.Ordinal)));
            // Each is a key that the film takes, at the value that is shown for it.
            foreach (var field in groups.SelectMany(group => group!["fields"]!.AsArray()))
                Assert.Equal(HttpStatusCode.OK, (await desk.PostAsync("solve", OpenDesk.Request(OpenDesk.Fields(((string)field!["key"]!, (string)field["text"]!))))).Status);
        }
    }
}
