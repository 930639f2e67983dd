using System.CommandLine;
using System.Globalization;
using Colorimetry;
using FilmOptics;

namespace Dotcoat.Commands;

/// <summary>What simulate adds by tracing photons, whatever model the film itself is solved with.</summary>
/// <param name="HazeNm">Wavelength of a haze meter, nm; null for none.</param>
/// <param name="ZoneMm">Side of a lit square zone, mm; null for none.</param>
internal sealed record TracedExtrasRequest(int? HazeNm, double? ZoneMm)
{
    /// <summary>The appraisal with what was asked for.</summary>
    public FilmAppraisal AddTo(FilmAppraisal appraisal, FilmCase filmCase, CancellationToken cancellationToken)
    {
        if (appraisal.Output.Tracing is not null && cancellationToken.IsCancellationRequested && (HazeNm ?? ZoneMm) is not null)
            return appraisal with { Warnings = [.. appraisal.Warnings, "--haze-nm and --zone-mm were not traced: the run was interrupted before them."] };
        if (HazeNm is { } hazeNm)
            appraisal = appraisal with { Haze = new TracedHazeMeter().Read(filmCase.Film, hazeNm, cancellationToken) };
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

/// <summary>--haze-nm and --zone-mm.</summary>
internal sealed class TracedExtras
{
    private const double LargestZoneMm = 1000;

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

    private readonly Option<double?> _zone = new("--zone-mm")
    {
        Description = "Adds the light and colour beside one lit square zone of the backlight of this side.",
        HelpName = "MM",
        CustomParser = result =>
        {
            if (double.TryParse(result.Tokens[0].Value, NumberStyles.Float, CultureInfo.InvariantCulture, out double mm) && mm is > 0 and <= LargestZoneMm)
                return mm;
            result.AddError($"--zone-mm {result.Tokens[0].Value}: a number above 0, to {LargestZoneMm} mm, is expected.");
            return null;
        },
    };

    public void AddTo(Command command)
    {
        command.Options.Add(_haze);
        command.Options.Add(_zone);
    }

    public TracedExtrasRequest Read(ParseResult parsed) => new(parsed.GetValue(_haze), parsed.GetValue(_zone));
}
