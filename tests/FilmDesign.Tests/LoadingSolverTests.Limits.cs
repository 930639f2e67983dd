using Colorimetry;
using FilmOptics;
using static FilmOptics.Tests.FilmGenerators;

namespace FilmDesign.Tests;

public sealed partial class LoadingSolverTests
{
    private static readonly Chromaticity D65 = new(0.3127, 0.3290);

    /// <summary>A film for each reason why a white is out of reach, and words that its explanation has to hold.</summary>
    private static readonly Dictionary<string, (FilmCase Case, string[] Words)> OutOfReach = new(StringComparer.Ordinal)
    {
        ["upper bound"] = (
            CaseOf(TwoLots(), D65, 0.0005, new FreeLoading("green", 0, 1), new FreeLoading("red")),
            ["it needs", "mg/mL of green, above the bound of 1 mg/mL", "Raise the upper bound"]),
        ["lower bound"] = (
            CaseOf(TwoLots(), D65, 0.0005, new FreeLoading("green"), new FreeLoading("red", 50, 100)),
            ["mg/mL of red, below the bound of 50 mg/mL", "Lower the lower bound"]),
        ["both bounds"] = (
            CaseOf(TwoLots(), D65, 0.0005, new FreeLoading("green", 0, 1), new FreeLoading("red", 0, 0.1)),
            ["of green, above the bound of 1 mg/mL, and", "of red, above the bound of 0.1 mg/mL"]),
        ["no room"] = (
            CaseOf(Thin(), D65, 0.0005, new FreeLoading("green", 0, 9000), new FreeLoading("red", 0, 9000)),
            ["more than the layer has room for", "Coat thicker"]),
        ["source too long"] = (
            CaseOf(Lit(497), D65),
            ["the source with its peak at 497 nm", "y too high", "Try a source with its peak near"]),
        ["red too short"] = (
            CaseOf(Film([Layer(0.1, [new(Green, 4), new(Lot("red", 585, 20, 3, 0.9), 2)])], [Green, Lot("red", 585, 20, 3, 0.9)], Cavity(0.95, 0.5)), new(0.40, 0.25)),
            ["above the film, the source with its peak at 450 nm", "x too low", "a lot in place of red with its peak near"]),
        ["dead lot"] = (
            CaseOf(Film([Layer(0.1, [new(Green, 4), new(Blind, 2)])], [Green, Blind], Cavity(0.95, 0.5)), D65),
            ["blind absorbs none of this light", "450 nm"]),
        ["dark lot"] = (
            CaseOf(Film([Layer(0.1, [new(Green, 4), new(Red with { QuantumYieldShare = 0 }, 2)])], [Green, Red with { QuantumYieldShare = 0 }], Cavity(0.95, 0.5)), D65),
            ["red has a quantum yield of 0"]),
        ["bypass"] = (
            CaseOf(TwoLots(cavity: Cavity(0.95, 0.55, 0.02, bypass: 0.5)), D65),
            ["50 % of the source light misses the film", "Close the gaps"]),
        ["blue stays"] = (
            CaseOf(Film([Layer(0.1, [new(HalfBand("green", 530), 4), new(HalfBand("red", 630), 2)])], [HalfBand("green", 530), HalfBand("red", 630)], Cavity(0.95, 0.1)), D65),
            ["blue cannot be lowered", "% of the source photons left above, unconverted", "absorb all of the source's band"]),
        ["green corner"] = (
            CaseOf(Film([Layer(0.1, [new(Green, 4), new(Red, 2)])], [Green, Red], Cavity(0.95, 0.5)), new(0.178, 0.760)),
            ["green", "x too high", "Try a lot in place of green with its peak near"]),
        ["green short"] = (
            CaseOf(Film([Layer(0.1, [new(HalfBand("green", 530), 4), new(Red, 2)])], [HalfBand("green", 530), Red], Cavity(0.95, 0.1)), new(0.30, 0.45)),
            ["unbounded", "green"]),
        ["fixed lot"] = (
            CaseOf(WithFixedYellow(), D65),
            ["in reach without yellow", "Lower that loading, or free it"]),
    };

    private static DotLot Green => Lot("green", 530, 28, 2.2, 0.92);

    private static DotLot Red => Lot("red", 630, 30, 3.2, 0.9);

    // Absorbs only where no light is.
    private static DotLot Blind => Lot("blind", Spectrum.Gaussian<PhotonPerNm>(630, 30), nm => nm < 365 ? 3 : 0, 0.9);

    public static TheoryData<string> Reasons => [.. OutOfReach.Keys];

    [Theory]
    [MemberData(nameof(Reasons))]
    public void Formulate_OutOfReach_SaysWhyInFigures(string kind)
    {
        var (filmCase, words) = OutOfReach[kind];
        var found = Formulate(filmCase);
        Assert.False(found.Reached, "the target was reached");
        Assert.NotNull(found.Limit);
        Assert.StartsWith($"White cannot reach {filmCase.Target!.WhiteX:0.0000}, {filmCase.Target.WhiteY:0.0000}: ", found.Limit, StringComparison.Ordinal);
        var white = found.Appraisal.FilmWhite.Chromaticity;
        Assert.EndsWith($"Nearest white {white.X:0.0000}, {white.Y:0.0000}.", found.Limit, StringComparison.Ordinal);
        Assert.All(words, word => Assert.Contains(word, found.Limit, StringComparison.Ordinal));
        Assert.Equal(white.DistanceXyTo(new(filmCase.Target.WhiteX, filmCase.Target.WhiteY)), found.WhiteErrorXy, 1e-12);
    }

    [Theory]
    [MemberData(nameof(Reasons))]
    public void Formulate_OutOfReach_IsNearestOfAFineGrid(string kind)
    {
        const int Steps = 40;
        var filmCase = OutOfReach[kind].Case;
        var found = Formulate(filmCase);
        double nearest = double.MaxValue;
        double[][] loadings =
        [
            .. filmCase.Target!.Free.Select(free => (double[])[free.MinMgPerMl, .. Enumerable.Range(0, Steps + 1)
                .Select(i => Math.Max(free.MinMgPerMl, free.MaxMgPerMl * Math.Pow(1e-6, 1 - ((double)i / Steps))))]),
        ];
        string first = filmCase.Target.Free[0].LotName, second = filmCase.Target.Free[1].LotName;
        var wanted = new Chromaticity(filmCase.Target.WhiteX, filmCase.Target.WhiteY);
        foreach (double a in loadings[0])
        {
            foreach (double b in loadings[1])
            {
                var film = filmCase.Film.WithLoadings((_, dots) => dots.Lot.Name == first ? a : dots.Lot.Name == second ? b : dots.LoadingMgPerMl);
                if (film.Layers.All(layer => !(Loadings.DotVolumeShare(layer) > 0.999)))
                    nearest = Math.Min(nearest, WhiteOf(film).DistanceXyTo(wanted));
            }
        }

        Assert.True(found.WhiteErrorXy <= nearest + 1e-7, $"found {found.WhiteErrorXy:g8}, on the grid {nearest:g8}");
        // And the grid comes close to it, so that it was worth comparing with.
        Assert.True(nearest <= found.WhiteErrorXy + 0.05, $"found {found.WhiteErrorXy:g8}, on the grid {nearest:g8}");
        Assert.All(filmCase.Target.Free, free => Assert.InRange(
            found.Loadings.First(l => l.LotName == free.LotName).LoadingMgPerMl, free.MinMgPerMl * (1 - 1e-12), free.MaxMgPerMl * (1 + 1e-12)));
    }

    [Fact]
    public void Formulate_InAFullLayer_LeavesRoomForTheHost() => Assert.All(
        Formulate(OutOfReach["no room"].Case).FilmCase.Film.Layers, layer => Assert.InRange(Loadings.DotVolumeShare(layer)!.Value, 0.9, 0.999 + 1e-9));

    // White at the end of a bound is on target where it is within the tolerance, and then nothing is said.
    [Fact]
    public void Formulate_JustWithinTolerance_IsReached()
    {
        var far = Formulate(OutOfReach["upper bound"].Case);
        var target = OutOfReach["upper bound"].Case.Target! with { ToleranceXy = far.WhiteErrorXy * 1.001 };
        var near = Formulate(OutOfReach["upper bound"].Case with { Target = target });
        Assert.True(near.Reached);
        Assert.Null(near.Limit);
        Assert.Equal(far.WhiteErrorXy, near.WhiteErrorXy, 1e-6);
    }

    // So thin that white takes more dots than fit in.
    private static Film Thin()
    {
        DotLot green = Green with { DensityGPerMl = 1.2 }, red = Red with { DensityGPerMl = 1.3 };
        return Film([Layer(0.0002, [new(green, 300), new(red, 100)])], [green, red], Cavity(0.95, 0.5));
    }

    private static Film Lit(double ledPeakNm) => Film([Layer(0.1, [new(Green, 4), new(Red, 2)])], [Green, Red], Cavity(0.95, 0.5), ledPeakNm: ledPeakNm);

    // Absorbs the shorter half of the source's band alone.
    private static DotLot HalfBand(string name, double peakNm) =>
        Lot(name, Spectrum.Gaussian<PhotonPerNm>(peakNm, 30), nm => nm < 450 ? 3 : 0, 0.95);

    private static Film WithFixedYellow()
    {
        DotLot yellow = Lot("yellow", 590, 30, 3, 0.9);
        return Film([Layer(0.1, [new(Green, 4), new(Red, 2), new(yellow, 30)])], [Green, Red, yellow], Cavity(0.95, 0.5));
    }
}
