using System.Net;
using System.Text.Json.Nodes;
using Dotcoat.Tests.Commands;

namespace Dotcoat.Tests.Desk;

/// <summary>A bad number is said at its field; a key or a name that is not the page's reaches nothing.</summary>
public sealed class DeskFieldTests
{
    [Theory]
    [InlineData("layers[dot layer].thickness_um", "-5", "above 0")]
    [InlineData("layers[dot layer].thickness_um", "20000", "10 000 µm")]
    [InlineData("layers[dot layer].thickness_um", "", "no number")]
    [InlineData("layers[dot layer].thickness_um", "1e999", "no number")]
    [InlineData("layers[dot layer].thickness_um", "NaN", "no number")]
    [InlineData("layers[dot layer].thickness_um", "80 # x", "no number")]
    [InlineData("layers[dot layer].scattering_per_mm", "{file: secret.csv}", "no number")]
    [InlineData("layers[dot layer].scattering_per_mm", "../secret.csv", "no number")]
    [InlineData("cavity.below_reflectance", "1.2", "0 to 1")]
    [InlineData("lots[green K07].quantum_yield", "2", "0 to 1")]
    [InlineData("lots[green K07].film_yield_factor", "1.09", "at most 1")]
    [InlineData("target.white_xy[1]", "0.9", "x + y at most 1")]
    public async Task Number_ThatTheFilmCannotHave_IsSaidAtItsField(string key, string text, string said)
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        foreach (string path in (string[])["solve", "formulate", "save", "report", "trace"])
        {
            var faults = (await desk.PostAsync(path, OpenDesk.Request(OpenDesk.Fields((key, text)), more: ("name", "bad")))).Refused(HttpStatusCode.UnprocessableEntity);
            var (field, message) = Assert.Single(faults);
            Assert.Contains(said, message, StringComparison.Ordinal);
            // A colour is two fields: the fault of both stands at neither alone.
            Assert.Equal(key.StartsWith("target.white", StringComparison.Ordinal) ? null : key, field);
        }

        Assert.DoesNotContain(workshop.Files(), file => file.Contains("bad", StringComparison.Ordinal));
    }

    [Theory]
    [InlineData("title", "5")]
    [InlineData("layers[dot layer].no_such_key", "5")]
    [InlineData("lots[green K07].absorbance", "5")]
    [InlineData("panel.filters", "5")]
    public async Task Field_ThatThePageDoesNotHave_IsRefused(string key, string text)
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        var faults = (await desk.PostAsync("solve", OpenDesk.Request(OpenDesk.Fields((key, text))))).Refused(HttpStatusCode.UnprocessableEntity);
        Assert.Contains("no field of this page", Assert.Single(faults).Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("lots[green K07].emission", "../../secret.csv")]
    [InlineData("lots[green K07].emission", "green-k11-emission.csv")]
    [InlineData("panel.filters", "filters-bright.csv")]
    public async Task Spectrum_ThatWasNotDropped_IsRefused(string key, string name)
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        var request = OpenDesk.Request();
        request["state"]!["spectra"]![key] = name;
        Assert.Single((await desk.PostAsync("solve", request)).Refused(HttpStatusCode.UnprocessableEntity));
    }

    [Theory]
    [InlineData("")]
    [InlineData("0123")]
    [InlineData("../../../../x/y")]
    [InlineData("0123456789ABCDEF")]
    public async Task Page_WithoutAProperName_IsRefused(string tab)
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        (await desk.PostAsync("solve", OpenDesk.Request(tab: tab))).Refused(HttpStatusCode.UnprocessableEntity);
        Assert.Equal(HttpStatusCode.NotFound, (await desk.DeleteAsync($"unsaved/{Uri.EscapeDataString(tab)}")).Status);
    }

    [Fact]
    public async Task State_WithThousandsOfEntries_IsRefused()
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        var fields = Enumerable.Range(0, 600).ToDictionary(i => $"k{i}", _ => "1", StringComparer.Ordinal);
        Assert.Single((await desk.PostAsync("solve", OpenDesk.Request(fields))).Refused(HttpStatusCode.UnprocessableEntity));
    }

    [Fact]
    public async Task Trace_RunsOneAtATime_StopsWhenAsked_AndShowsErrorsBesideTheExactFigures()
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        foreach (long wrong in (long[])[0, 9_999, 2_000_000_001])
            Assert.Equal("trace-photons", Assert.Single((await desk.PostAsync("trace", OpenDesk.Request(more: ("photons", wrong)))).Refused(HttpStatusCode.UnprocessableEntity)).Field);
        string id = (string)(await desk.PostAsync("trace", OpenDesk.Request(more: ("photons", 2_000_000_000)))).Granted()["id"]!;
        (await desk.PostAsync("trace", OpenDesk.Request(more: ("photons", 20_000)))).Refused(HttpStatusCode.Conflict);
        Assert.False((bool)(await desk.GetAsync($"trace/{id}")).Granted()["finished"]!);
        Assert.Equal(HttpStatusCode.NoContent, (await desk.DeleteAsync($"trace/{id}")).Status);
        var stopped = await EndAsync(desk, id);
        Assert.True((double)stopped["doneShare"]! < 1);
        id = (string)(await desk.PostAsync("trace", OpenDesk.Request(more: [("photons", 20_000), ("seed", 7)]))).Granted()["id"]!;
        var ended = await EndAsync(desk, id);
        string printed = workshop.Run("simulate", OpenDesk.Film, "--model", "monte-carlo", "--photons", "20000", "--seed", "7", "--json").AssertDone().Output;
        var unconverted = ended["table"]!["rows"]![0]!.AsArray();
        Assert.Equal(Math.Round((double)JsonNode.Parse(printed)!["photons"]!["unconverted"]!, 5), double.Parse((string)unconverted[1]!, System.Globalization.CultureInfo.InvariantCulture), 5);
        Assert.Equal(HttpStatusCode.NotFound, (await desk.GetAsync("trace/99")).Status);
        Assert.Equal(HttpStatusCode.NotFound, (await desk.DeleteAsync("trace/99")).Status);
    }

    private static async Task<JsonNode> EndAsync(OpenDesk desk, string id)
    {
        while (true)
        {
            var run = (await desk.GetAsync($"trace/{id}")).Granted();
            if ((bool)run["finished"]!)
                return run;
            await Task.Delay(20, TestContext.Current.CancellationToken);
        }
    }
}
