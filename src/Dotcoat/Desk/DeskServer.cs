using System.Net;
using System.Security.Cryptography;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Hosting;
using Microsoft.AspNetCore.Hosting.Server;
using Microsoft.AspNetCore.Hosting.Server.Features;
using Microsoft.AspNetCore.Server.Kestrel.Core;
using Microsoft.Extensions.DependencyInjection;

namespace Dotcoat.Desk;

/// <summary>Serves the page of one session on the loopback interface, under an address that holds a secret of this run.</summary>
internal sealed class DeskServer : IAsyncDisposable
{
    private const int TokenBytes = 24;
    private const int MostConnections = 64;

    private readonly WebApplication _application;

    private readonly RequestGuard _guard;
    private readonly DeskEndpoints _endpoints;
    private readonly string _token = Convert.ToHexStringLower(RandomNumberGenerator.GetBytes(TokenBytes));

    private DeskServer(WebApplication application, DeskSession session)
    {
        _application = application;
        _guard = new(_token);
        _endpoints = new(session, _token);
    }

    /// <summary>Address of the page, with the run's token.</summary>
    public string Address => $"http://127.0.0.1:{_guard.Port}/{_token}/";

    /// <summary>Starts listening.</summary>
    /// <param name="session">What is served.</param>
    /// <param name="port">0 takes a free one.</param>
    /// <param name="cancellationToken">Gives up starting.</param>
    /// <exception cref="IOException">The port is in use.</exception>
    public static async Task<DeskServer> StartAsync(DeskSession session, int port, CancellationToken cancellationToken)
    {
        // Empty: no setting of the environment or of a file in the current folder can make it listen elsewhere.
        var builder = WebApplication.CreateEmptyBuilder(new WebApplicationOptions());
        builder.WebHost.UseKestrelCore().ConfigureKestrel(options =>
        {
            options.AddServerHeader = false;
            options.Limits.MaxConcurrentConnections = MostConnections;
            options.Limits.MaxRequestBodySize = DroppedSpectra.MostBytes;
            options.Limits.MaxRequestHeadersTotalSize = 16 * 1024;
            options.Limits.MaxRequestLineSize = 4 * 1024;
            options.Listen(IPAddress.Loopback, port, listen => listen.Protocols = HttpProtocols.Http1);
        });
        var server = new DeskServer(builder.Build(), session);
        try
        {
            await server.ListenAsync(cancellationToken).ConfigureAwait(false);
            return server;
        }
        catch
        {
            await server.DisposeAsync().ConfigureAwait(false);
            throw;
        }
    }

    public async ValueTask DisposeAsync()
    {
        // Whoever still waits for an answer is let go: the session is about to close.
        using var soon = new CancellationTokenSource(TimeSpan.FromSeconds(1));
        await _application.StopAsync(soon.Token).ConfigureAwait(false);
        await _application.DisposeAsync().ConfigureAwait(false);
    }

    private async Task ListenAsync(CancellationToken cancellationToken)
    {
        _application.Run(async context =>
        {
            if (!await _guard.RefuseAsync(context).ConfigureAwait(false))
                await _endpoints.AnswerAsync(context).ConfigureAwait(false);
        });
        await _application.StartAsync(cancellationToken).ConfigureAwait(false);
        string listening = _application.Services.GetRequiredService<IServer>().Features.Get<IServerAddressesFeature>()!.Addresses.First();
        _guard.Port = new Uri(listening).Port;
    }
}
