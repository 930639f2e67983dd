using Colorimetry;
using Dotcoat.Tests.Commands;
using FilmOptics;
using FilmReports;
using FilmReports.Drawings;

namespace Dotcoat.Tests.Reports;

/// <summary>A film with its figures.</summary>
internal sealed record ReportFilm(FilmCase Case, FilmAppraisal Appraisal)
{
    private IReadOnlyList<Drawing>? _drawings;

    public static ReportFilm Of(FilmCase filmCase, IFilmModel? model = null) =>
        new(filmCase, FilmAppraiser.Appraise(filmCase, (model ?? new DiscreteOrdinatesModel()).Solve(filmCase.Film, TestContext.Current.CancellationToken)));

    /// <summary>Its charts, drawn once.</summary>
    public IReadOnlyList<Drawing> Drawings => _drawings ??= FilmReport.Drawings(Case, Appraisal, Palette.Light);
}

/// <summary>Films whose reports are looked at: both demos, and what is hard to draw.</summary>
internal static class ReportFilms
{
    private static readonly Dictionary<string, Func<ReportFilm>> Makers = new(StringComparer.Ordinal)
    {
        ["desk-monitor"] = () => ReportFilm.Of(Demo("desk-monitor")),
        ["living-room-tv"] = () => ReportFilm.Of(Demo("living-room-tv")),
        ["off target"] = () => ReportFilm.Of(Demo("desk-monitor", "layers[0].thickness_um=40")),
        ["wide tolerance"] = () => ReportFilm.Of(Demo("desk-monitor", "target.tolerance_xy=0.02", "target.white_xy=[0.30, 0.31]")),
        ["one gamut"] = () => ReportFilm.Of(Demo("living-room-tv", "target.gamuts=[BT.2020]")),
        ["every gamut"] = () => ReportFilm.Of(Demo("living-room-tv", $"target.gamuts=[{string.Join(", ", ColourGamut.All.Select(g => g.Name))}]")),
        ["no panel"] = () => ReportFilm.Of(Demo("desk-monitor") with { Panel = null, Target = null }),
        ["no target"] = () => ReportFilm.Of(Demo("living-room-tv") with { Target = null }),
        ["no dots"] = () => ReportFilm.Of(WithoutDots()),
        ["long names"] = () => ReportFilm.Of(Renamed(name => $"{name} of the trial coats of last winter, second drum, filtered and brought to the concentration of the first drum")),
        ["other script"] = () => ReportFilm.Of(Renamed(name => name.Replace("green", "绿色", StringComparison.Ordinal).Replace("red", "红色", StringComparison.Ordinal))),
        ["six lots"] = () => ReportFilm.Of(SixLots()),
        ["traced"] = () => ReportFilm.Of(Demo("desk-monitor"), new PhotonTracingModel(photons: 20_000, threads: 1)),
    };

    private static readonly Dictionary<string, ReportFilm> Made = new(StringComparer.Ordinal);

    public static TheoryData<string> Names => [.. Makers.Keys];

    public static ReportFilm Named(string name)
    {
        lock (Made)
        {
            if (!Made.TryGetValue(name, out var film))
                Made.Add(name, film = Makers[name]());
            return film;
        }
    }

    public static FilmCase Demo(string name, params string[] overrides) =>
        FilmFile.Load(Path.Combine(Repository.Root, "spectra", "demo", $"{name}.film.yaml"), overrides);

    private static FilmCase WithoutDots()
    {
        var demo = Demo("desk-monitor");
        return demo with { Film = demo.Film with { Layers = [.. demo.Film.Layers.Select(layer => layer with { Dots = [] })] } };
    }

    private static FilmCase Renamed(Func<string, string> rename)
    {
        var demo = Demo("desk-monitor");
        DotLot[] lots = [.. demo.Film.Lots.Select(lot => lot with { Name = rename(lot.Name) })];
        return demo with
        {
            Film = demo.Film with
            {
                Lots = lots,
                Layers =
                [
                    .. demo.Film.Layers.Select(layer => layer with
                    {
                        Name = rename(layer.Name),
                        Dots = [.. layer.Dots.Select(dots => dots with { Lot = lots[demo.Film.IndexOf(dots.Lot)] })],
                    }),
                ],
            },
        };
    }

    private static FilmCase SixLots()
    {
        var (monitor, tv) = (Demo("desk-monitor"), Demo("living-room-tv"));
        DotLot[] more = [.. new[] { 505.0, 560.0 }.Select(peakNm => monitor.Film.Lots[0] with
        {
            Name = string.Create(System.Globalization.CultureInfo.InvariantCulture, $"lot at {peakNm} nm"),
            Emission = Spectrum.Gaussian<PhotonPerNm>(peakNm, 30).NormalisedToUnitSum(),
        })];
        DotLot[] lots = [.. monitor.Film.Lots, .. tv.Film.Lots, .. more];
        var layer = monitor.Film.Layers[0] with { Dots = [.. lots.Select(lot => new DotLoading(lot, 1))] };
        return monitor with { Film = monitor.Film with { Lots = lots, Layers = [layer] } };
    }
}
