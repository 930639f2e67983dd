using System.CommandLine;
using System.ComponentModel;
using System.Diagnostics;
using System.Globalization;
using Dotcoat.Desk;

namespace Dotcoat.Commands;

/// <summary>dotcoat desk FILE: the local page.</summary>
internal static class DeskCommand
{
    public static Command Create(CommandContext context)
    {
        var file = FilmCommand.File();
        var stay = new Option<bool>("--no-open") { Description = "Opens no browser; the address is printed." };
        var port = new Option<int>("--port")
        {
            Description = "Port to listen on. [default: a free one]",
            HelpName = "NUMBER",
            CustomParser = result =>
            {
                if (int.TryParse(result.Tokens[0].Value, NumberStyles.None, CultureInfo.InvariantCulture, out int number) && number is >= 1024 and <= 65535)
                    return number;
                result.AddError($"--port {result.Tokens[0].Value}: a whole number from 1024 to 65535 is expected.");
                return 0;
            },
        };
        var command = new Command("desk", "A page on this machine that shows and changes one film, with figures and charts while a slider moves.") { file };
        command.Options.Add(stay);
        command.Options.Add(port);
        command.SetAction(parsed => RunAsync(context, parsed.GetValue(file)!, parsed.GetValue(port), !parsed.GetValue(stay)).GetAwaiter().GetResult());
        return command;
    }

    private static async Task<int> RunAsync(CommandContext context, string file, int port, bool opens)
    {
        using var session = new DeskSession(file, context.PathOf(file), FilmModels.Named(FilmModels.Default, new(null, Angles: false, null, null)));
        var server = await DeskServer.StartAsync(session, port, context.CancellationToken).ConfigureAwait(false);
        await using (server.ConfigureAwait(false))
        {
            await context.Output.WriteLineAsync(server.Address).ConfigureAwait(false);
            await context.Error.WriteLineAsync(
                $"The desk of {file} is open at this address, for this machine alone. Ctrl-C ends it; what is not saved is kept and offered at the next start.").ConfigureAwait(false);
            if (opens)
                Open(server.Address, context.Error);
            await session.WarmAsync(context.CancellationToken).ConfigureAwait(false);
            await Task.Delay(Timeout.Infinite, context.CancellationToken).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
        }

        return ExitStatus.Done;
    }

    private static void Open(string address, TextWriter error)
    {
        try
        {
            using var browser = Process.Start(new ProcessStartInfo(address) { UseShellExecute = true });
        }
        catch (Exception failed) when (failed is Win32Exception or InvalidOperationException or PlatformNotSupportedException)
        {
            error.WriteLine("No browser could be opened; open the address by hand.");
        }
    }
}
