using System.Net;
using System.Net.Sockets;

namespace Dotcoat.Tests.Commands;

public sealed class DeskCommandTests
{
    [Fact]
    public async Task Desk_PrintsItsAddress_ServesUntilInterrupted_AndEndsWell()
    {
        using var workshop = Workshop.WithDemo();
        using var stop = new CancellationTokenSource();
        // Written by the program's thread while it is read here.
        await using var output = new StringWriter();
        await using var safe = TextWriter.Synchronized(output);
        var context = new CommandContext(safe, TextWriter.Null, workshop.Folder, stop.Token);
        var running = Task.Run(() => CommandLine.Run(["desk", "spectra/demo/desk-monitor.film.yaml", "--no-open"], context), TestContext.Current.CancellationToken);
        for (int i = 0; i < 3000 && !running.IsCompleted && Printed().Length == 0; i++)
            await Task.Delay(10, TestContext.Current.CancellationToken);
        Assert.False(running.IsCompleted);
        using var client = new HttpClient();
        string address = Printed().Trim();
        Assert.Contains("Desk monitor", await client.GetStringAsync(new Uri($"{address}film"), TestContext.Current.CancellationToken), StringComparison.Ordinal);
        await stop.CancelAsync();
        Assert.Equal(0, await running);
        await Assert.ThrowsAsync<HttpRequestException>(() => client.GetStringAsync(new Uri(address), TestContext.Current.CancellationToken));

        string Printed()
        {
            lock (safe)
                return output.ToString();
        }
    }

    [Theory]
    [InlineData("80")]
    [InlineData("70000")]
    [InlineData("http")]
    public void Desk_OnAPortThatIsNone_IsRefused(string port)
    {
        using var workshop = Workshop.WithDemo();
        workshop.Run("desk", "spectra/demo/desk-monitor.film.yaml", "--no-open", "--port", port).AssertRefused(2);
    }

    [Fact]
    public void Desk_OnAPortInUse_IsRefused()
    {
        using var workshop = Workshop.WithDemo();
        using var taken = new TcpListener(IPAddress.Loopback, 0);
        taken.Start();
        var refused = workshop.Run("desk", "spectra/demo/desk-monitor.film.yaml", "--no-open", "--port", $"{((IPEndPoint)taken.LocalEndpoint).Port}").AssertRefused();
        Assert.Contains("in use", refused.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void Desk_OfAFileWithFaults_NamesThem()
    {
        using var workshop = Workshop.WithDemo();
        workshop.Write("bad.film.yaml", "title: x\nlayers: 5\n");
        var refused = workshop.Run("desk", "bad.film.yaml", "--no-open");
        Assert.Equal(2, refused.Status);
        Assert.Contains("bad.film.yaml:2:", refused.Error, StringComparison.Ordinal);
        workshop.Run("desk", "none.film.yaml", "--no-open").AssertRefused();
    }
}
