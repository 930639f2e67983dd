using System.CommandLine;
using Dotcoat.Terminal;
using FilmOptics;
using FilmReports;

namespace Dotcoat.Commands;

/// <summary>dotcoat simulate FILE: what one film does.</summary>
internal static class SimulateCommand
{
    public static Command Create(CommandContext context)
    {
        var file = FilmCommand.File();
        var options = new FilmOptions();
        var command = new Command("simulate", "One film: spectrum, photon budget, colours, gamut.") { file };
        options.AddTo(command);
        var extras = new TracedExtras();
        extras.AddTo(command);
        command.SetAction(parsed => Run(context, parsed.GetValue(file)!, options.Read(parsed), extras.Read(parsed)));
        return command;
    }

    private static int Run(CommandContext context, string file, FilmRequest request, TracedExtrasRequest extras)
    {
        var filmCase = FilmFile.Load(context.PathOf(file), request.Overrides);
        var appraisal = Progress.While(
            context,
            "solving the film",
            () => extras.AddTo(FilmAppraiser.Appraise(filmCase, request.Model.Solve(filmCase.Film, context.CancellationToken)), filmCase, context.CancellationToken),
            request.News);

        // What was traced before an interruption is a result, with the errors that go with it.
        bool isCutShort = appraisal.Output.Tracing is { } tracing && tracing.Photons < tracing.PhotonsAsked;
        Delivery.Deliver(
            isCutShort ? context with { CancellationToken = CancellationToken.None } : context,
            "simulate",
            ReportJson.Simulate(filmCase, appraisal),
            () => FilmText.Simulated(filmCase, appraisal),
            request.Delivery,
            () => Charts.Of(filmCase, appraisal));
        return isCutShort ? ExitStatus.Interrupted : ExitStatus.Done;
    }
}
