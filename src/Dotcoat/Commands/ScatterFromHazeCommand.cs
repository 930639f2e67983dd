using System.CommandLine;
using System.Globalization;
using Dotcoat.Terminal;
using FilmOptics;
using FilmReports;

namespace Dotcoat.Commands;

/// <summary>dotcoat scatter-from-haze: scattering from a measured haze and total transmittance.</summary>
internal static class ScatterFromHazeCommand
{
    public static Command Create(CommandContext context)
    {
        var transmittance = Percent("--total-transmittance-percent", "All light that passes the coat, as the meter gives it.", required: true);
        var haze = Percent("--haze-percent", "Share of that deflected by more than 2.5°.", required: true);
        var thickness = Number("--thickness-um", "Cured thickness.", "UM", required: true);
        var index = Number("--refractive-index", "Of the cured host. [default: 1.5]", "N");
        var absorption = Number("--absorption-per-mm", "Of the host, base e. [default: 0]", "PER_MM");
        var uncertainty = Percent("--uncertainty-percent", "Standard uncertainty of both readings, in percentage points. [default: 0.5]");
        var delivery = new DeliveryOptions();
        var command = new Command("scatter-from-haze", "Scattering coefficient and anisotropy from a measured haze and total transmittance of a coat without dots.")
        {
            transmittance, haze, thickness, index, absorption, uncertainty,
        };
        delivery.AddTo(command);
        command.SetAction(parsed => Run(
            context,
            new HazeMeasurement
            {
                TotalTransmittanceShare = parsed.GetValue(transmittance)!.Value / 100,
                HazeShare = parsed.GetValue(haze)!.Value / 100,
                ThicknessMm = parsed.GetValue(thickness)!.Value / 1000,
                RefractiveIndex = parsed.GetValue(index) ?? 1.5,
                AbsorptionPerMm = parsed.GetValue(absorption) ?? 0,
                UncertaintyShare = (parsed.GetValue(uncertainty) ?? 0.5) / 100,
            },
            delivery.Read(parsed)));
        return command;
    }

    private static int Run(CommandContext context, HazeMeasurement measurement, DeliveryRequest delivery)
    {
        var estimate = Progress.While(
            context, "finding scattering", () => ScatterFromHaze.Solve(measurement, cancellationToken: context.CancellationToken));
        Delivery.Deliver(context, "scatter-from-haze", ScatterJson.Write(measurement, estimate), () => Text(measurement, estimate), delivery, () => []);
        return ExitStatus.Done;
    }

    private static string Text(HazeMeasurement measurement, ScatterEstimate estimate)
    {
        var text = new TerminalText();
        text.Paragraph($"scattering_per_mm: {Figure.Digits(estimate.ScatteringPerMm, 4)} and anisotropy: {Figure.Digits(estimate.MeanCosine, 4)} explain the readings.");
        text.Gap().Table(
            ["key of the layer", "value", "standard error"],
            [
                ["scattering_per_mm", Figure.Digits(estimate.ScatteringPerMm, 4), Figure.Digits(estimate.ScatteringErrorPerMm, 2)],
                ["anisotropy", Figure.Digits(estimate.MeanCosine, 4), Figure.Digits(estimate.MeanCosineError, 2)],
            ]);
        text.Gap().Table(
            ["reading", "measured", "of the coat found"],
            [
                ["total transmittance", Figure.Fixed(measurement.TotalTransmittanceShare, 4), Figure.Fixed(estimate.Reading.TotalTransmittanceShare, 4)],
                ["haze", Figure.Fixed(measurement.HazeShare, 4), Figure.Fixed(estimate.Reading.HazeShare, 4)],
            ]);
        return text.Sentences("Warnings", estimate.Warnings).ToString();
    }

    private static Option<double?> Percent(string name, string description, bool required = false) => Number(name, description, "PERCENT", required);

    private static Option<double?> Number(string name, string description, string helpName, bool required = false) => new(name)
    {
        Description = description,
        HelpName = helpName,
        Required = required,
        CustomParser = result =>
        {
            if (double.TryParse(result.Tokens[0].Value, NumberStyles.Float, CultureInfo.InvariantCulture, out double number) && double.IsFinite(number))
                return number;
            result.AddError($"{name} {result.Tokens[0].Value}: a number is expected, with a decimal point.");
            return null;
        },
    };
}
