using System.Text.Json.Nodes;
using Microsoft.Playwright;

namespace Dotcoat.Browser.Tests;

/// <summary>What a user does on the page, in a real browser with the exact model.</summary>
public sealed class DeskPageTests(Browser browser)
{
    [Fact]
    public async Task Slider_Moved_ChangesFiguresAndChartsToTheCommands()
    {
        await using var desk = await DeskPage.OpenAsync(browser);
        string before = await desk.FigureAsync("blue leakage"), chart = await desk.Page.Locator("#spectrum svg").InnerHTMLAsync();
        Assert.Equal("on", await desk.StateAsync());
        await desk.Slider("Thickness").FillAsync("130");
        await desk.ShownAsync();
        Assert.Equal("130", await desk.Field("Thickness").InputValueAsync());
        Assert.NotEqual(before, await desk.FigureAsync("blue leakage"), StringComparer.Ordinal);
        Assert.NotEqual(chart, await desk.Page.Locator("#spectrum svg").InnerHTMLAsync(), StringComparer.Ordinal);
        Assert.Equal("off", await desk.StateAsync());
        var printed = JsonNode.Parse(desk.Workshop.Run("simulate", DeskPage.Film, "--json", "--set", "layers[dot layer].thickness_um=130").AssertDone().Output)!;
        Assert.Equal(Math.Round((double)printed["panel"]!["white"]!["x"]!, 4), await desk.NumberAsync("Panel white x"));
        Assert.Equal(Math.Round(100 * (double)printed["efficiency"]!["blue_leakage_photons"]!, 2), await desk.NumberAsync("blue leakage"));
        Assert.Empty(desk.Complaints);
    }

    [Fact]
    public async Task ToTarget_AfterAChange_PutsWhiteBackAndCanBeUndone()
    {
        await using var desk = await DeskPage.OpenAsync(browser);
        await desk.Field("Scattering").FillAsync("25");
        await desk.Field("Scattering").PressAsync("Tab");
        await desk.ShownAsync();
        Assert.Equal("off", await desk.StateAsync());
        string loading = await desk.Field("Loading green K07").InputValueAsync();
        await desk.Button("White to target").ClickAsync();
        await Assertions.Expect(desk.Page.Locator("#answer")).ToHaveAttributeAsync("data-state", "on", new() { Timeout = 60_000 });
        Assert.StartsWith("White is on target", await desk.TextAsync("#message"), StringComparison.Ordinal);
        Assert.NotEqual(loading, await desk.Field("Loading green K07").InputValueAsync(), StringComparer.Ordinal);
        await desk.Button("Undo").ClickAsync();
        await desk.ShownAsync();
        Assert.Equal(loading, await desk.Field("Loading green K07").InputValueAsync());
        Assert.Equal("25", await desk.Field("Scattering").InputValueAsync());
        Assert.Equal("off", await desk.StateAsync());
        await desk.Button("Redo").ClickAsync();
        await desk.ShownAsync();
        Assert.Equal("on", await desk.StateAsync());
    }

    [Fact]
    public async Task WrongNumber_IsSaidAtItsField_AndMovesNothing()
    {
        await using var desk = await DeskPage.OpenAsync(browser);
        var below = desk.Field("Scattering");
        var place = await below.BoundingBoxAsync();
        foreach (var (text, said) in ((string, string)[])[("-5", "above 0"), ("many", "no number")])
        {
            await desk.Field("Thickness").FillAsync(text);
            await Assertions.Expect(desk.Field("Thickness")).ToHaveAttributeAsync("aria-invalid", "true");
            await Assertions.Expect(desk.Page.Locator(".field:has(input[aria-invalid]) .fault")).ToContainTextAsync(said);
            Assert.Equal((place!.X, place.Y), ((await below.BoundingBoxAsync())!.X, (await below.BoundingBoxAsync())!.Y));
        }

        await desk.Field("Thickness").FillAsync("90");
        await desk.ShownAsync();
        Assert.Equal(0, await desk.Page.Locator("[aria-invalid]").CountAsync());
        Assert.Equal("on", await desk.StateAsync());
    }

    [Fact]
    public async Task DroppedSpectrum_IsTried_SavedBesideTheFilm_AndTakenBack()
    {
        await using var desk = await DeskPage.OpenAsync(browser);
        string before = await desk.FigureAsync("BT.2020, u′v′");
        string csv = desk.Workshop.Read("spectra/demo/green-k11-emission.csv");
        await desk.Page.EvaluateAsync(
            """
            ([text, name]) => {
              const data = new DataTransfer();
              data.items.add(new File([text], name, { type: 'text/csv' }));
              const lot = [...document.querySelectorAll('details.group')].find(one => one.querySelector('summary').textContent === 'Lot green K07');
              for (const kind of ['dragover', 'drop']) lot.dispatchEvent(new DragEvent(kind, { dataTransfer: data, bubbles: true, cancelable: true }));
            }
            """,
            new[] { csv, "Trial 7 (new).csv" });
        await Assertions.Expect(desk.Page.Locator(".spectra li")).ToContainTextAsync("emission: trial-7--new.csv");
        await desk.ShownAsync();
        Assert.NotEqual(before, await desk.FigureAsync("BT.2020, u′v′"), StringComparer.Ordinal);
        await desk.Button("Save…").ClickAsync();
        await desk.Page.Locator("#save-name").FillAsync("with trial 7");
        await desk.Page.Locator("#save-dialog button[value=go]").ClickAsync();
        await Assertions.Expect(desk.Page.Locator("#message")).ToHaveTextAsync("Saved as with trial 7.film.yaml.");
        Assert.Equal(csv, desk.Workshop.Read("spectra/demo/trial-7--new.csv"));
        string printed = desk.Workshop.Run("simulate", "spectra/demo/with trial 7.film.yaml").AssertDone().Output;
        Assert.Contains(await desk.TextAsync("#answer"), printed.ReplaceLineEndings(" "), StringComparison.Ordinal);
        await desk.Page.GetByRole(AriaRole.Button, new() { Name = "Back to the film file's emission of green K07" }).ClickAsync();
        await desk.ShownAsync();
        Assert.Equal(before, await desk.FigureAsync("BT.2020, u′v′"));
    }

    [Fact]
    public async Task Save_ThenReload_KeepsTheFilmUndoAndPins()
    {
        await using var desk = await DeskPage.OpenAsync(browser);
        await desk.Button("Pin").ClickAsync();
        await desk.Field("Loading red K23").FillAsync("2.5");
        await desk.Field("Loading red K23").PressAsync("Enter");
        await desk.ShownAsync();
        await desk.Page.Keyboard.PressAsync("Tab");
        await desk.Button("Save…").ClickAsync();
        await desk.Page.Locator("#save-dialog button[value=go]").ClickAsync();
        await Assertions.Expect(desk.Page.Locator("#message")).ToHaveTextAsync("Saved as desk-monitor-2.film.yaml.");
        Assert.Contains("# D65", desk.Workshop.Read("spectra/demo/desk-monitor-2.film.yaml"), StringComparison.Ordinal);
        string figure = await desk.FigureAsync("blue leakage");
        await desk.Page.ReloadAsync();
        await desk.ShownAsync();
        Assert.Equal("2.5", await desk.Field("Loading red K23").InputValueAsync());
        Assert.Equal(figure, await desk.FigureAsync("blue leakage"));
        Assert.Contains("pin 1", await desk.TextAsync("#figures thead"), StringComparison.Ordinal);
        Assert.Contains("saved", await desk.TextAsync("#file"), StringComparison.Ordinal);
        await desk.Button("Undo").ClickAsync();
        await desk.ShownAsync();
        Assert.Equal("1.895", await desk.Field("Loading red K23").InputValueAsync());
        await desk.Button("Use pin 1").ClickAsync();
        await desk.ShownAsync();
        Assert.Equal("on", await desk.StateAsync());
    }

    [Fact]
    public async Task UnsavedFilm_AfterTheProgramStopped_IsOfferedAtTheNextStart()
    {
        await using var desk = await DeskPage.OpenAsync(browser);
        await desk.Field("Thickness").FillAsync("77");
        await desk.Field("Thickness").PressAsync("Enter");
        await desk.ShownAsync();
        await desk.StopAsync();
        await desk.StartAsync();
        var page = await desk.LoadAsync();
        await page.GetByRole(AriaRole.Button, new() { Name = "Take it up" }).ClickAsync();
        await Assertions.Expect(page.GetByLabel("Thickness", new() { Exact = true })).ToHaveValueAsync("77");
        await Assertions.Expect(page.Locator("#offer")).ToBeHiddenAsync();
        Assert.Single(desk.Workshop.Files(), file => file.Contains("unsaved", StringComparison.Ordinal));
    }

    [Fact]
    public async Task TwoPages_HaveEachTheirOwnFilm()
    {
        await using var desk = await DeskPage.OpenAsync(browser);
        var other = await desk.LoadAsync();
        await desk.Field("Thickness").FillAsync("120");
        await other.GetByLabel("Thickness", new() { Exact = true }).FillAsync("60");
        await desk.ShownAsync();
        await DeskPage.ShownAsync(other);
        Assert.Equal("120", await desk.Field("Thickness").InputValueAsync());
        Assert.NotEqual(await desk.TextAsync("#answer"), await other.Locator("#answer").InnerTextAsync(), StringComparer.Ordinal);
        // The second to save under one name is told, and the first one's file stands.
        foreach (var page in (IPage[])[desk.Page, other])
        {
            await page.Locator("#save").ClickAsync();
            await page.Locator("#save-dialog button[value=go]").ClickAsync();
        }

        await Assertions.Expect(other.Locator("#save-name-fault")).ToContainTextAsync("is there already");
        Assert.Contains("thickness_um: 120", desk.Workshop.Read("spectra/demo/desk-monitor-2.film.yaml"), StringComparison.Ordinal);
    }

    [Fact]
    public async Task Report_MadeOnThePage_IsTheCommandsAndOpens()
    {
        await using var desk = await DeskPage.OpenAsync(browser);
        await desk.Button("Report…").ClickAsync();
        await desk.Page.Locator("#report-dialog button[value=go]").ClickAsync();
        var link = desk.Page.GetByRole(AriaRole.Link, new() { Name = "report.html" });
        await Assertions.Expect(link).ToBeVisibleAsync(new() { Timeout = 30_000 });
        var report = await desk.Page.Context.RunAndWaitForPageAsync(() => link.ClickAsync());
        await Assertions.Expect(report.GetByRole(AriaRole.Heading, new() { Level = 1 })).ToContainTextAsync("Desk monitor");
        desk.Workshop.Run("report", DeskPage.Film, "--out", "r").AssertDone();
        Assert.Equal(desk.Workshop.Read("r/report.html"), desk.Workshop.Read("spectra/demo/reports/desk-monitor/report.html"));
    }

    [Fact]
    public async Task Trace_ShowsProgress_CanBeStopped_AndAgreesWithTheExactFigures()
    {
        await using var desk = await DeskPage.OpenAsync(browser);
        await desk.Button("Trace photons…").ClickAsync();
        await desk.Page.Locator("#trace-photons").FillAsync("1000000000");
        await desk.Page.Locator("#trace-dialog button[value=go]").ClickAsync();
        await DeskPage.UntilAsync(desk.Page, "document.getElementById('trace-progress').value > 0");
        await desk.Button("Stop").ClickAsync();
        await Assertions.Expect(desk.Page.Locator("#trace-result table")).ToBeVisibleAsync(new() { Timeout = 30_000 });
        Assert.Contains("standard error", await desk.TextAsync("#trace-result thead"), StringComparison.Ordinal);
        await desk.Page.Locator("#trace-photons").FillAsync("50000");
        await desk.Page.Locator("#trace-dialog button[value=go]").ClickAsync();
        await Assertions.Expect(desk.Page.Locator("#trace-progress")).ToHaveJSPropertyAsync("value", 1, new() { Timeout = 30_000 });
        await Assertions.Expect(desk.Page.Locator("#trace-result")).ToContainTextAsync("leaves above unconverted");
    }
}
