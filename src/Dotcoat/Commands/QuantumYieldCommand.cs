using System.CommandLine;
using System.Globalization;
using Colorimetry;
using Dotcoat.Terminal;
using FilmDesign;
using FilmOptics;
using FilmReports;

namespace Dotcoat.Commands;

/// <summary>dotcoat quantum-yield: yield from integrating-sphere scans.</summary>
internal sealed class QuantumYieldCommand
{
    private const string ScanKind = "a file with a column power_per_nm or photons_per_nm";

    private readonly Option<string> _empty = new("--empty") { Description = $"Scan of the empty sphere: {ScanKind}.", HelpName = "FILE", Required = true };
    private readonly Option<string?> _beside = new("--beside") { Description = "Scan with the sample in the sphere beside the beam; without it the two-measurement form is used.", HelpName = "FILE" };
    private readonly Option<string> _inBeam = new("--in-beam") { Description = "Scan with the sample in the beam.", HelpName = "FILE", Required = true };
    private readonly Option<WavelengthWindow?> _pump = Window("--pump-nm", "Window of the exciting light; without it the one that the empty sphere shows.");
    private readonly Option<WavelengthWindow?> _emission = Window("--emission-nm", "Window of the emission; without it from the pump's to the end of the scans.");
    private readonly Option<string?> _response = new("--response") { Description = "Response of sphere and detector: a column response; the scans are divided by it.", HelpName = "FILE" };
    private readonly Option<double?> _uncertainty = new("--response-uncertainty-percent") { Description = "Relative standard uncertainty of the response between both windows. [default: 0]", HelpName = "PERCENT" };
    private readonly Option<string?> _dilute = new("--dilute") { Description = "Emission of a dilute sample, to correct for self-absorption.", HelpName = "FILE" };
    private readonly Option<double?> _tail = new("--tail-nm") { Description = "Where nothing is re-absorbed any more, nm; without it 1.5 half-widths behind the dilute peak.", HelpName = "NM" };
    private readonly Option<string?> _film = new("--film") { Description = "The sample is a piece of this film: finds the film_yield_factor that explains its external yield.", HelpName = "FILE" };
    private readonly Option<string?> _lot = new("--lot") { Description = "Lot whose factor is wanted; may be left out where the film has one.", HelpName = "NAME" };
    private readonly DeliveryOptions _delivery = new();

    public static Command Create(CommandContext context)
    {
        var options = new QuantumYieldCommand();
        var command = new Command("quantum-yield", "Quantum yield from integrating-sphere scans, in photons, with its standard uncertainty.")
        {
            options._empty, options._beside, options._inBeam, options._pump, options._emission, options._response, options._uncertainty,
            options._dilute, options._tail, options._film, options._lot,
        };
        options._delivery.AddTo(command);
        command.Validators.Add(result =>
        {
            if (result.GetValue(options._lot) is not null && result.GetValue(options._film) is null)
                result.AddError("--lot needs --film.");
            if (result.GetValue(options._film) is not null && result.GetValue(options._dilute) is not null)
                result.AddError("--dilute and --film exclude each other: what a film re-absorbs is computed with the film.");
            if (result.GetValue(options._tail) is not null && result.GetValue(options._dilute) is null)
                result.AddError("--tail-nm needs --dilute.");
            if (result.GetValue(options._uncertainty) is { } percent && !(percent is >= 0 and <= 100))
                result.AddError(FormattableString.Invariant($"--response-uncertainty-percent {percent}: 0 to 100 is allowed."));
        });
        command.SetAction(parsed => options.Run(context, parsed));
        return command;
    }

    private int Run(CommandContext context, ParseResult parsed)
    {
        var response = parsed.GetValue(_response) is { } path ? SpectrumFile.Read(context.PathOf(path)) : null;
        SphereScan Scan(string file) => SphereScan.From(SpectrumFile.Read(context.PathOf(file)), response);
        var empty = Scan(parsed.GetValue(_empty)!);
        var inBeam = Scan(parsed.GetValue(_inBeam)!);
        var beside = parsed.GetValue(_beside) is { } besideFile ? Scan(besideFile) : null;
        var pump = parsed.GetValue(_pump) ?? empty.PumpWindow();
        SphereScan[] scans = beside is null ? [empty, inBeam] : [empty, beside, inBeam];
        var emission = parsed.GetValue(_emission) ?? new WavelengthWindow(pump.HighNm, scans.Min(scan => scan.WavelengthsNm[^1]));
        var measurement = new SphereMeasurement
        {
            Empty = empty,
            Beside = beside,
            InBeam = inBeam,
            Pump = pump,
            Emission = emission,
            ResponseUncertaintyShare = (parsed.GetValue(_uncertainty) ?? 0) / 100,
            Dilute = parsed.GetValue(_dilute) is { } dilute ? SphereScan.From(SpectrumFile.Read(context.PathOf(dilute)), null) : null,
            TailFromNm = parsed.GetValue(_tail),
        };
        var yield = SphereYield.Of(measurement);
        yield = yield with { Warnings = [.. Guesses(parsed, measurement, response), .. yield.Warnings] };
        var fit = parsed.GetValue(_film) is { } film ? Fit(context, film, parsed.GetValue(_lot), measurement, yield) : null;
        Delivery.Deliver(
            context,
            "quantum-yield",
            QuantumYieldJson.Write(measurement, yield, fit),
            () => Text(yield, fit),
            _delivery.Read(parsed),
            () => QuantumYieldReport.Write(measurement, yield, fit).Select(file => new OutputFile(file.Name, file.Bytes)));
        return ExitStatus.Done;
    }

    private IEnumerable<string> Guesses(ParseResult parsed, SphereMeasurement measurement, SpectrumTable? response)
    {
        if (parsed.GetValue(_pump) is null)
            yield return FormattableString.Invariant($"The pump window {measurement.Pump.LowNm:0.#} to {measurement.Pump.HighNm:0.#} nm was read from the empty sphere; --pump-nm sets it.");
        if (parsed.GetValue(_emission) is null)
            yield return FormattableString.Invariant($"The emission window {measurement.Emission.LowNm:0.#} to {measurement.Emission.HighNm:0.#} nm reaches to the end of the scans; --emission-nm sets it.");
        if (response is null)
            yield return "No --response was given: the scans are taken as corrected for sphere and detector.";
    }

    private static FilmYieldFit Fit(CommandContext context, string file, string? lotName, SphereMeasurement measurement, SphereYield yield)
    {
        var film = FilmFile.Load(context.PathOf(file), []).Film;
        if (lotName is null && film.Lots.Count != 1)
            throw new InputException(new InputFault(file, null, null, $"the film has {film.Lots.Count} lots; --lot names the one whose factor is wanted."));
        var samples = new double[WavelengthGrid.Count];
        for (int i = 0; i < samples.Length; i++)
        {
            double nm = WavelengthGrid.NmAt(i);
            samples[i] = nm >= measurement.Pump.LowNm && nm <= measurement.Pump.HighNm ? Math.Max(0, measurement.Empty.At(nm)) : 0;
        }

        var pump = Spectrum.FromSamples<PhotonPerNm>(samples, $"{measurement.Empty.Name}, pump window");
        return Progress.While(context, "finding the yield in film", () => FilmYieldFit.Of(
            film, lotName ?? film.Lots[0].Name, pump, yield.YieldShare, yield.YieldUncertaintyShare, new DiscreteOrdinatesModel(1e-4), context.CancellationToken));
    }

    private static string Text(SphereYield yield, FilmYieldFit? fit)
    {
        var text = new TerminalText();
        text.Paragraph(QuantumYieldReport.Finding(yield, fit));
        text.Gap().Table(["figure", "value", "standard uncertainty"], QuantumYieldReport.Rows(yield, fit));
        return text.Sentences("Warnings", yield.Warnings).ToString();
    }

    private static Option<WavelengthWindow?> Window(string name, string description) => new(name)
    {
        Description = description,
        HelpName = "LOW:HIGH",
        CustomParser = result =>
        {
            string[] ends = result.Tokens[0].Value.Split(':');
            if (ends.Length == 2 && Number(ends[0]) is { } low && Number(ends[1]) is { } high && low < high)
                return new WavelengthWindow(low, high);
            result.AddError($"{name} {result.Tokens[0].Value}: two wavelengths in nm are expected, the lower first, such as 430:470.");
            return null;
        },
    };

    private static double? Number(string text) =>
        double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out double number) && double.IsFinite(number) ? number : null;
}
