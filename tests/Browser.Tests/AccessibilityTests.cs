using Deque.AxeCore.Playwright;
using Microsoft.Playwright;

namespace Dotcoat.Browser.Tests;

/// <summary>Everyone can use the page: audited, by keyboard alone, on small screens and in both themes.</summary>
public sealed class AccessibilityTests(Browser browser)
{
    [Theory]
    [InlineData(1280, 720, false)]
    [InlineData(1280, 720, true)]
    [InlineData(820, 1180, true)]
    public async Task Audit_FindsNothingSerious(int width, int height, bool isDark)
    {
        await using var desk = await DeskPage.OpenAsync(browser, width, height, isDark, isTablet: width < 1000);
        if (width < 1100)
            await desk.Button("Inputs").ClickAsync();
        await desk.Field("Thickness").FillAsync("-1");
        await Assertions.Expect(desk.Field("Thickness")).ToHaveAttributeAsync("aria-invalid", "true");
        await AuditAsync(desk.Page, "page with a fault");
        await desk.Field("Thickness").FillAsync("80");
        await desk.ShownAsync();
        if (width < 1100)
            await desk.Page.Keyboard.PressAsync("Escape");
        await desk.Button("Pin").ClickAsync();
        await AuditAsync(desk.Page, "page with a pin");
        foreach (string dialog in (string[])["save", "report", "trace"])
        {
            await desk.Page.Locator($"#{dialog}").ClickAsync();
            await AuditAsync(desk.Page, $"{dialog} dialog");
            await desk.Page.Keyboard.PressAsync("Escape");
        }
    }

    [Fact]
    public async Task KeyboardAlone_ChangesAField_FormulatesAndSaves()
    {
        await using var desk = await DeskPage.OpenAsync(browser);
        await TabToAsync(desk.Page, "Thickness, slider");
        string before = await desk.FigureAsync("blue leakage");
        for (int i = 0; i < 5; i++)
            await desk.Page.Keyboard.PressAsync("ArrowRight");
        await desk.ShownAsync();
        Assert.NotEqual(before, await desk.FigureAsync("blue leakage"), StringComparer.Ordinal);
        await TabToAsync(desk.Page, "Scattering");
        await desk.Page.Keyboard.PressAsync("Control+A");
        await desk.Page.Keyboard.TypeAsync("22");
        await desk.Page.Keyboard.PressAsync("Enter");
        await desk.ShownAsync();
        Assert.Equal("off", await desk.StateAsync());
        await TabToAsync(desk.Page, "White to target", back: true);
        await desk.Page.Keyboard.PressAsync("Enter");
        await Assertions.Expect(desk.Page.Locator("#answer")).ToHaveAttributeAsync("data-state", "on", new() { Timeout = 60_000 });
        await TabToAsync(desk.Page, "u′v′ 1976");
        string diagram = await desk.Page.Locator("#diagram svg title").TextContentAsync() ?? "";
        await desk.Page.Keyboard.PressAsync("ArrowRight");
        await Assertions.Expect(desk.Page.Locator("#diagram svg title")).Not.ToHaveTextAsync(diagram);
        await desk.Page.Keyboard.PressAsync("Control+S");
        await desk.Page.Keyboard.TypeAsync("by keyboard");
        await desk.Page.Keyboard.PressAsync("Enter");
        await Assertions.Expect(desk.Page.Locator("#message")).ToHaveTextAsync("Saved as by keyboard.film.yaml.");
        await desk.Page.Keyboard.PressAsync("Control+Z");
        await desk.ShownAsync();
        Assert.Equal("off", await desk.StateAsync());
    }

    [Fact]
    public async Task EveryControl_HasANameAndAPlaceOnTheScreen()
    {
        foreach (var (width, height) in ((int, int)[])[(1280, 720), (1024, 768), (820, 1180)])
        {
            await using var desk = await DeskPage.OpenAsync(browser, width, height);
            if (width < 1100)
                await desk.Button("Inputs").ClickAsync();
            string[] nameless = await desk.Page.EvaluateAsync<string[]>(
                "[...document.querySelectorAll('input, button')].filter(one => !one.labels?.length && !one.getAttribute('aria-label') && !one.textContent.trim()).map(one => one.outerHTML)");
            Assert.Empty(nameless);
            Assert.True(await desk.Page.EvaluateAsync<bool>("document.documentElement.scrollWidth <= innerWidth"), $"{width} px: the page is wider than the screen.");
            Assert.True(await desk.Page.EvaluateAsync<bool>("[...document.querySelectorAll('header button')].filter(one => one.offsetParent).every(one => one.getBoundingClientRect().right <= innerWidth)"));
        }
    }

    [Fact]
    public async Task Page_AsksNoOtherMachine_AndIsLight()
    {
        await using var desk = await DeskPage.OpenAsync(browser);
        Assert.All(desk.Requests, url => Assert.StartsWith(desk.Address.ToString(), url, StringComparison.Ordinal));
        Assert.True(desk.Requests.Count >= 8, string.Join('\n', desk.Requests));
        Assert.Empty(desk.Complaints);
        double bytes = await desk.Page.EvaluateAsync<double>("performance.getEntries().filter(one => one.transferSize).reduce((sum, one) => sum + one.transferSize, 0)");
        Assert.InRange(bytes, 20_000, 300_000);
    }

    private static async Task AuditAsync(IPage page, string what)
    {
        var result = await page.RunAxe();
        var serious = result.Violations.Where(one => one.Impact is "serious" or "critical").ToList();
        Assert.True(serious.Count == 0, $"{what}: {string.Join('\n', serious.Select(one => $"{one.Id}: {one.Help}: {string.Join(" | ", one.Nodes.Select(node => node.Html))}"))}");
        Assert.True(result.Passes.Length > 10, "The audit looked at nothing.");
    }

    private static async Task TabToAsync(IPage page, string name, bool back = false)
    {
        for (int i = 0; i < 80; i++)
        {
            await page.Keyboard.PressAsync(back ? "Shift+Tab" : "Tab");
            string? focused = await page.EvaluateAsync<string?>(
                "(document.activeElement?.getAttribute('aria-label') ?? document.activeElement?.labels?.[0]?.textContent ?? document.activeElement?.textContent ?? '').trim()");
            if (focused == name)
                return;
        }

        Assert.Fail($"80 presses of Tab do not reach '{name}'.");
    }
}
