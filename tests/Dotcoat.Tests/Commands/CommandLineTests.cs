using System.Text.Json.Nodes;
using FilmOptics;

namespace Dotcoat.Tests.Commands;

public sealed class CommandLineTests
{
    private const string Film = "spectra/demo/desk-monitor.film.yaml";

    [Fact]
    public void Version_IsNameAndNumber()
    {
        using var workshop = new Workshop();
        string[] words = workshop.Run("--version").AssertDone().Output.TrimEnd().Split(' ');
        Assert.Equal(["dotcoat", Version.Parse(words[1]).ToString(3)], words);
    }

    [Theory]
    [InlineData("")]
    [InlineData("simulate")]
    [InlineData("formulate")]
    [InlineData("inspect")]
    [InlineData("report")]
    [InlineData("start")]
    public void Help_OfEveryCommand_ListsTheExitStatuses(string command)
    {
        using var workshop = new Workshop();
        var outcome = workshop.Run([.. command.Split(' ', StringSplitOptions.RemoveEmptyEntries), "--help"]).AssertDone().AssertPlain();
        foreach (string status in (string[])["0    done", "1    done, but", "2    bad input", "3    a numerical", "130  interrupted"])
            Assert.Contains(status, outcome.Output, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("'simulat' is no command; there are simulate", "simulat", "x")]
    [InlineData("Required command", "")]
    [InlineData("Required argument 'FILE'", "simulate")]
    [InlineData("'guess'", "simulate", "x", "--model", "guess")]
    [InlineData("KEY=VALUE is expected", "simulate", "x", "--set", "a")]
    [InlineData("--colour", "simulate", "x", "--colour")]
    [InlineData("Required argument missing for option: '--out'", "inspect", "x", "--out")]
    public void WrongUsage_IsToldOnStandardErrorAlone(string expected, params string[] arguments)
    {
        using var workshop = new Workshop();
        var outcome = workshop.Run([.. arguments.Where(a => a.Length > 0)]);
        Assert.Equal(2, outcome.Status);
        Assert.Equal("", outcome.Output);
        Assert.Contains(expected, outcome.Error, StringComparison.Ordinal);
        Assert.InRange(outcome.ErrorLines.Length, 1, 2);
    }

    [Fact]
    public void AnAtSign_IsAFileNameLikeAnyOther()
    {
        using var workshop = new Workshop();
        Assert.Contains("@list", workshop.Run("simulate", "@list").AssertRefused().Error, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("simulate", "spectra/demo/desk-monitor.film.yaml", "--out", "result")]
    [InlineData("formulate", "spectra/demo/desk-monitor.film.yaml", "--out", "result", "--save", "spectra/demo/new.film.yaml")]
    [InlineData("report", "spectra/demo/desk-monitor.film.yaml", "--out", "result")]
    [InlineData("inspect", "spectra/demo/led-blue-447.csv", "--out", "result")]
    [InlineData("start", "result")]
    public void Interrupted_LeavesNothing(params string[] arguments)
    {
        using var workshop = Workshop.WithDemo();
        var before = workshop.Files();
        var outcome = workshop.Run(new CancellationToken(canceled: true), arguments);
        Assert.Equal(130, outcome.Status);
        Assert.Equal("", outcome.Output);
        Assert.Equal(before, workshop.Files());
        Assert.False(Directory.Exists(workshop.PathOf("result")));
    }

    [Fact]
    public async Task TracingInterrupted_KeepsWhatWasTracedAndSaysSo()
    {
        using var workshop = Workshop.WithDemo();
        using var stop = new CancellationTokenSource();
        var run = Task.Run(
            () => workshop.Run(stop.Token, "simulate", Film, "--model", "monte-carlo", "--photons", "100000000000", "--zone-mm", "20", "--json", "--out", "result"),
            TestContext.Current.CancellationToken);
        await Task.Delay(TimeSpan.FromSeconds(2), TestContext.Current.CancellationToken);
        await stop.CancelAsync();
        var outcome = await run;
        Assert.Equal(130, outcome.Status);
        Assert.Equal(outcome.Output, workshop.Read("result/simulate.json"));
        var document = JsonNode.Parse(outcome.Output)!;
        Assert.Equal(1, (double)document["photons"]!["sum"]!, 1e-9);
        Assert.InRange((double)document["standard_error"]!["converted"]!, 1e-6, 0.1);
        string[] warnings = [.. document["warnings"]!.AsArray().Select(warning => (string)warning!)];
        Assert.Contains(warnings, warning => warning.Contains("interrupted", StringComparison.OrdinalIgnoreCase) && warning.Contains("100,000,000,000", StringComparison.Ordinal));
        Assert.Contains(warnings, warning => warning.Contains("--zone-mm", StringComparison.Ordinal));
    }

    [Fact]
    public void TracingNews_SayHowFarAndHowSure()
    {
        var news = new TracingNews();
        Assert.Equal("", news.ToString());
        news.Report(new TracingProgress(1_000_000, 4_000_000, 0.00021));
        Assert.Equal("25 % of 4,000,000 photons, standard error 0.021 % so far; Ctrl-C keeps what is traced", news.ToString());
    }

    [Theory]
    [InlineData("simulate")]
    [InlineData("formulate")]
    [InlineData("report")]
    [InlineData("inspect")]
    public void MissingFile_IsOneLine(string command)
    {
        using var workshop = new Workshop();
        var outcome = workshop.Run(command, "nowhere.film.yaml").AssertRefused();
        Assert.StartsWith("nowhere.film.yaml", outcome.Error, StringComparison.Ordinal);
    }
}
