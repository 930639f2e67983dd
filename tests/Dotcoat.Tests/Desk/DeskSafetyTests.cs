using System.Net;
using System.Net.Sockets;
using System.Text;
using Dotcoat.Desk;
using Dotcoat.Tests.Commands;

namespace Dotcoat.Tests.Desk;

/// <summary>Whatever this run's own page did not send is turned away.</summary>
public sealed class DeskSafetyTests
{
    [Theory]
    [InlineData("Host", "example.com")]
    [InlineData("Host", "example.com:PORT")]
    [InlineData("Host", "127.0.0.1:1")]
    [InlineData("Host", "127.0.0.1")]
    [InlineData("Origin", "http://example.com")]
    [InlineData("Origin", "null")]
    [InlineData("Origin", "https://127.0.0.1:PORT")]
    [InlineData("Origin", "http://127.0.0.1:PORT.example.com")]
    [InlineData("Sec-Fetch-Site", "cross-site")]
    [InlineData("Sec-Fetch-Site", "same-site")]
    public async Task Request_OfAForeignHostOrSite_IsRefused(string header, string value)
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        foreach (string path in (string[])["", "film", "desk.js"])
        {
            using var request = new HttpRequestMessage(HttpMethod.Get, new Uri(desk.Address, path));
            request.Headers.TryAddWithoutValidation(header, value.Replace("PORT", $"{desk.Address.Port}", StringComparison.Ordinal));
            var answer = await desk.SendAsync(request);
            Assert.Equal(HttpStatusCode.Forbidden, answer.Status);
            Assert.StartsWith("Refused: ", answer.Text, StringComparison.Ordinal);
        }
    }

    [Theory]
    [InlineData("/")]
    [InlineData("/film")]
    [InlineData("/index.html")]
    [InlineData("/0000/film")]
    [InlineData("//film")]
    public async Task Request_WithoutTheToken_IsRefused(string path)
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        using var request = new HttpRequestMessage(HttpMethod.Get, new Uri($"http://127.0.0.1:{desk.Address.Port}{path}"));
        var answer = await desk.SendAsync(request);
        Assert.Equal(HttpStatusCode.Forbidden, answer.Status);
        Assert.DoesNotContain("Desk monitor", answer.Text, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Token_OfEachRun_IsNewAndLong()
    {
        using var workshop = Workshop.WithDemo();
        var tokens = new HashSet<string>(StringComparer.Ordinal);
        for (int i = 0; i < 3; i++)
        {
            await using var desk = await OpenDesk.StartAsync(workshop);
            Assert.True(desk.Address.AbsolutePath.Trim('/').Length >= 32);
            tokens.Add(desk.Address.AbsolutePath);
        }

        Assert.Equal(3, tokens.Count);
    }

    [Fact]
    public async Task Server_Listens_OnTheLoopbackAlone()
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        Assert.True(IPAddress.IsLoopback(IPAddress.Parse(desk.Address.Host)));
        var own = Dns.GetHostAddresses(Dns.GetHostName(), AddressFamily.InterNetwork).Where(address => address.AddressFamily == AddressFamily.InterNetwork && !IPAddress.IsLoopback(address)).ToArray();
        foreach (var address in own)
        {
            using var socket = new Socket(AddressFamily.InterNetwork, SocketType.Stream, ProtocolType.Tcp);
            await Assert.ThrowsAnyAsync<SocketException>(async () => await socket.ConnectAsync(address, desk.Address.Port, TestContext.Current.CancellationToken));
        }

        // An address for everyone would let a second listener of this port in only on Windows.
        using var everyone = new Socket(AddressFamily.InterNetwork, SocketType.Stream, ProtocolType.Tcp);
        everyone.Bind(new IPEndPoint(IPAddress.Parse("127.0.0.2"), desk.Address.Port));
    }

    [Fact]
    public async Task EveryAnswer_CarriesAPolicyWithoutInlineScript()
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        foreach (string path in (string[])["", "film", "desk.js", "nothing"])
        {
            var headers = (await desk.GetAsync(path)).Headers;
            string policy = headers.GetValues("Content-Security-Policy").Single();
            Assert.Contains("default-src 'none'", policy, StringComparison.Ordinal);
            Assert.Contains("script-src 'self'", policy, StringComparison.Ordinal);
            Assert.DoesNotContain("unsafe", policy, StringComparison.Ordinal);
            Assert.DoesNotContain("http:", policy, StringComparison.Ordinal);
            Assert.Equal("nosniff", headers.GetValues("X-Content-Type-Options").Single());
            Assert.Equal("no-referrer", headers.GetValues("Referrer-Policy").Single());
            Assert.False(headers.Contains("Access-Control-Allow-Origin"));
        }
    }

    [Fact]
    public void PageFiles_NameNoOtherMachineAndHoldNoInlineScript()
    {
        foreach (string name in PageFiles.Names)
        {
            string text = Encoding.UTF8.GetString(PageFiles.Find(name)!).Replace("http://www.w3.org/2000/svg", "", StringComparison.Ordinal);
            Assert.DoesNotContain("://", text, StringComparison.Ordinal);
            Assert.DoesNotContain(" style=", text, StringComparison.Ordinal);
            Assert.DoesNotMatch("<script(?![^>]*src=)", text);
            Assert.DoesNotMatch("""\son[a-z]+\s*=\s*["']""", text);
            Assert.DoesNotContain("eval(", text, StringComparison.Ordinal);
        }

        Assert.True(PageFiles.Names.Sum(name => PageFiles.Find(name)!.Length) < 300_000);
    }

    [Theory]
    [InlineData("solve", "text/plain")]
    [InlineData("save", "application/x-www-form-urlencoded")]
    [InlineData("spectrum", "multipart/form-data")]
    public async Task Post_OfATypeThatAFormCanSend_IsRefused(string path, string type)
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        using var content = new StringContent("{}", Encoding.UTF8, type);
        (await desk.PostAsync(path, content)).Refused(HttpStatusCode.UnsupportedMediaType);
    }

    [Theory]
    [InlineData("solve", "application/json", 257 * 1024, false)]
    [InlineData("solve", "application/json", 257 * 1024, true)]
    [InlineData("spectrum?name=a.csv", "text/csv", (16 << 20) + 1, false)]
    [InlineData("spectrum?name=a.csv", "text/csv", (16 << 20) + 1, true)]
    public async Task Post_LargerThanItsLimit_IsRefused(string path, string type, int bytes, bool inPieces)
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        using var content = new ByteArrayContent(new byte[bytes]);
        content.Headers.ContentType = new(type);
        using var request = new HttpRequestMessage(HttpMethod.Post, new Uri(desk.Address, path)) { Content = content };
        request.Headers.TransferEncodingChunked = inPieces;
        try
        {
            (await desk.SendAsync(request)).Refused(HttpStatusCode.RequestEntityTooLarge);
        }
        catch (HttpRequestException)
        {
            // The server hung up while the client still sent: refused as well.
        }

        Assert.Equal(HttpStatusCode.OK, (await desk.GetAsync("film")).Status);
    }

    [Theory]
    [InlineData("")]
    [InlineData("{")]
    [InlineData("null")]
    [InlineData("[]")]
    [InlineData("""{"tab":5}""")]
    public async Task Post_ThatIsNoRequest_IsRefused(string body)
    {
        using var workshop = Workshop.WithDemo();
        await using var desk = await OpenDesk.StartAsync(workshop);
        using var content = new StringContent(body, Encoding.UTF8, "application/json");
        (await desk.PostAsync("solve", content)).Refused(HttpStatusCode.BadRequest);
    }

    [Theory]
    [InlineData("../secret.csv")]
    [InlineData("..%2f..%2fsecret.csv")]
    [InlineData("report/../../secret.csv")]
    [InlineData("report/x/..%2fsecret.csv")]
    [InlineData("desk-monitor.film.yaml")]
    [InlineData("led-blue-455.csv")]
    public async Task Get_OfAFile_GivesNoneOfTheFolderAndNoneAboveIt(string path)
    {
        using var workshop = Workshop.WithDemo();
        workshop.Write("secret.csv", "secret");
        await using var desk = await OpenDesk.StartAsync(workshop);
        // As written: a client that tidies dots away would not try.
        var answer = await RawGetAsync(desk.Address, path);
        Assert.DoesNotContain("secret\n", answer + "\n", StringComparison.Ordinal);
        Assert.DoesNotContain("wavelength_nm", answer, StringComparison.Ordinal);
        Assert.Matches("^HTTP/1.1 (403|404|400)", answer);
    }

    private static async Task<string> RawGetAsync(Uri address, string path)
    {
        using var client = new TcpClient();
        await client.ConnectAsync(IPAddress.Loopback, address.Port, TestContext.Current.CancellationToken);
        await using var stream = client.GetStream();
        await stream.WriteAsync(Encoding.ASCII.GetBytes($"GET {address.AbsolutePath}{path} HTTP/1.1\r\nHost: 127.0.0.1:{address.Port}\r\nConnection: close\r\n\r\n"), TestContext.Current.CancellationToken);
        using var reader = new StreamReader(stream);
        return await reader.ReadToEndAsync(TestContext.Current.CancellationToken);
    }
}
