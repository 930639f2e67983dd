using Microsoft.Playwright;

[assembly: Xunit.v3.Parallelization(Mode = Xunit.Sdk.ParallelMode.None)]
[assembly: AssemblyFixture(typeof(Dotcoat.Browser.Tests.Browser))]

namespace Dotcoat.Browser.Tests;

/// <summary>One headless browser for all tests. Where there is none, tests are skipped by name, or fail where one is required.</summary>
public sealed class Browser : IAsyncLifetime
{
    // Set by .ci/run, which installs a browser: a skip there would hide that nothing was tested.
    private const string Required = "DOTCOAT_BROWSER_REQUIRED";

    private static readonly string[] Names = ["chromium", "chromium-browser", "google-chrome"];

    private IPlaywright? _playwright;
    private IBrowser? _browser;

    public async ValueTask InitializeAsync()
    {
        if (Executable() is not { } executable)
            return;
        _playwright?.Dispose();
        _playwright = await Playwright.CreateAsync();
        _browser = await _playwright.Chromium.LaunchAsync(new()
        {
            ExecutablePath = executable,
            Args = ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking", "--disable-component-update", "--disable-sync"],
        });
    }

    /// <summary>A window of its own, with its own storage.</summary>
    public async Task<IBrowserContext> WindowAsync(int width = 1280, int height = 720, bool isDark = false, bool isTablet = false)
    {
        if (_browser is null && Environment.GetEnvironmentVariable(Required) is "1")
            Assert.Fail("A browser is required here, and none of chromium, chromium-browser, google-chrome is on the PATH.");
        if (_browser is null)
            Assert.Skip("No browser: none of chromium, chromium-browser, google-chrome is on the PATH.");
        return await _browser.NewContextAsync(new()
        {
            ViewportSize = new() { Width = width, Height = height },
            ColorScheme = isDark ? ColorScheme.Dark : ColorScheme.Light,
            HasTouch = isTablet,
            ReducedMotion = ReducedMotion.Reduce,
        });
    }

    public async ValueTask DisposeAsync()
    {
        if (_browser is not null)
            await _browser.DisposeAsync();
        _playwright?.Dispose();
    }

    private static string? Executable() => (Environment.GetEnvironmentVariable("PATH") ?? "").Split(Path.PathSeparator)
        .SelectMany(folder => Names.Select(name => Path.Combine(folder, name)))
        .FirstOrDefault(File.Exists);
}
