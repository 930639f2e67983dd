using System.CommandLine;
using FilmOptics;

namespace Dotcoat;

/// <summary>What a computing command was asked for.</summary>
/// <param name="Overrides">KEY=VALUE of --set, in order.</param>
/// <param name="Model">The model to run.</param>
/// <param name="News">How far a traced run of the model has come.</param>
/// <param name="Delivery">How the result is wanted.</param>
internal sealed record FilmRequest(IReadOnlyList<string> Overrides, IFilmModel Model, TracingNews News, DeliveryRequest Delivery);

/// <summary>What a command that runs every model was asked for.</summary>
/// <param name="Overrides">KEY=VALUE of --set, in order.</param>
/// <param name="Settings">What is asked of the models.</param>
/// <param name="Delivery">How the result is wanted.</param>
internal sealed record ComparisonRequest(IReadOnlyList<string> Overrides, ModelSettings Settings, DeliveryRequest Delivery);

/// <summary>How a result is wanted.</summary>
/// <param name="Json">Print the document instead of the tables.</param>
/// <param name="OutputFolder">Folder to write the document, tables and charts into, or null.</param>
internal sealed record DeliveryRequest(bool Json, string? OutputFolder);

/// <summary>The options that every command running a model has.</summary>
internal sealed class FilmOptions
{
    private readonly Option<string[]> _set = new("--set")
    {
        Description = "Overrides or adds a key of the film file (repeatable), such as layers[0].thickness_um=80 or 'lots[green A12].quantum_yield=0.85'.",
        HelpName = "KEY=VALUE",
        Arity = ArgumentArity.OneOrMore,
        DefaultValueFactory = _ => [],
    };

    private readonly ModelOptions _model = new();

    private readonly DeliveryOptions _delivery = new();

    public FilmOptions()
    {
        _set.Validators.Add(result =>
        {
            foreach (var token in result.Tokens.Where(t => t.Value.IndexOf('=', StringComparison.Ordinal) < 1))
                result.AddError($"--set {token.Value}: KEY=VALUE is expected, such as layers[0].thickness_um=80.");
        });
    }

    public void AddTo(Command command)
    {
        command.Options.Add(_set);
        _model.AddTo(command);
        _delivery.AddTo(command);
    }

    /// <summary>The same options for a command that runs every model, so that none is chosen.</summary>
    public void AddAllModelsTo(Command command)
    {
        command.Options.Add(_set);
        _model.AddAllModelsTo(command);
        _delivery.AddTo(command);
    }

    public ComparisonRequest ReadAllModels(ParseResult parsed) =>
        new(parsed.GetValue(_set) ?? [], _model.Read(parsed), _delivery.Read(parsed));

    public FilmRequest Read(ParseResult parsed)
    {
        var news = new TracingNews();
        return new(parsed.GetValue(_set) ?? [], FilmModels.Named(_model.NameIn(parsed), _model.Read(parsed), news), news, _delivery.Read(parsed));
    }
}

/// <summary>--json and --out.</summary>
internal sealed class DeliveryOptions
{
    private readonly Option<bool> _json = new("--json") { Description = "One JSON document on standard output, nothing else." };

    private readonly Option<string?> _out = new("--out")
    {
        Description = "Writes the JSON document, its tables as CSV and its charts into this folder.",
        HelpName = "DIR",
    };

    public void AddTo(Command command)
    {
        command.Options.Add(_json);
        command.Options.Add(_out);
    }

    public DeliveryRequest Read(ParseResult parsed) => new(parsed.GetValue(_json), parsed.GetValue(_out));
}
