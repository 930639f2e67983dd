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
        command.SetAction(parsed => Run(context, parsed.GetValue(file)!, options.Read(parsed)));
        return command;
    }

    private static int Run(CommandContext context, string file, FilmRequest request)
    {
        var filmCase = FilmFile.Load(context.PathOf(file), request.Overrides);
        var appraisal = Progress.While(
            context, "solving the film", () => FilmAppraiser.Appraise(filmCase, request.Model.Solve(filmCase.Film, context.CancellationToken)));
        Delivery.Deliver(
            context,
            "simulate",
            ReportJson.Simulate(filmCase, appraisal),
            () => FilmText.Simulated(filmCase, appraisal),
            request.Delivery,
            () => Charts.Of(filmCase, appraisal));
        return ExitStatus.Done;
    }
}
