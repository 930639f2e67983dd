using System.CommandLine;
using System.Text.Json;
using Colorimetry;
using Dotcoat.Terminal;
using FilmDesign;
using FilmOptics;
using FilmReports;

namespace Dotcoat.Commands;

/// <summary>dotcoat report FILE…: a page with charts for each film, and one with all of them side by side.</summary>
internal static class ReportCommand
{
    private const string SideBySide = "side-by-side";

    public static Command Create(CommandContext context)
    {
        var files = new Argument<string[]>("FILE") { Description = "Film files, NAME.film.yaml.", Arity = ArgumentArity.OneOrMore };
        var options = new FilmOptions();
        var report = new ReportOptions();
        var command = new Command(
            "report",
            $"HTML, PDF, PNG and SVG of each film, into reports/NAME of the current folder unless --out says where; of several films one more, {SideBySide}, that sets them one against another.") { files };
        report.AddTo(command);
        options.AddTo(command);
        var extras = new TracedExtras();
        extras.AddTo(command);
        command.SetAction(parsed => Run(
            context, parsed.GetValue(files)!, options.Read(parsed), new(report.Read(parsed), report.IsMapAskedIn(parsed), extras.Read(parsed))));
        return command;
    }

    private static int Run(CommandContext context, string[] files, FilmRequest request, ReportCommandRequest report)
    {
        string[] folders = [.. files.Select(file => FolderOf(FilmCommand.NameOf(file), files.Length == 1, request.Delivery.OutputFolder))];
        if (files.Length > 1)
            folders = [.. folders, FolderOf(SideBySide, alone: false, request.Delivery.OutputFolder)];
        if (folders.GroupBy(f => f, StringComparer.Ordinal).FirstOrDefault(g => g.Count() > 1) is { } twice)
            throw new InputException(new InputFault(twice.Key, null, null, "would hold two reports of one name; report the films one by one with --out."));
        var reports = Progress.While(context, "drawing the report", () => Make(context, files, request, report));
        for (int i = 0; i < folders.Length; i++)
            OutputFolder.Write(context.PathOf(folders[i]), reports[i], context.CancellationToken);
        context.Output.Write(request.Delivery.Json ? Json(files, folders, reports) : Text(folders, reports));
        return ExitStatus.Done;
    }

    private static string FolderOf(string name, bool alone, string? outputFolder) =>
        outputFolder is null ? Path.Combine("reports", name)
        : alone ? outputFolder
        : Path.Combine(outputFolder, name);

    // The report of each film, then that of all.
    private static List<OutputFile>[] Make(CommandContext context, string[] files, FilmRequest request, ReportCommandRequest report)
    {
        // Every file is read, and its faults named, before the first film is solved.
        FilmCase[] filmCases = [.. files.Select(file => FilmFile.Load(context.PathOf(file), request.Overrides))];
        ReportedFilm[] films = [.. filmCases.Select(filmCase => Solved(context, filmCase, request, report))];
        return
        [
            .. films.Select(film => Output(FilmReport.Write(film.Case, film.Appraisal, null, report.Report, film.Map))),
            .. films.Length > 1 ? [Output(FilmsReport.Write(films, report.Report))] : Array.Empty<List<OutputFile>>(),
        ];
    }

    private static ReportedFilm Solved(CommandContext context, FilmCase filmCase, FilmRequest request, ReportCommandRequest report)
    {
        var appraisal = FilmAppraiser.Appraise(filmCase, request.Model.Solve(filmCase.Film, context.CancellationToken));
        return new(
            filmCase,
            report.Extras.AddTo(appraisal, filmCase, context.CancellationToken),
            report.WithMap ? LoadingMap.Compute(filmCase, request.Model, cancellationToken: context.CancellationToken) : null);
    }

    private static List<OutputFile> Output(IEnumerable<ReportFile> files) => [.. files.Select(file => new OutputFile(file.Name, file.Bytes))];

    private static string Text(string[] folders, List<OutputFile>[] reports)
    {
        var text = new TerminalText();
        for (int i = 0; i < folders.Length; i++)
        {
            text.Verbatim(Path.Combine(folders[i], reports[i][0].Name));
            if (reports[i].Count > 1)
                text.Paragraph($"  and {reports[i].Count - 1} more files in {folders[i]}", indent: 2);
        }

        return text.ToString();
    }

    private static string Json(string[] files, string[] folders, List<OutputFile>[] reports) => JsonSerializer.Serialize(
        new
        {
            schema = "dotcoat/1",
            title = "Reports",
            reports = folders.Select((folder, i) => new { file = i < files.Length ? files[i] : null, folder, files = reports[i].Select(f => f.Name) }),
            warnings = Array.Empty<string>(),
        },
        Indented) + "\n";

    private static JsonSerializerOptions Indented { get; } = new() { WriteIndented = true };
}

/// <summary>What a report was asked to hold.</summary>
/// <param name="Report">Which files, and the date they bear.</param>
/// <param name="WithMap">Whether with the loading map.</param>
/// <param name="Extras">What tracing adds.</param>
internal sealed record ReportCommandRequest(ReportRequest Report, bool WithMap, TracedExtrasRequest Extras);
