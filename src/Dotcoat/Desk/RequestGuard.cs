using System.Security.Cryptography;
using System.Text;
using Microsoft.AspNetCore.Http;

namespace Dotcoat.Desk;

/// <summary>Turns away whatever this run's own page did not send: another host's name, another site's script, a request without the token.</summary>
internal sealed class RequestGuard(string token)
{
    private const string Policy =
        "default-src 'none'; script-src 'self'; style-src 'self'; img-src 'self' data:; connect-src 'self'; form-action 'none'; base-uri 'none'; frame-ancestors 'none'";

    /// <summary>The port that is listened on; every request is refused until it is known.</summary>
    public int Port { get; set; }

    /// <summary>Answers and returns true where the request is refused.</summary>
    public async Task<bool> RefuseAsync(HttpContext context)
    {
        SetHeaders(context.Response.Headers);
        if (RefusalOf(context.Request) is not { } refusal)
            return false;
        context.Response.StatusCode = StatusCodes.Status403Forbidden;
        context.Response.ContentType = "text/plain; charset=utf-8";
        await context.Response.WriteAsync(refusal + "\n", context.RequestAborted).ConfigureAwait(false);
        return true;
    }

    private static void SetHeaders(IHeaderDictionary headers)
    {
        headers.ContentSecurityPolicy = Policy;
        headers.XContentTypeOptions = "nosniff";
        headers["Referrer-Policy"] = "no-referrer";
        headers["Cross-Origin-Opener-Policy"] = "same-origin";
        headers["Cross-Origin-Resource-Policy"] = "same-origin";
        headers.CacheControl = "no-store";
    }

    private string? RefusalOf(HttpRequest request)
    {
        // A foreign name that was made to point here (DNS rebinding) shows in Host.
        if (!IsOurs(request.Headers.Host.ToString()))
            return "Refused: this page is served to 127.0.0.1 only.";
        string origin = request.Headers.Origin.ToString();
        if (origin.Length > 0 && !(origin.StartsWith("http://", StringComparison.Ordinal) && IsOurs(origin["http://".Length..])))
            return "Refused: the request comes from another site.";
        if (request.Headers["Sec-Fetch-Site"].ToString() is not ("" or "same-origin" or "none"))
            return "Refused: the request comes from another site.";
        string first = (request.Path.Value ?? "").Split('/', 3) is [_, var segment, ..] ? segment : "";
        return CryptographicOperations.FixedTimeEquals(Encoding.UTF8.GetBytes(first), Encoding.UTF8.GetBytes(token))
            ? null
            : "Refused: open the address that dotcoat desk printed; it holds a token that is new with each start.";
    }

    private bool IsOurs(string host) => Port > 0 && (host == $"127.0.0.1:{Port}" || host == $"localhost:{Port}");
}
