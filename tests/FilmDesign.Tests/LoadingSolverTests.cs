using Colorimetry;
using CsCheck;
using FilmOptics;
using static FilmOptics.Tests.FilmGenerators;

namespace FilmDesign.Tests;

public sealed partial class LoadingSolverTests
{
    private static readonly BeerLambertModel Model = new();

    // Green and red lots as displays use them, in a recycling cavity; loadings and starts over four decades.
    private static readonly Gen<(Film Film, double Green, double Red)> RandomFilms =
        from greenNm in Gen.Double[515, 545]
        from redNm in Gen.Double[610, 645]
        from yields in Gen.Double[0.6, 1].Array[2]
        from absorbances in Gen.Double[0.5, 4].Array[2]
        from returns in Gen.Double[0, 1].Array[3]
        from ledNm in Gen.Double[440, 465]
        from depths in Gen.Double[Math.Log(0.01), Math.Log(1.5)].Array[2]
        select Make(greenNm, redNm, yields, absorbances, returns, ledNm, depths);

    private static (Film Film, double Green, double Red) Make(
        double greenNm, double redNm, double[] yields, double[] absorbances, double[] returns, double ledNm, double[] logDepths)
    {
        DotLot green = Lot("green", greenNm, 30, absorbances[0], yields[0]), red = Lot("red", redNm, 32, absorbances[1], yields[1]);
        double thicknessMm = 0.1;
        // Loadings at which a lot alone has the drawn depth at 450 nm.
        double greenMgPerMl = Math.Exp(logDepths[0]) / (absorbances[0] * Math.Log(10) / 10 * thicknessMm);
        double redMgPerMl = Math.Exp(logDepths[1]) / (absorbances[1] * Math.Log(10) / 10 * thicknessMm);
        var film = Film(
            [Layer(thicknessMm, [new(green, greenMgPerMl), new(red, redMgPerMl)], hostPerMm: 0.002)],
            [green, red],
            Cavity(0.9 + (0.09 * returns[0]), 0.6 * returns[1], 0.05 * returns[2]),
            ledPeakNm: ledNm);
        return (film, greenMgPerMl, redMgPerMl);
    }

    private static Formulation Formulate(FilmCase filmCase) =>
        LoadingSolver.Formulate(filmCase, Model, TestContext.Current.CancellationToken);

    private static FilmCase CaseOf(Film film, Chromaticity white, double toleranceXy = 0.0005, params FreeLoading[] free) => new()
    {
        Film = film,
        Observer = StandardObserver.Cie1931,
        Target = new(
            TargetPlace.Film, TargetView.Hemisphere, white.X, white.Y, toleranceXy,
            free.Length > 0 ? free : [.. film.Lots.Take(2).Select(lot => new FreeLoading(lot.Name))], []),
    };

    private static Chromaticity WhiteOf(Film film) =>
        new WhiteMeter(new FilmCase { Film = film, Observer = StandardObserver.Cie1931 }, TargetPlace.Film)
            .Read(Model.Solve(film, TestContext.Current.CancellationToken)).Chromaticity;

    private static Film WithLoadings(Film film, double green, double red) =>
        film.WithLoadings((_, dots) => dots.Lot.Name == "green" ? green : dots.Lot.Name == "red" ? red : dots.LoadingMgPerMl);

    [Fact]
    public void Formulate_FromAnyStart_FindsTheLoadingsAgain()
    {
        int solves = 0, films = 0;
        (from film in RandomFilms
         from start in Gen.OneOf(Gen.Const(double.NegativeInfinity), Gen.Double[Math.Log(1e-3), Math.Log(1e3)]).Array[2]
         select (film.Film, film.Green, film.Red, Start: start)).Sample(
            f =>
            {
                var white = WhiteOf(f.Film);
                var start = WithLoadings(f.Film, f.Green * Math.Exp(f.Start[0]), f.Red * Math.Exp(f.Start[1]));
                var found = Formulate(CaseOf(start, white));
                Assert.True(found.Reached, found.Limit);
                Assert.Null(found.Limit);
                Assert.InRange(found.WhiteErrorXy, 0, 1e-8);
                Assert.Equal(1, found.Loadings[0].LoadingMgPerMl / f.Green, 1e-3);
                Assert.Equal(1, found.Loadings[1].LoadingMgPerMl / f.Red, 1e-3);
                Interlocked.Add(ref solves, found.Solves);
                Interlocked.Increment(ref films);
            },
            iter: 200);
        Assert.InRange((double)solves / films, 1, 60);
    }
}
