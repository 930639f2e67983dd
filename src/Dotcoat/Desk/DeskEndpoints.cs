using System.Text.Json;
using Colorimetry;
using FilmOptics;
using Microsoft.AspNetCore.Http;

namespace Dotcoat.Desk;

/// <summary>What the page can ask for, below its token.</summary>
internal sealed class DeskEndpoints(DeskSession session, string token)
{
    // A film's changes are a few hundred bytes; a dropped spectrum may be as large as a file.
    private const int MostRequestBytes = 256 * 1024;

    /// <summary>Answers a request that the guard let through.</summary>
    public async Task AnswerAsync(HttpContext context)
    {
        try
        {
            await RouteAsync(context).ConfigureAwait(false);
        }
        catch (FieldException refused)
        {
            await RefuseAsync(context, StatusCodes.Status422UnprocessableEntity, refused.Faults).ConfigureAwait(false);
        }
        catch (InputException refused)
        {
            await RefuseAsync(context, StatusCodes.Status422UnprocessableEntity, [.. refused.Faults.Select(fault => new FieldFault(null, $"{Named(fault.File)}: {fault.Message}"))]).ConfigureAwait(false);
        }
        catch (NumericalFailureException failed)
        {
            await RefuseAsync(context, StatusCodes.Status422UnprocessableEntity, [new(null, failed.Message)]).ConfigureAwait(false);
        }
        catch (ConflictException conflict)
        {
            await RefuseAsync(context, StatusCodes.Status409Conflict, [new(null, conflict.Message)]).ConfigureAwait(false);
        }
        catch (BadHttpRequestException refused)
        {
            await RefuseAsync(context, refused.StatusCode, [new(null, refused.StatusCode == StatusCodes.Status413PayloadTooLarge ? "That is more than this page takes." : "The request is none that this page sends.")]).ConfigureAwait(false);
        }
        catch (JsonException)
        {
            await RefuseAsync(context, StatusCodes.Status400BadRequest, [new(null, "The request is none that this page sends.")]).ConfigureAwait(false);
        }
        catch (OperationCanceledException)
        {
            // The page has gone, or has asked anew.
        }
        catch (Exception failed) when (failed is IOException or UnauthorizedAccessException)
        {
            await RefuseAsync(context, StatusCodes.Status500InternalServerError, [new(null, failed.Message)]).ConfigureAwait(false);
        }
    }

    private async Task RouteAsync(HttpContext context)
    {
        var (request, stop) = (context.Request, context.RequestAborted);
        string path = request.Path.Value![(token.Length + 1)..];
        string[] parts = path.Split('/', StringSplitOptions.RemoveEmptyEntries);
        switch (request.Method, parts)
        {
            case ("GET", ["film"]):
                await SendAsync(context, session.Description).ConfigureAwait(false);
                break;
            case ("GET", ["ground", var theme, var chart]) when await session.GroundAsync(chart, theme == "dark", stop).ConfigureAwait(false) is { } ground:
                // The same for every film of this run: the browser may keep it.
                context.Response.Headers.CacheControl = "private, max-age=86400";
                await SendAsync(context, ground, "image/png").ConfigureAwait(false);
                break;
            case ("POST", ["solve"]):
                await SendAsync(context, await session.SolveAsync(await ReadAsync(request, stop).ConfigureAwait(false), stop).ConfigureAwait(false)).ConfigureAwait(false);
                break;
            case ("POST", ["formulate"]):
                await SendAsync(context, await session.FormulateAsync(await ReadAsync(request, stop).ConfigureAwait(false), stop).ConfigureAwait(false)).ConfigureAwait(false);
                break;
            case ("POST", ["save"]):
                await SendAsync(context, await session.SaveAsync(await ReadAsync(request, stop).ConfigureAwait(false), stop).ConfigureAwait(false)).ConfigureAwait(false);
                break;
            case ("POST", ["report"]):
                await SendAsync(context, await session.ReportAsync(await ReadAsync(request, stop).ConfigureAwait(false), stop).ConfigureAwait(false)).ConfigureAwait(false);
                break;
            case ("GET", ["report", var name, var file]) when session.ReportFile(name, file) is { } bytes:
                // The report's own page: its style stands in it, and it has no script.
                context.Response.Headers.ContentSecurityPolicy = "default-src 'none'; style-src 'unsafe-inline'; img-src 'self' data:; frame-ancestors 'none'";
                await SendAsync(context, bytes, PageFiles.TypeOf(file)).ConfigureAwait(false);
                break;
            case ("POST", ["trace"]):
                await SendAsync(context, session.Trace(await ReadAsync(request, stop).ConfigureAwait(false))).ConfigureAwait(false);
                break;
            case ("GET", ["trace", var id]) when await session.RunAsync(id, stop).ConfigureAwait(false) is { } run:
                await SendAsync(context, run).ConfigureAwait(false);
                break;
            case ("DELETE", ["trace", var id]) when session.Runs.Find(id) is { } run:
                run.Stop();
                context.Response.StatusCode = StatusCodes.Status204NoContent;
                break;
            case ("POST", ["spectrum"]):
                var dropped = session.Dropped.Add(request.Query["name"].ToString(), await BodyAsync(request, "text/csv", DroppedSpectra.MostBytes, stop).ConfigureAwait(false));
                await SendAsync(context, new { dropped.Name, dropped.Quantity, dropped.Words }).ConfigureAwait(false);
                break;
            case ("DELETE", ["unsaved", var tab]) when UnsavedFilms.IsTab(tab):
                session.Unsaved.Discard(tab);
                context.Response.StatusCode = StatusCodes.Status204NoContent;
                break;
            case ("GET", []) when path == "/":
                await SendAsync(context, PageFiles.Find("index.html")!, PageFiles.TypeOf("index.html")).ConfigureAwait(false);
                break;
            case ("GET", [var file]) when PageFiles.Find(file) is { } bytes:
                await SendAsync(context, bytes, PageFiles.TypeOf(file)).ConfigureAwait(false);
                break;
            default:
                await RefuseAsync(context, StatusCodes.Status404NotFound, [new(null, "There is nothing here.")]).ConfigureAwait(false);
                break;
        }
    }

    private static async Task<PageRequest> ReadAsync(HttpRequest request, CancellationToken stop) =>
        JsonSerializer.Deserialize<PageRequest>(await BodyAsync(request, "application/json", MostRequestBytes, stop).ConfigureAwait(false), DeskJson.Options)
            ?? throw new JsonException();

    // A plain form of another site cannot have these content types, and what is sent in pieces is counted too.
    private static async Task<byte[]> BodyAsync(HttpRequest request, string type, int mostBytes, CancellationToken stop)
    {
        if (request.ContentType?.Split(';')[0].Trim() != type)
            throw new BadHttpRequestException("type", StatusCodes.Status415UnsupportedMediaType);
        if (request.ContentLength > mostBytes)
            throw new BadHttpRequestException("size", StatusCodes.Status413PayloadTooLarge);
        using var body = new MemoryStream();
        byte[] piece = new byte[16 * 1024];
        int count;
        while ((count = await request.Body.ReadAsync(piece, stop).ConfigureAwait(false)) > 0)
        {
            if (body.Length + count > mostBytes)
                throw new BadHttpRequestException("size", StatusCodes.Status413PayloadTooLarge);
            body.Write(piece, 0, count);
        }

        return body.ToArray();
    }

    private static Task SendAsync(HttpContext context, object answer) =>
        SendAsync(context, JsonSerializer.SerializeToUtf8Bytes(answer, DeskJson.Options), "application/json; charset=utf-8");

    private static async Task SendAsync(HttpContext context, byte[] bytes, string type)
    {
        context.Response.ContentType = type;
        context.Response.ContentLength = bytes.Length;
        await context.Response.Body.WriteAsync(bytes, context.RequestAborted).ConfigureAwait(false);
    }

    private static async Task RefuseAsync(HttpContext context, int status, IReadOnlyList<FieldFault> faults)
    {
        if (context.Response.HasStarted || context.RequestAborted.IsCancellationRequested)
            return;
        context.Response.StatusCode = status;
        await SendAsync(context, new { faults }).ConfigureAwait(false);
    }

    // The page's user knows the film by its name, not by the machine's path.
    private static string Named(string file) => Path.GetFileName(file) is { Length: > 0 } name ? name : file;
}
