using System.CommandLine;
using System.Globalization;
using Dotcoat.Terminal;
using FilmOptics;
using FilmReports;

namespace Dotcoat.Commands;

/// <summary>dotcoat dot: size, band edge, absorption and line of a dot.</summary>
internal sealed class DotCommand
{
    private readonly Option<string> _material = new("--material") { Description = $"Core: {string.Join(", ", Semiconductor.All.Select(m => m.Name))}.", HelpName = "NAME", Required = true };
    private readonly Option<double?> _diameter = Number("--diameter-nm", "Diameter of the core; 0.4 to 50 nm.", 0.4, 50);
    private readonly Option<double?> _peak = Number("--peak-nm", "First absorption peak instead of a diameter; 200 to 3000 nm.", 200, 3000);
    private readonly Option<string?> _shell = new("--shell") { Description = "Material of the shell.", HelpName = "NAME" };
    private readonly Option<double?> _shellNm = Number("--shell-nm", "Thickness of the shell; above 0, to 50 nm.", 0.01, 50);
    private readonly Option<double?> _barrier = Number("--barrier-ev", "Height of the matrix above the core's band edges, for both carriers; 0.1 to 20 eV. [default: 4, from memory]", 0.1, 20);
    private readonly Option<string?> _alloy = new("--alloy-with") { Description = "Second component of a mixed crystal.", HelpName = "NAME" };
    private readonly Option<double?> _share = Number("--alloy-share", "Share of the second component; 0 to 1.", 0, 1);
    private readonly Option<double?> _bowing = Number("--gap-bowing-ev", "Bowing of the alloy's gap; -5 to 5 eV. [default: 0]", -5, 5);
    private readonly Option<double?> _spread = Number("--size-spread-percent", "Standard deviation of the diameter; 0 to 50 %.", 0, 50);
    private readonly Option<double?> _homogeneous = Number("--homogeneous-fwhm-mev", "FWHM of a single dot; 0 to 1000 meV. [default: 0]", 0, 1000);
    private readonly Option<double?> _temperature = Number("--temperature-k", "Adds the shift of the peak from 300 K to this temperature; 1 to 600 K.", 1, 600);
    private readonly DeliveryOptions _delivery = new();

    public static Command Create(CommandContext context)
    {
        var options = new DotCommand();
        var command = new Command("dot", "Size and band edge of a dot, either from the other; its absorption and the width of its line.")
        {
            options._material, options._diameter, options._peak, options._shell, options._shellNm, options._barrier,
            options._alloy, options._share, options._bowing, options._spread, options._homogeneous, options._temperature,
        };
        options._delivery.AddTo(command);
        command.Validators.Add(result =>
        {
            if ((result.GetResult(options._diameter) is null) == (result.GetResult(options._peak) is null))
                result.AddError("Either --diameter-nm or --peak-nm is needed, and one of them alone.");
            if ((result.GetResult(options._shell) is null) != (result.GetResult(options._shellNm) is null))
                result.AddError("--shell and --shell-nm belong together.");
            if ((result.GetResult(options._alloy) is null) != (result.GetResult(options._share) is null))
                result.AddError("--alloy-with and --alloy-share belong together.");
        });
        command.SetAction(parsed => options.Run(context, parsed));
        return command;
    }

    private int Run(CommandContext context, ParseResult parsed)
    {
        var material = Semiconductor.Named(parsed.GetValue(_material)!);
        if (parsed.GetValue(_alloy) is { } second)
            material = Semiconductor.Alloy(Semiconductor.Named(second), material, parsed.GetValue(_share)!.Value, parsed.GetValue(_bowing) ?? 0);
        var estimate = DotEstimate.Of(new DotDescription
        {
            Material = material,
            DiameterNm = parsed.GetValue(_diameter),
            PeakNm = parsed.GetValue(_peak),
            Shell = parsed.GetValue(_shell) is { } shell ? Semiconductor.Named(shell) : null,
            ShellNm = parsed.GetValue(_shellNm) ?? 0,
            BarrierEv = parsed.GetValue(_barrier) ?? 4,
            TemperatureKelvin = parsed.GetValue(_temperature),
            SizeSpreadShare = parsed.GetValue(_spread) / 100,
            HomogeneousFwhmMev = parsed.GetValue(_homogeneous) ?? 0,
        });
        Delivery.Deliver(context, "dot", DotJson.Write(estimate), () => Text(estimate), _delivery.Read(parsed), () => []);
        return ExitStatus.Done;
    }

    private static string Text(DotEstimate dot)
    {
        var text = new TerminalText();
        text.Paragraph(dot.Curves.Count > 0
            ? string.Create(CultureInfo.InvariantCulture, $"{dot.Material.Name}: {Figure.Fixed(dot.Curves[0].DiameterNm, 2)} nm across with a first absorption peak at {Figure.Fixed(dot.Curves[0].PeakNm, 1)} nm (sizing curve {dot.Curves[0].Name}).")
            : $"{dot.Material.Name}: no sizing curve holds here; what follows is effective mass alone, which is too blue for small dots.");
        text.Gap().Table(
            ["by", "diameter nm", "band edge eV", "peak nm"],
            [
                .. dot.Curves.Select(curve => new[] { $"sizing curve {curve.Name}", Figure.Fixed(curve.DiameterNm, 3), Figure.Fixed(EffectiveMass.PhotonEvNm / curve.PeakNm, 4), Figure.Fixed(curve.PeakNm, 1) }),
                .. dot.Models.Select(model => new[] { model.Name, Figure.Fixed(model.DiameterNm, 3), Figure.Fixed(model.BandEdgeEv, 4), Figure.Fixed(EffectiveMass.PhotonEvNm / model.BandEdgeEv, 1) }),
            ]);
        text.Gap().Table(
            ["figure", "value", "unit"],
            [
                .. dot.Curves.Select(curve => new[] { $"extinction at the peak ({curve.Name})", Figure.Digits(curve.ExtinctionPerMPerCm, 4), "1/(M cm)" }),
                .. dot.Extinction350PerMPerCm is { } blue ? [["extinction at 350 nm (Leatherdale 2002)", Figure.Digits(blue, 4), "1/(M cm)"]] : Array.Empty<string[]>(),
                .. dot.SpreadFwhmMev is { } spread ? [["line by the spread of sizes, FWHM", Figure.Fixed(spread, 1), "meV"], ["line in all, FWHM", Figure.Fixed(dot.TotalFwhmMev, 1), "meV"], ["line in all, FWHM", Figure.Fixed(dot.TotalFwhmNm, 1), "nm"]] : Array.Empty<string[]>(),
                .. dot.HeatShiftNm is { } shift ? [["shift of the peak from 300 K", Figure.Signed(shift, 2), "nm"]] : Array.Empty<string[]>(),
                ["Bohr radius of the pair", Figure.Fixed(dot.Material.BohrRadiusNm, 2), "nm"],
                ["gap of the bulk", Figure.Fixed(dot.Material.GapEv, 3), "eV"],
            ]);
        return text.Sentences("Warnings", dot.Warnings).Sentences("Sources", dot.Sources).ToString();
    }

    private static Option<double?> Number(string name, string description, double low, double high) => new(name)
    {
        Description = description,
        HelpName = "NUMBER",
        CustomParser = result =>
        {
            if (double.TryParse(result.Tokens[0].Value, NumberStyles.Float, CultureInfo.InvariantCulture, out double number) && number >= low && number <= high)
                return number;
            result.AddError(FormattableString.Invariant($"{name} {result.Tokens[0].Value}: a number from {low} to {high} is expected."));
            return null;
        },
    };
}
