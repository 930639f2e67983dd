using System.CommandLine;
using System.CommandLine.Parsing;
using System.Globalization;

namespace Dotcoat;

/// <summary>--model with what can be asked of a model. An option that the chosen model has no use for is refused, not ignored.</summary>
internal sealed class ModelOptions
{
    private const double BestAccuracyShare = 1e-5, WorstAccuracyShare = 1e-2;
    private const long MostPhotons = 100_000_000_000;

    private readonly Option<string> _model = new("--model")
    {
        Description = "Which model of light in the film.",
        DefaultValueFactory = _ => FilmModels.Default,
    };

    private readonly Option<double?> _accuracy = new("--accuracy")
    {
        Description = "Largest error of any budget line and of u′v′ that discrete-ordinates may leave: 1e-5 to 1e-2. [default: 3e-4]",
        HelpName = "SHARE",
        CustomParser = result => Number(result, "--accuracy", BestAccuracyShare, WorstAccuracyShare),
    };

    private readonly Option<bool> _angles = new("--angles") { Description = "Adds colour and luminance of the bare film against the exit angle (discrete-ordinates)." };

    private readonly Option<long?> _photons = new("--photons")
    {
        Description = "Source photons that monte-carlo traces. [default: 4000000]",
        HelpName = "COUNT",
        CustomParser = result => (long?)Number(result, "--photons", 1, MostPhotons),
    };

    private readonly Option<ulong?> _seed = new("--seed")
    {
        Description = "Seed of monte-carlo: the same seed gives the same figures on any machine. [default: 1]",
        HelpName = "NUMBER",
        CustomParser = result =>
        {
            if (ulong.TryParse(result.Tokens[0].Value, NumberStyles.None, CultureInfo.InvariantCulture, out ulong seed))
                return seed;
            result.AddError($"--seed {result.Tokens[0].Value}: a whole number from 0 is expected.");
            return null;
        },
    };

    public ModelOptions() => _model.AcceptOnlyFromAmong([.. FilmModels.Names]);

    /// <summary>All options of a command that runs one model.</summary>
    public void AddTo(Command command)
    {
        command.Options.Add(_model);
        AddSettingsTo(command);
        command.Validators.Add(result =>
        {
            string model = result.GetValue(_model) ?? FilmModels.Default;
            Refuse(result, model, FilmModels.DiscreteOrdinates, _accuracy, _angles);
            Refuse(result, model, FilmModels.MonteCarlo, _photons, _seed);
        });
    }

    /// <summary>The options of a command that runs all models.</summary>
    public void AddAllModelsTo(Command command)
    {
        command.Options.Add(_accuracy);
        command.Options.Add(_photons);
        command.Options.Add(_seed);
    }

    public string NameIn(ParseResult parsed) => parsed.GetValue(_model)!;

    public ModelSettings Read(ParseResult parsed) =>
        new(parsed.GetValue(_accuracy), parsed.GetValue(_angles), parsed.GetValue(_photons), parsed.GetValue(_seed));

    private void AddSettingsTo(Command command)
    {
        command.Options.Add(_accuracy);
        command.Options.Add(_angles);
        command.Options.Add(_photons);
        command.Options.Add(_seed);
    }

    private static void Refuse(CommandResult result, string model, string needed, params Option[] options)
    {
        foreach (var option in options.Where(option => model != needed && result.GetResult(option) is { Implicit: false }))
            result.AddError($"{option.Name} belongs to --model {needed}; the model is {model}.");
    }

    private static double? Number(ArgumentResult result, string option, double least, double most)
    {
        string text = result.Tokens[0].Value;
        if (double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out double number) && number >= least && number <= most)
            return number;
        result.AddError(string.Create(CultureInfo.InvariantCulture, $"{option} {text}: a number from {least} to {most} is expected."));
        return null;
    }
}
