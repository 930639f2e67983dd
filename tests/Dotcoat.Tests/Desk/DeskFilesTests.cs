using System.Net;
using Dotcoat.Tests.Commands;

namespace Dotcoat.Tests.Desk;

/// <summary>What the page writes: only into the film file's folder, whole, and never over what it did not write.</summary>
public sealed class DeskFilesTests
{
    private const string OtherTab = "fedcba9876543210";

    [Fact]
    public async Task Save_WritesTheFilmWithItsComments_AsTheCommandsReadIt()
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        var fields = OpenDesk.Fields((OpenDesk.Green, "7.25"), ("backlight.spectrum.shift_nm", "2"), ("target.white_xy[0]", "0.31"));
        var solved = (await desk.PostAsync("solve", OpenDesk.Request(fields))).Granted();
        var saved = (await desk.PostAsync("save", OpenDesk.Request(fields, more: ("name", "trial 2")))).Granted();
        Assert.Equal("trial 2.film.yaml", (string)saved["name"]!);
        string text = workshop.Read("spectra/demo/trial 2.film.yaml");
        Assert.Contains("two crossed prism films", text, StringComparison.Ordinal);
        Assert.Contains("loading_mg_per_ml: 7.25", text, StringComparison.Ordinal);
        string printed = workshop.Run("simulate", "spectra/demo/trial 2.film.yaml", "--model", "beer-lambert").AssertDone().Output;
        Assert.Contains((string)solved["answer"]!, printed.ReplaceLineEndings(" "), StringComparison.Ordinal);
        // Again, with what was seen: its own file is replaced.
        fields[OpenDesk.Green] = "7.5";
        (await desk.PostAsync("save", OpenDesk.Request(fields, more: [("name", "trial 2.film.yaml"), ("seen", (string)saved["check"]!)]))).Granted();
        Assert.Contains("loading_mg_per_ml: 7.5", workshop.Read("spectra/demo/trial 2.film.yaml"), StringComparison.Ordinal);
    }

    [Fact]
    public async Task Save_OverAnythingThatThisPageDidNotWrite_IsRefused()
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        string opened = workshop.Read(OpenDesk.Film);
        (await desk.PostAsync("save", OpenDesk.Request(more: ("name", "desk-monitor")))).Refused(HttpStatusCode.Conflict);
        Assert.Equal(opened, workshop.Read(OpenDesk.Film));
        // Of two pages, the second does not replace the first one's file, nor the first what was changed since.
        var saved = (await desk.PostAsync("save", OpenDesk.Request(more: ("name", "both")))).Granted();
        var ones = workshop.Read("spectra/demo/both.film.yaml");
        (await desk.PostAsync("save", OpenDesk.Request(OpenDesk.Fields((OpenDesk.Green, "9")), OtherTab, ("name", "both")))).Refused(HttpStatusCode.Conflict);
        Assert.Equal(ones, workshop.Read("spectra/demo/both.film.yaml"));
        workshop.Write("spectra/demo/both.film.yaml", ones + "# mine\n");
        (await desk.PostAsync("save", OpenDesk.Request(more: [("name", "both"), ("seen", (string)saved["check"]!)]))).Refused(HttpStatusCode.Conflict);
        Assert.EndsWith("# mine\n", workshop.Read("spectra/demo/both.film.yaml"), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("")]
    [InlineData("..")]
    [InlineData("../up")]
    [InlineData("a/b")]
    [InlineData("a\\b")]
    [InlineData("/elsewhere/x")]
    [InlineData(".hidden")]
    [InlineData("a\u0000b")]
    [InlineData("a\nb")]
    [InlineData("C:x")]
    public async Task Name_ThatIsNoPlainName_IsRefusedAtItsField(string name)
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        string[] before = workshop.Files();
        Assert.Equal("save-name", Assert.Single((await desk.PostAsync("save", OpenDesk.Request(more: ("name", name)))).Refused(HttpStatusCode.UnprocessableEntity)).Field);
        Assert.Equal("report-name", Assert.Single((await desk.PostAsync("report", OpenDesk.Request(more: ("name", name)))).Refused(HttpStatusCode.UnprocessableEntity)).Field);
        Assert.Equal(before, workshop.Files());
    }

    [Fact]
    public async Task Link_OutOfTheFolder_IsNotWrittenThrough()
    {
        using var workshop = Workshop.WithDemo();
        Directory.CreateDirectory(workshop.PathOf("outside"));
        Directory.CreateSymbolicLink(workshop.PathOf("spectra/demo/reports"), workshop.PathOf("outside"));
        File.CreateSymbolicLink(workshop.PathOf("spectra/demo/linked.film.yaml"), workshop.PathOf("outside/new.film.yaml"));
        await using var desk = await OpenDesk.StartAsync(workshop);
        (await desk.PostAsync("report", OpenDesk.Request(more: ("name", "r")))).Refused(HttpStatusCode.UnprocessableEntity);
        (await desk.PostAsync("save", OpenDesk.Request(more: ("name", "linked")))).Refused(HttpStatusCode.UnprocessableEntity);
        Assert.Empty(Directory.EnumerateFileSystemEntries(workshop.PathOf("outside")));
    }

    [Fact]
    public async Task Report_IsTheCommandsByteForByte_AndCanBeRead()
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        var made = (await desk.PostAsync("report", OpenDesk.Request(OpenDesk.Fields((OpenDesk.Thickness, "80")), more: ("name", "thin")))).Granted();
        workshop.Run("report", OpenDesk.Film, "--model", "beer-lambert", "--set", $"{OpenDesk.Thickness}=80", "--out", "r").AssertDone();
        string[] files = [.. made["files"]!.AsArray().Select(file => (string)file!)];
        Assert.Contains("report.html", files, StringComparer.Ordinal);
        foreach (string file in files)
        {
            byte[] expected = await File.ReadAllBytesAsync(workshop.PathOf($"r/{file}"), TestContext.Current.CancellationToken);
            Assert.Equal(expected, await File.ReadAllBytesAsync(workshop.PathOf($"spectra/demo/reports/thin/{file}"), TestContext.Current.CancellationToken));
            Assert.Equal(expected, (await desk.GetAsync($"report/thin/{file}")).Bytes);
        }

        Assert.Equal(HttpStatusCode.NotFound, (await desk.GetAsync("report/thin/dotcoat-files.txt")).Status);
        Assert.Equal(HttpStatusCode.NotFound, (await desk.GetAsync("report/other/report.html")).Status);
        // A person's file in the way stands.
        workshop.Write("spectra/demo/reports/thin/report.html", "mine");
        (await desk.PostAsync("report", OpenDesk.Request(more: ("name", "thin")))).Refused(HttpStatusCode.UnprocessableEntity);
        Assert.Equal("mine", workshop.Read("spectra/demo/reports/thin/report.html"));
    }

    [Fact]
    public async Task Drop_OfASpectrum_ChangesTheLotAsTheFileWould()
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        foreach (string quantity in (string[])["emission", "absorbance"])
        {
            string file = $"green-k11-{quantity}.csv";
            var dropped = (await desk.DropAsync("../../My File.csv", workshop.Read($"spectra/demo/{file}") + (quantity == "emission" ? "# dropped\n" : ""))).Granted();
            Assert.Equal(quantity, (string)dropped["quantity"]!);
            var request = OpenDesk.Request();
            request["state"]!["spectra"]![$"lots[green K07].{quantity}"] = (string)dropped["name"]!;
            var solved = (await desk.PostAsync("solve", request)).Granted();
            string printed = workshop.Run("simulate", OpenDesk.Film, "--model", "beer-lambert", "--set", $"lots[green K07].{quantity}={file}").AssertDone().Output;
            Assert.Contains((string)solved["answer"]!, printed.ReplaceLineEndings(" "), StringComparison.Ordinal);
            Assert.Equal(quantity == "emission" ? "my-file.csv" : "my-file-2.csv", (string)dropped["name"]!);
            Assert.False(File.Exists(workshop.PathOf($"spectra/demo/{(string)dropped["name"]!}")));
        }
    }

    [Theory]
    [InlineData("nothing", "first column")]
    [InlineData("wavelength_nm,transmittance\n400,0.5\n700,0.5\n", "a lot takes")]
    [InlineData("wavelength_nm,power_per_nm\n400,1\n500,many\n", "many")]
    [InlineData("angle_deg,radiance\n0,1\n90,1\n", "a lot takes")]
    public async Task Drop_OfWhatIsNoSpectrumOfALot_IsRefusedWithItsLine(string text, string said)
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        var faults = (await desk.DropAsync("x.csv", text)).Refused(HttpStatusCode.UnprocessableEntity);
        Assert.Contains(faults, fault => fault.Message.Contains(said, StringComparison.Ordinal));
    }

    [Fact]
    public async Task UnsavedFilm_OfAStoppedRun_IsOfferedWithItsDroppedFile_AndGoesWhenSavedOrDiscarded()
    {
        using var workshop = Workshop.WithDemo();
        string answer;
        await using (var desk = await OpenDesk.StartAsync(workshop))
        {
            var dropped = (await desk.DropAsync("trial.csv", workshop.Read("spectra/demo/green-k11-emission.csv") + "# dropped\n")).Granted();
            var request = OpenDesk.Request(OpenDesk.Fields((OpenDesk.Green, "8")));
            request["state"]!["spectra"]!["lots[green K07].emission"] = (string)dropped["name"]!;
            answer = (string)(await desk.PostAsync("solve", request)).Granted()["answer"]!;
            (await desk.PostAsync("solve", OpenDesk.Request(OpenDesk.Fields((OpenDesk.Green, "9")), OtherTab))).Granted();
        }

        Assert.Equal(2, workshop.Files().Count(file => file.Contains(".unsaved-", StringComparison.Ordinal)));
        await using (var desk = await OpenDesk.StartAsync(workshop))
        {
            var offers = (await desk.GetAsync("film")).Granted()["unsaved"]!.AsArray();
            Assert.Equal(2, offers.Count);
            var left = offers.Single(offer => (string)offer!["tab"]! == OpenDesk.Tab)!;
            var request = OpenDesk.Request(tab: "aaaaaaaaaaaaaaaa");
            request["state"] = left["state"]!.DeepClone();
            Assert.Equal(answer, (string)(await desk.PostAsync("solve", request)).Granted()["answer"]!);
            foreach (string tab in (string[])[OpenDesk.Tab, OtherTab])
                Assert.Equal(HttpStatusCode.NoContent, (await desk.DeleteAsync($"unsaved/{tab}")).Status);
            request["name"] = "taken up";
            (await desk.PostAsync("save", request)).Granted();
        }

        Assert.DoesNotContain(workshop.Files(), file => file.Contains(".unsaved-", StringComparison.Ordinal));
        Assert.True(File.Exists(workshop.PathOf("spectra/demo/trial.csv")));
        workshop.Run("simulate", "spectra/demo/taken up.film.yaml", "--model", "beer-lambert").AssertDone();
    }

    [Theory]
    [InlineData("{")]
    [InlineData("{}")]
    [InlineData("""{"tab":"0123456789abcdef","state":{"fields":null,"spectra":null},"dropped":[]}""")]
    [InlineData("""{"tab":"ffffffffffffffff","state":{"fields":{},"spectra":{}},"dropped":[]}""")]
    public async Task RecoveryFile_ThatIsBroken_IsLeftAlone(string text)
    {
        using var workshop = Workshop.WithDemo();
        const string file = "spectra/demo/.desk-monitor.film.yaml.unsaved-0123456789abcdef.json";
        workshop.Write(file, text);
        await using (var desk = await OpenDesk.StartAsync(workshop))
            Assert.Empty((await desk.GetAsync("film")).Granted()["unsaved"]!.AsArray());
        Assert.Equal(text, workshop.Read(file));
    }

    [Fact]
    public async Task Pages_AskingAtOnce_HaveEachTheirOwnAnswer()
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop, model: FilmModels.Named(FilmModels.Default, new(null, false, null, null)));
        string[] loadings = [.. Enumerable.Range(0, 12).Select(i => $"{4 + (i * 0.5)}")];
        var alone = new List<string>();
        foreach (string loading in loadings)
            alone.Add((string)(await desk.PostAsync("solve", OpenDesk.Request(OpenDesk.Fields((OpenDesk.Green, loading))))).Granted()["answer"]!);
        var atOnce = await Task.WhenAll(loadings.Select((loading, i) => desk.PostAsync("solve", OpenDesk.Request(OpenDesk.Fields((OpenDesk.Green, loading)), $"{i:x16}"))));
        Assert.Equal(alone, atOnce.Select(answer => (string)answer.Granted()["answer"]!).ToList());
        Assert.Equal(12, alone.Distinct(StringComparer.Ordinal).Count());
    }
}
