using System.CommandLine;
using Colorimetry;
using Dotcoat.Inspection;
using Dotcoat.Terminal;

namespace Dotcoat.Commands;

/// <summary>dotcoat inspect SPECTRUM: what a measured file holds.</summary>
internal static class InspectCommand
{
    public static Command Create(CommandContext context)
    {
        var file = new Argument<string>("SPECTRUM") { Description = "CSV file: light, absorbance, filters, an observer, or a table over angle." };
        var options = new DeliveryOptions();
        var command = new Command("inspect", "What a measured file holds, and its colour.") { file };
        options.AddTo(command);
        command.SetAction(parsed => Run(context, parsed.GetValue(file)!, options.Read(parsed)));
        return command;
    }

    private static int Run(CommandContext context, string file, DeliveryRequest request)
    {
        var inspection = SpectrumInspection.Of(SpectrumFile.Read(context.PathOf(file)));
        Delivery.Deliver(context, "inspect", InspectionJson.Of(inspection), () => InspectionText.Of(inspection), request, () => []);
        return ExitStatus.Done;
    }
}
