using Colorimetry;
using FilmOptics;
using static FilmOptics.Tests.FilmGenerators;

namespace FilmDesign.Tests;

public sealed partial class LoadingSolverTests
{
    [Fact]
    public void Formulate_AtThePanel_PutsThePanelsWhiteOnTarget()
    {
        var panel = new Panel(Pass(585, 830), Pass(500, 585), Pass(360, 500), 0.2, 0.25, 0.2);
        var filmCase = CaseOf(TwoLots(), D65) with { Panel = panel };
        filmCase = filmCase with { Target = filmCase.Target! with { Place = TargetPlace.Panel } };
        var found = Formulate(filmCase);
        Assert.True(found.Reached);
        Assert.Equal(D65.X, found.Appraisal.Panel!.White.Chromaticity.X, 1e-7);
        Assert.Equal(D65.Y, found.Appraisal.Panel.White.Chromaticity.Y, 1e-7);
        Assert.True(found.Appraisal.FilmWhite.Chromaticity.DistanceXyTo(D65) > 1e-3);
    }

    [Fact]
    public void Formulate_LotInSeveralLayers_MovesAllItsLoadingsByOneFactor()
    {
        var film = Film(
            [
                Layer(0.05, [new(Green, 2), new(Red, 4)]) with { Name = "lower" },
                Layer(0.08, [new(Green, 6)]) with { Name = "upper" },
            ],
            [Green, Red],
            Cavity(0.95, 0.5));
        var found = Formulate(CaseOf(film, D65));
        Assert.True(found.Reached);
        Assert.Equal("green @ lower, red @ lower, green @ upper", string.Join(", ", found.Loadings.Select(l => $"{l.LotName} @ {l.LayerName}")));
        Assert.Equal(3, found.Loadings[2].LoadingMgPerMl / found.Loadings[0].LoadingMgPerMl, 1e-12);
        Assert.Equal(found.Loadings[0].LoadingMgPerMl, found.FilmCase.Film.Layers[0].Dots[0].LoadingMgPerMl);
        Assert.Equal(0, WhiteOf(found.FilmCase.Film).DistanceXyTo(found.Appraisal.FilmWhite.Chromaticity), 1e-12);
    }

    [Fact]
    public void Formulate_WithAFixedLot_LeavesItAlone()
    {
        var yellow = Lot("yellow", 575, 40, 2, 0.8);
        var film = Film([Layer(0.1, [new(yellow, 1), new(Green, 0), new(Red, 0)])], [yellow, Green, Red], Cavity(0.95, 0.5));
        var found = Formulate(CaseOf(film, D65, 0.0005, new FreeLoading("red"), new FreeLoading("green")));
        Assert.True(found.Reached);
        Assert.Equal(1, found.FilmCase.Film.Layers[0].Dots[0].LoadingMgPerMl);
        Assert.InRange(found.WhiteErrorXy, 0, 1e-8);
    }

    // The same film described in two ways is solved alike.
    [Fact]
    public void Formulate_InALayerTwiceAsThick_FindsHalfTheLoadings()
    {
        var film = TwoLots();
        var thin = Formulate(CaseOf(film, D65));
        var thick = Formulate(CaseOf(film with { Layers = [film.Layers[0] with { ThicknessMm = 0.2, HostAbsorption = film.Layers[0].HostAbsorption.ScaledBy(0.5) }] }, D65));
        Assert.Equal(2, thin.Loadings[0].LoadingMgPerMl / thick.Loadings[0].LoadingMgPerMl, 1e-6);
        Assert.Equal(2, thin.Loadings[1].LoadingMgPerMl / thick.Loadings[1].LoadingMgPerMl, 1e-6);
    }

    [Fact]
    public void Formulate_WithoutWhatItNeeds_IsRefused()
    {
        var filmCase = CaseOf(TwoLots(), D65);
        Refuses(filmCase with { Target = null }, "target");
        Refuses(filmCase with { Target = filmCase.Target! with { Free = [] } }, "target.free names 0 lots");
        Refuses(filmCase with { Target = filmCase.Target with { Free = [new("green")] } }, "target.free names 1 lot");
        Refuses(filmCase with { Target = filmCase.Target with { Free = [new("green"), new("blue")] } }, "'blue' stands in no layer");
        Refuses(filmCase with { Target = filmCase.Target with { View = TargetView.Normal } }, "radiance along the normal");

        static void Refuses(FilmCase wrong, string words) =>
            Assert.Contains(words, Assert.Throws<InputException>(() => Formulate(wrong)).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Formulate_Cancelled_Stops() => Assert.Throws<OperationCanceledException>(() =>
        LoadingSolver.Formulate(CaseOf(TwoLots(), D65), Model, new CancellationToken(canceled: true)));

    // A tracer's whites are grained: derivatives and aim have to be coarser than the grain, and the answer still on target.
    [Fact]
    public void Formulate_OnATracer_ReachesTheTolerance()
    {
        var filmCase = CaseOf(TwoLots(), new(0.30, 0.31), toleranceXy: 0.01);
        var found = LoadingSolver.Formulate(filmCase, new PhotonTracingModel(photons: 100_000), TestContext.Current.CancellationToken);
        Assert.True(found.Reached, found.Limit);
        Assert.InRange(found.Solves, 1, 60);
    }

    private static Spectrum<Fraction> Pass(double fromNm, double toNm) =>
        Spectrum.Sampled<Fraction>(nm => nm >= fromNm && nm < toNm ? 0.9 : 0.003, "filter");
}
