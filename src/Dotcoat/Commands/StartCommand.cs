using System.CommandLine;
using Dotcoat.Terminal;

namespace Dotcoat.Commands;

/// <summary>dotcoat start DIR: a starter folder.</summary>
internal static class StartCommand
{
    private const string FilmFileName = "my-film.film.yaml";

    public static Command Create(CommandContext context)
    {
        var folder = new Argument<string>("DIR") { Description = "A new or empty folder." };
        var command = new Command("start", "Makes a starter folder: a commented film file and invented spectra.") { folder };
        command.SetAction(parsed => Run(context, parsed.GetValue(folder)!));
        return command;
    }

    private static int Run(CommandContext context, string folder)
    {
        var files = Files();
        OutputFolder.WriteNew(context.PathOf(folder), files, context.CancellationToken);
        string film = Path.Combine(folder, FilmFileName);
        context.Output.Write(new TerminalText()
            .Paragraph($"{folder} holds {FilmFileName} and {files.Count - 1} spectra, all invented. Next:")
            .Gap()
            .Verbatim($"  dotcoat simulate {film}")
            .Verbatim($"  dotcoat formulate {film}")
            .Gap()
            .Paragraph("The film file says at each key how to come by the figure and its usual range. Dots and solvents are hazardous: follow the safety data sheets and the rules of your site.")
            .ToString());
        return ExitStatus.Done;
    }

    private static List<OutputFile> Files()
    {
        var assembly = typeof(StartCommand).Assembly;
        const string prefix = "starter/";
        return [.. assembly.GetManifestResourceNames()
            .Where(name => name.StartsWith(prefix, StringComparison.Ordinal))
            .Order(StringComparer.Ordinal)
            .Select(name => new OutputFile(name[prefix.Length..], Read(name)))];

        byte[] Read(string name)
        {
            using var stream = assembly.GetManifestResourceStream(name)!;
            using var bytes = new MemoryStream();
            stream.CopyTo(bytes);
            return bytes.ToArray();
        }
    }
}
