using System.Net;
using System.Net.Http.Headers;
using System.Net.Http.Json;
using System.Text;
using System.Text.Json.Nodes;
using Dotcoat.Desk;
using Dotcoat.Tests.Commands;
using FilmOptics;

namespace Dotcoat.Tests.Desk;

/// <summary>A desk that listens on a free port of this machine, with a client that asks as the page does.</summary>
internal sealed class OpenDesk : IAsyncDisposable
{
    public const string Film = "spectra/demo/desk-monitor.film.yaml";
    public const string Green = "layers[dot layer].dots[green K07].loading_mg_per_ml";
    public const string Thickness = "layers[dot layer].thickness_um";
    public const string Tab = "0123456789abcdef";

    private readonly HttpClient _client = new();
    private readonly DeskSession _session;
    private DeskServer? _server;

    private OpenDesk(string film, string path, IFilmModel model) => _session = new DeskSession(film, path, model);

    public DeskSession Session => _session;

    public Uri Address => new(_server!.Address);

    /// <summary>Opens the desk; the quick model keeps tests quick unless another is asked for.</summary>
    public static async Task<OpenDesk> StartAsync(Workshop workshop, string film = Film, IFilmModel? model = null)
    {
        var desk = new OpenDesk(film, workshop.PathOf(film), model ?? new BeerLambertModel());
        desk._server = await DeskServer.StartAsync(desk.Session, 0, TestContext.Current.CancellationToken);
        return desk;
    }

    /// <summary>A page's request.</summary>
    public static JsonObject Request(IReadOnlyDictionary<string, string>? fields = null, string tab = Tab, params (string Key, JsonNode Value)[] more)
    {
        var request = new JsonObject
        {
            ["tab"] = tab,
            ["state"] = new JsonObject
            {
                ["fields"] = new JsonObject((fields ?? new Dictionary<string, string>(StringComparer.Ordinal)).Select(f => KeyValuePair.Create(f.Key, (JsonNode?)f.Value))),
                ["spectra"] = new JsonObject(),
            },
        };
        foreach (var (key, value) in more)
            request[key] = value;
        return request;
    }

    public static Dictionary<string, string> Fields(params (string Key, string Value)[] fields) => fields.ToDictionary(f => f.Key, f => f.Value, StringComparer.Ordinal);

    public Task<Answer> GetAsync(string path) => SendAsync(HttpMethod.Get, path, null);

    public Task<Answer> DeleteAsync(string path) => SendAsync(HttpMethod.Delete, path, null);

    public async Task<Answer> PostAsync(string path, JsonObject body)
    {
        using var content = JsonContent.Create(body);
        return await SendAsync(HttpMethod.Post, path, content);
    }

    public async Task<Answer> PostAsync(string path, HttpContent content) => await SendAsync(HttpMethod.Post, path, content);

    public async Task<Answer> DropAsync(string name, string text)
    {
        using var content = new StringContent(text, Encoding.UTF8, "text/csv");
        return await SendAsync(HttpMethod.Post, $"spectrum?name={Uri.EscapeDataString(name)}", content);
    }

    public async Task<Answer> SendAsync(HttpRequestMessage request)
    {
        using var response = await _client.SendAsync(request, TestContext.Current.CancellationToken);
        byte[] bytes = await response.Content.ReadAsByteArrayAsync(TestContext.Current.CancellationToken);
        return new(response.StatusCode, response.Headers, response.Content.Headers, bytes);
    }

    private async Task<Answer> SendAsync(HttpMethod method, string path, HttpContent? content)
    {
        using var request = new HttpRequestMessage(method, new Uri(Address, path)) { Content = content };
        return await SendAsync(request);
    }

    public async ValueTask DisposeAsync()
    {
        _client.Dispose();
        if (_server is not null)
            await _server.DisposeAsync();
        _session.Dispose();
    }
}

/// <summary>What came back.</summary>
internal sealed record Answer(HttpStatusCode Status, HttpResponseHeaders Headers, HttpContentHeaders ContentHeaders, byte[] Bytes)
{
    public string Text => Encoding.UTF8.GetString(Bytes);

    public JsonNode Json => JsonNode.Parse(Bytes)!;

    /// <summary>The answer of a request that was granted.</summary>
    public JsonNode Granted()
    {
        Assert.True(Status == HttpStatusCode.OK, $"{Status}: {Text}");
        return Json;
    }

    /// <summary>The faults of a request that was refused.</summary>
    public (string? Field, string Message)[] Refused(HttpStatusCode status)
    {
        Assert.True(Status == status, $"{Status}: {Text}");
        Assert.DoesNotContain("   at ", Text, StringComparison.Ordinal);
        return [.. Json["faults"]!.AsArray().Select(fault => ((string?)fault!["field"], (string)fault["message"]!))];
    }
}
