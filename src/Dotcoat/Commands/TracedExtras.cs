using System.CommandLine;
using System.Globalization;
using Colorimetry;
using FilmOptics;

namespace Dotcoat.Commands;

/// <summary>What simulate adds by tracing photons, whatever model the film itself is solved with.</summary>
/// <param name="HazeNm">Wavelength of a haze meter, nm; null for none.</param>
/// <param name="ZoneMm">Side of a lit square zone, mm; null for none.</param>
/// <param name="EdgeMm">How far inwards from the sheet's cut edge, mm; null for none.</param>
internal sealed record TracedExtrasRequest(int? HazeNm, double? ZoneMm, double? EdgeMm)
{
    /// <summary>The appraisal with what was asked for.</summary>
    public FilmAppraisal AddTo(FilmAppraisal appraisal, FilmCase filmCase, CancellationToken cancellationToken)
    {
        if (appraisal.Output.Tracing is not null && cancellationToken.IsCancellationRequested && (HazeNm ?? ZoneMm ?? EdgeMm) is not null)
            return appraisal with { Warnings = [.. appraisal.Warnings, "--haze-nm, --zone-mm and --edge-mm were not traced: the run was interrupted before them."] };
        if (HazeNm is { } hazeNm)
            appraisal = appraisal with { Haze = new TracedHazeMeter().Read(filmCase.Film, hazeNm, cancellationToken) };
        if (EdgeMm is { } edgeMm)
        {
            var edge = SheetEdge.Trace(filmCase.Film, edgeMm, filmCase.Observer, cancellationToken: cancellationToken);
            appraisal = appraisal with { Edge = edge, Warnings = [.. appraisal.Warnings, .. edge.Warnings] };
        }

        if (ZoneMm is not { } zoneMm)
            return appraisal;
        var spread = LateralSpread.Trace(filmCase.Film, cancellationToken: cancellationToken);
        return appraisal with
        {
            Zone = spread.AcrossZone(zoneMm, filmCase.Observer),
            Spread = spread.Colours,
            Warnings = [.. appraisal.Warnings, .. spread.Warnings],
        };
    }
}

/// <summary>--haze-nm, --zone-mm and --edge-mm.</summary>
internal sealed class TracedExtras
{
    private const double LargestMm = 1000;

    private readonly Option<int?> _haze = new("--haze-nm")
    {
        Description = "Adds what a haze meter would read on the bare film, at a wavelength where no dot absorbs.",
        HelpName = "NM",
        CustomParser = result =>
        {
            if (int.TryParse(result.Tokens[0].Value, NumberStyles.None, CultureInfo.InvariantCulture, out int nm) && nm is >= WavelengthGrid.FirstNm and <= WavelengthGrid.LastNm)
                return nm;
            result.AddError($"--haze-nm {result.Tokens[0].Value}: a whole number of nm from {WavelengthGrid.FirstNm} to {WavelengthGrid.LastNm} is expected.");
            return null;
        },
    };

    private readonly Option<double?> _zone = Length("--zone-mm", "Adds the light and colour beside one lit square zone of the backlight of this side.");

    private readonly Option<double?> _edge = Length("--edge-mm", "Adds the light and colour from the cut edge of the sheet so far inwards, and what is lost at the cut.");

    public void AddTo(Command command)
    {
        command.Options.Add(_haze);
        command.Options.Add(_zone);
        command.Options.Add(_edge);
    }

    public TracedExtrasRequest Read(ParseResult parsed) => new(parsed.GetValue(_haze), parsed.GetValue(_zone), parsed.GetValue(_edge));

    private static Option<double?> Length(string name, string description) => new(name)
    {
        Description = description,
        HelpName = "MM",
        CustomParser = result =>
        {
            if (double.TryParse(result.Tokens[0].Value, NumberStyles.Float, CultureInfo.InvariantCulture, out double mm) && mm is > 0 and <= LargestMm)
                return mm;
            result.AddError($"{name} {result.Tokens[0].Value}: a number above 0, to {LargestMm} mm, is expected.");
            return null;
        },
    };
}
