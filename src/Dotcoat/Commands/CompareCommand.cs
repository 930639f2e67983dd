using System.CommandLine;
using Dotcoat.Terminal;
using FilmDesign;
using FilmOptics;
using FilmReports;

namespace Dotcoat.Commands;

/// <summary>dotcoat compare FILE: the models side by side, with where and why they differ.</summary>
internal static class CompareCommand
{
    // Enough for four digits of every share in seconds; --photons asks for more.
    private const long DefaultPhotons = 1_000_000;

    public static Command Create(CommandContext context)
    {
        var file = FilmCommand.File();
        var options = new FilmOptions();
        var command = new Command("compare", "The models side by side: where they differ, and what each feature of the film is worth.") { file };
        options.AddAllModelsTo(command);
        command.SetAction(parsed => Run(context, parsed.GetValue(file)!, options.ReadAllModels(parsed)));
        return command;
    }

    private static int Run(CommandContext context, string file, ComparisonRequest request)
    {
        var filmCase = FilmFile.Load(context.PathOf(file), request.Overrides);
        var settings = request.Settings with { Photons = request.Settings.Photons ?? DefaultPhotons };
        var comparison = Progress.While(context, "comparing models", () => ModelComparison.Of(
            filmCase,
            FilmModels.Named(FilmModels.DiscreteOrdinates, settings),
            [FilmModels.Named(FilmModels.MonteCarlo, settings), FilmModels.Named(FilmModels.BeerLambert, settings)],
            context.CancellationToken));
        Delivery.Deliver(
            context,
            "compare",
            ComparisonJson.Write(filmCase, comparison),
            () => ComparisonText.Of(filmCase, comparison),
            request.Delivery,
            () => []);
        return ExitStatus.Done;
    }
}
