using System.CommandLine;
using System.Text.Json;
using Colorimetry;
using Dotcoat.Terminal;
using FilmOptics;
using FilmReports;

namespace Dotcoat.Commands;

/// <summary>dotcoat report FILE…: a page with charts for each film.</summary>
internal static class ReportCommand
{
    public static Command Create(CommandContext context)
    {
        var files = new Argument<string[]>("FILE") { Description = "Film files, NAME.film.yaml.", Arity = ArgumentArity.OneOrMore };
        var options = new FilmOptions();
        var command = new Command("report", "HTML, PNG and SVG of each film, into reports/NAME of the current folder unless --out says where.") { files };
        options.AddTo(command);
        command.SetAction(parsed => Run(context, parsed.GetValue(files)!, options.Read(parsed)));
        return command;
    }

    private static int Run(CommandContext context, string[] files, FilmRequest request)
    {
        var folders = files.Select(file => FolderOf(file, files.Length == 1, request.Delivery.OutputFolder)).ToArray();
        if (folders.GroupBy(f => f, StringComparer.Ordinal).FirstOrDefault(g => g.Count() > 1) is { } twice)
            throw new InputException(new InputFault(twice.Key, null, null, "would hold the reports of two film files of one name; report them one by one with --out."));
        var reports = Progress.While(context, "drawing the report", () => files.Select(file => Make(context, file, request)).ToArray());
        for (int i = 0; i < files.Length; i++)
            OutputFolder.Write(context.PathOf(folders[i]), reports[i], context.CancellationToken);
        context.Output.Write(request.Delivery.Json ? Json(files, folders, reports) : Text(folders, reports));
        return ExitStatus.Done;
    }

    private static string FolderOf(string file, bool alone, string? outputFolder) =>
        outputFolder is null ? Path.Combine("reports", FilmCommand.NameOf(file))
        : alone ? outputFolder
        : Path.Combine(outputFolder, FilmCommand.NameOf(file));

    private static List<OutputFile> Make(CommandContext context, string file, FilmRequest request)
    {
        var filmCase = FilmFile.Load(context.PathOf(file), request.Overrides);
        var appraisal = FilmAppraiser.Appraise(filmCase, request.Model.Solve(filmCase.Film, context.CancellationToken));
        return [.. FilmReport.Write(filmCase, appraisal, null).Select(f => new OutputFile(f.Name, f.Bytes))];
    }

    private static string Text(string[] folders, List<OutputFile>[] reports)
    {
        var text = new TerminalText();
        for (int i = 0; i < folders.Length; i++)
        {
            text.Verbatim(Path.Combine(folders[i], "report.html"));
            text.Paragraph($"  and {reports[i].Count - 1} more files in {folders[i]}", indent: 2);
        }

        return text.ToString();
    }

    private static string Json(string[] files, string[] folders, List<OutputFile>[] reports) => JsonSerializer.Serialize(
        new
        {
            schema = "dotcoat/1",
            title = "Reports",
            reports = files.Select((file, i) => new { file, folder = folders[i], files = reports[i].Select(f => f.Name) }),
            warnings = Array.Empty<string>(),
        },
        Indented) + "\n";

    private static JsonSerializerOptions Indented { get; } = new() { WriteIndented = true };
}
