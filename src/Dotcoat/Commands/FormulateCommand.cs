using System.CommandLine;
using Colorimetry;
using Dotcoat.Terminal;
using FilmDesign;
using FilmOptics;
using FilmReports;

namespace Dotcoat.Commands;

/// <summary>dotcoat formulate FILE: the loadings that put white on target.</summary>
internal static class FormulateCommand
{
    public static Command Create(CommandContext context)
    {
        var file = FilmCommand.File();
        var options = new FilmOptions();
        var save = new Option<string?>("--save") { Description = "Writes the film file with the loadings found.", HelpName = "NEW.film.yaml" };
        var command = new Command("formulate", "Finds the loadings that put white on target, or says why none can and how near it gets.") { file };
        options.AddTo(command);
        command.Options.Add(save);
        command.SetAction(parsed => Run(context, parsed.GetValue(file)!, options.Read(parsed), parsed.GetValue(save)));
        return command;
    }

    private static int Run(CommandContext context, string file, FilmRequest request, string? save)
    {
        if (request.Model is PhotonTracingModel)
            throw new InputException(new InputFault("--model", null, null, $"{request.Model.Name} has noise, which a search for loadings cannot follow; formulate with another model and check the film with simulate --model {request.Model.Name}."));
        string path = context.PathOf(file);
        string text = FilmFile.ReadText(path);
        var saved = save is null ? null : SavedFilm.Plan(text, path, context.PathOf(save), request.Overrides);
        var filmCase = FilmFile.Parse(text, path, request.Overrides);
        if (filmCase.Target is null)
            throw new InputException(new InputFault(file, null, null, "has no target: formulate needs one (key target, with white_xy)."));
        var formulation = Progress.While(
            context, "searching loadings", () => LoadingSolver.Formulate(filmCase, request.Model, context.CancellationToken));
        saved?.Write(formulation.FilmCase.Film, context.CancellationToken);
        Delivery.Deliver(
            context,
            "formulate",
            ReportJson.Formulate(formulation),
            () => FilmText.Formulated(formulation),
            request.Delivery,
            () => Charts.Of(formulation.FilmCase, formulation.Appraisal));
        return formulation.Reached ? ExitStatus.Done : ExitStatus.TargetNotMet;
    }
}
