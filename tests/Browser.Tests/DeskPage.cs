using System.Globalization;
using Dotcoat.Desk;
using Dotcoat.Tests.Commands;
using Microsoft.Playwright;

namespace Dotcoat.Browser.Tests;

/// <summary>A desk with the demo film on a page of the browser, as a user has it.</summary>
internal sealed class DeskPage : IAsyncDisposable
{
    public const string Film = "spectra/demo/desk-monitor.film.yaml";

    private readonly Workshop _workshop = Workshop.WithDemo();
    private readonly List<string> _complaints = [];
    private readonly List<string> _requests = [];
    private IBrowserContext? _window;
    private DeskSession? _session;
    private DeskServer? _server;

    private DeskPage()
    {
    }

    public Workshop Workshop => _workshop;

    public IPage Page { get; private set; } = null!;

    public Uri Address => new(_server!.Address);

    /// <summary>What the browser complained of, but for refusals that a test provokes.</summary>
    public IReadOnlyList<string> Complaints => _complaints;

    /// <summary>Addresses that the page asked for.</summary>
    public IReadOnlyList<string> Requests => _requests;

    public static async Task<DeskPage> OpenAsync(Browser browser, int width = 1280, int height = 720, bool isDark = false, bool isTablet = false)
    {
        var desk = new DeskPage();
        desk._window = await browser.WindowAsync(width, height, isDark, isTablet);
        await desk.StartAsync();
        desk.Page = await desk.LoadAsync();
        return desk;
    }

    /// <summary>Stops the program, as Ctrl-C does.</summary>
    public async Task StopAsync()
    {
        if (_server is not null)
            await _server.DisposeAsync();
        _session?.Dispose();
        (_server, _session) = (null, null);
    }

    /// <summary>Starts the program.</summary>
    public async Task StartAsync()
    {
        _session = new(Film, _workshop.PathOf(Film), FilmModels.Named(FilmModels.Default, new(null, Angles: false, null, null)));
        _server = await DeskServer.StartAsync(_session, 0, TestContext.Current.CancellationToken);
    }

    /// <summary>One more page of the same desk.</summary>
    public async Task<IPage> LoadAsync()
    {
        var page = await _window!.NewPageAsync();
        page.Console += (_, message) =>
        {
            if (message.Type is "error" or "warning" && !message.Text.Contains("status of 4", StringComparison.Ordinal))
                _complaints.Add(message.Text);
        };
        page.PageError += (_, error) => _complaints.Add(error);
        page.Request += (_, request) => _requests.Add(request.Url);
        await page.GotoAsync(_server!.Address);
        await ShownAsync(page);
        return page;
    }

    /// <summary>Waits until the page shows the film that its fields hold.</summary>
    public static Task ShownAsync(IPage page) => UntilAsync(page, "!!document.body.dataset.shown && document.body.dataset.shown === document.body.dataset.wanted");

    /// <summary>Waits for a condition. The page's own policy forbids the browser driver's way of waiting, which evaluates text.</summary>
    public static async Task UntilAsync(IPage page, string condition)
    {
        for (var until = DateTime.UtcNow.AddSeconds(60); DateTime.UtcNow < until;)
        {
            if (await page.EvaluateAsync<bool>(condition))
                return;
            await Task.Delay(20, TestContext.Current.CancellationToken);
        }

        Assert.Fail($"Not in a minute: {condition}");
    }

    public Task ShownAsync() => ShownAsync(Page);

    public async Task<string> TextAsync(string selector) => (await Page.Locator(selector).InnerTextAsync()).Trim();

    /// <summary>A figure of the film by its name.</summary>
    public async Task<string> FigureAsync(string name) =>
        await Page.Locator("#figures tbody tr").Filter(new() { HasText = name }).First.Locator("td").First.InnerTextAsync();

    public async Task<double> NumberAsync(string name) =>
        double.Parse((await FigureAsync(name)).TrimEnd('%', '\u2009', ' '), CultureInfo.InvariantCulture);

    public ILocator Field(string label) => Page.GetByLabel(label, new() { Exact = true });

    public ILocator Slider(string label) => Page.GetByLabel($"{label}, slider", new() { Exact = true });

    public ILocator Button(string name) => Page.GetByRole(AriaRole.Button, new() { Name = name, Exact = true });

    /// <summary>The answer's state: on or off target, or refused.</summary>
    public async Task<string?> StateAsync() => await Page.Locator("#answer").GetAttributeAsync("data-state");

    public async ValueTask DisposeAsync()
    {
        if (_window is not null)
            await _window.DisposeAsync();
        await StopAsync();
        _workshop.Dispose();
    }
}
