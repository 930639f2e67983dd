using System.Runtime.InteropServices;
using System.Text;

namespace Dotcoat;

internal static class Program
{
    private static int Main(string[] args)
    {
        using var stop = new CancellationTokenSource();
        // Cancelled work writes nothing more, and what it staged is removed, before the process ends with 130.
        using var interrupt = PosixSignalRegistration.Create(PosixSignal.SIGINT, Stop);
        using var terminate = PosixSignalRegistration.Create(PosixSignal.SIGTERM, Stop);
        var plainUtf8 = new UTF8Encoding(encoderShouldEmitUTF8Identifier: false);
        using var output = new StreamWriter(Console.OpenStandardOutput(), plainUtf8) { AutoFlush = true };
        using var error = new StreamWriter(Console.OpenStandardError(), plainUtf8) { AutoFlush = true };
        return CommandLine.Run(args, new CommandContext(output, error, Folder: "", stop.Token));

        void Stop(PosixSignalContext signal)
        {
            // A second one ends the process at once, should the first wait on something that never comes.
            signal.Cancel = !stop.IsCancellationRequested;
            stop.Cancel();
        }
    }
}
