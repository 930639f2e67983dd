using Colorimetry;
using static FilmOptics.Tests.FilmGenerators;

namespace FilmOptics.Tests;

public sealed partial class BeerLambertModelTests
{
    [Fact]
    public void NoDots_WithoutCavity_LetsAllLightThrough()
    {
        var output = Solve(Film([Layer(0.1, [])], []));
        Assert.Equal(1, output.Budget.Unconverted, Exact);
        Assert.Equal(0, output.Budget.Converted);
        Assert.Empty(output.ConvertedByLot);
        Assert.Equal(0, output.Budget.LostAtEdges);
    }

    [Fact]
    public void NoCavity_OfALotWithoutSelfAbsorption_SendsHalfOfItsLightUp()
    {
        var lot = LineLot("lot", 600, 2, 0, 0.8);
        var film = Film([Layer(1, [new(lot, 1)])], [lot], incidence: Incidence.Normal) with { Backlight = new(SingleLine(450), Incidence.Normal, null) };
        var budget = Solve(film).Budget;
        double absorbed = 1 - Math.Exp(-2);
        Assert.Equal(0.8 * absorbed / 2, budget.Converted, Exact);
        Assert.Equal(0.8 * absorbed / 2, budget.LostBelow, Exact);
        Assert.Equal(0.2 * absorbed, budget.LostInLots[0], Exact);
    }

    [Fact]
    public void PerfectMirrors_WithAbsorption_LoseAllInTheFilm()
    {
        var budget = Solve(TwoLots(cavity: Cavity(1, 1))).Budget;
        Assert.Equal(0, budget.Unconverted);
        Assert.Equal(0, budget.Converted);
        Assert.Equal(1, budget.LostInLots.Sum() + budget.LostInHost, Exact);
    }

    // 1 − R_b R_t T² is 2e-12 here: written as a difference it would be wrong in the fourth digit.
    [Fact]
    public void PerfectMirrors_WithHardlyAnyAbsorption_StillFindItAll()
    {
        var film = Film([Layer(1, [], hostPerMm: 1e-12)], [], Cavity(1, 1), Incidence.Normal);
        Assert.Equal(1, Solve(film).Budget.LostInHost, Exact);
    }

    [Fact]
    public void PerfectMirrors_WithNothingToEndTheLight_AreRefused()
    {
        var source = Assert.Throws<InputException>(() => Solve(Film([Layer(1, [])], [], Cavity(1, 1))));
        Assert.Contains("below_reflectance and above_reflectance are both 1", source.Message, StringComparison.Ordinal);

        var lot = LineLot("lot", 600, 2, 0, 1);
        var emitted = Assert.Throws<InputException>(() => Solve(
            Film([Layer(1, [new(lot, 1)])], [lot], Cavity(1, 1)) with { Backlight = new(SingleLine(450), Incidence.Normal, null) }));
        Assert.Contains("600 nm", emitted.Message, StringComparison.Ordinal);
        Assert.Contains("light of lot", emitted.Message, StringComparison.Ordinal);

        var again = LineLot("lot", 600, 2, 1, 1);
        var cascade = Assert.Throws<InputException>(() => Solve(
            Film([Layer(1, [new(again, 1)])], [again], Cavity(1, 1)) with { Backlight = new(SingleLine(450), Incidence.Normal, null) }));
        Assert.Contains("caught for ever", cascade.Message, StringComparison.Ordinal);
    }

    // A yield of 1 and a return short of 1 by 1e-10: each photon is absorbed 1e10 times before it leaves, and still is counted.
    [Fact]
    public void NearlyPerfectMirrors_WithYieldOne_DeliverEveryPhoton()
    {
        var lot = LineLot("lot", 600, 2, 1, 1, depthElsewhere: 1);
        var budget = Solve(Film([Layer(1, [new(lot, 1)])], [lot], Cavity(1, 1 - 1e-10))).Budget;
        Assert.True(budget.Excitations[0] > 1e8);
        Assert.Equal(1, budget.Sum, Exact);
        Assert.Equal(1, budget.Converted + budget.Unconverted, Exact);
    }

    [Fact]
    public void Bypass_OfAllLightWithoutReturn_NeverMeetsTheFilm()
    {
        var budget = Solve(TwoLots(cavity: Cavity(0.95, 0, 0.1, bypass: 1))).Budget;
        Assert.Equal(0.9, budget.Unconverted, Exact);
        Assert.Equal(0.1, budget.LostAbove, Exact);
        Assert.Equal(0, budget.Converted);
    }

    [Fact]
    public void Bypass_OfAllLightWithReturn_IsLightFromAbove()
    {
        // R_t falls on the film from above; without a reflector below nothing comes back unconverted.
        var film = OneBox(0.25, Cavity(0, 0.5, bypass: 1));
        var budget = Solve(film).Budget;
        Assert.Equal(0.5, budget.Unconverted, Exact);
        Assert.Equal(0.5 * 0.25, budget.LostInHost, Exact);
        Assert.Equal(0.5 * 0.75, budget.LostBelow, Exact);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    public void Yield_AtItsEnds_IsDarkOrLossless(double yield)
    {
        DotLot lot = Lot("lot", 560, 30, 2, yield);
        var budget = Solve(Film([Layer(0.1, [new(lot, 8)])], [lot], Cavity(1, 0.5))).Budget;
        if (yield == 0)
        {
            Assert.Equal(0, budget.Converted);
            Assert.Equal(budget.SourceAbsorbedBy[0], budget.LostInLots[0], Exact);
        }
        else
        {
            Assert.Equal(1, budget.Unconverted + budget.Converted, Exact);
            Assert.Equal(0, budget.LostInLots[0]);
        }
    }

    // Either side of the switch from series to closed form, and at depths where each alone would fail.
    [Theory]
    [InlineData(1e-300)]
    [InlineData(1e-17)]
    [InlineData(1e-9)]
    [InlineData(1e-3)]
    [InlineData(0.49999)]
    [InlineData(0.50001)]
    [InlineData(20)]
    [InlineData(1e5)]
    [InlineData(1e200)]
    public void Depth_FromNothingToHuge_KeepsItsDigits(double depth)
    {
        var lot = LineLot("lot", 600, depth, depth, 0);
        var film = Film([Layer(1, [new(lot, 1)])], [lot], incidence: Incidence.Normal) with { Backlight = new(SingleLine(450), Incidence.Normal, null) };
        var budget = Solve(film).Budget;
        // 1 − exp(−x) = 2 exp(−x/2) sinh(x/2), which loses nothing at small x.
        double expected = depth < 1 ? 2 * Math.Exp(-depth / 2) * Math.Sinh(depth / 2) : 1 - Math.Exp(-depth);
        Assert.Equal(1, budget.SourceAbsorbedBy[0] / expected, 1e-14);

        // And for emitted light, 1 − (1 − exp(−x))/x: half of x for thin films.
        var emitting = LineLot("lot", 600, 1, depth, 1e-3);
        var emitted = Solve(film with { Lots = [emitting], Layers = [Layer(1, [new(emitting, 1)])], BeerLambertPaths = new(1, 1) }).Budget;
        double again = 1e3 * (1 - (emitted.SourceAbsorbedBy[0] / emitted.Excitations[0]));
        Assert.Equal(depth < 1e-3 ? depth / 2 : 1 - (expected / depth), again, 1e-3 * Math.Min(1, depth) + 1e-12);
    }

    [Fact]
    public void NumbersThatAreNone_AreRefusedByKey()
    {
        var film = TwoLots();
        var layer = film.Layers[0];
        Refuses(film with { Layers = [layer with { ThicknessMm = double.NaN }] }, "layers[0]", "NaN");
        Refuses(film with { Layers = [layer with { ThicknessMm = 0 }] }, "layers[0]", "above 0");
        Refuses(film with { Layers = [layer with { Dots = [layer.Dots[0] with { LoadingMgPerMl = double.NaN }] }] }, "dots[green]", "NaN");
        Refuses(film with { Layers = [layer with { Dots = [layer.Dots[0] with { LoadingMgPerMl = -1 }] }] }, "dots[green]", "-1");
        Refuses(film with { Layers = [layer with { RefractiveIndex = 0.9 }] }, "refractive_index", "0.9");
        Refuses(film with { Layers = [] }, "layers", "at least one");
        Refuses(film with { Cavity = Cavity(bypass: double.NaN) }, "bypass_share", "NaN");
        Refuses(film with { Cavity = Cavity(below: 1.2) }, "below_reflectance", "1.2 at 360 nm");
        Refuses(film with { Lots = [film.Lots[0] with { QuantumYieldShare = 1.1 }, film.Lots[1]] }, "lots[green].quantum_yield", "1.1");
        Refuses(film with { Lots = [film.Lots[0] with { Emission = film.Lots[0].Emission.ScaledBy(2) }, film.Lots[1]] }, "lots[green].emission", "sum to 2");
        Refuses(film with { Backlight = film.Backlight with { Photons = film.Backlight.Photons.ScaledBy(0.5) } }, "backlight.spectrum", "sum to 0.5");
        Refuses(film with { BeerLambertPaths = new(0.5, null) }, "beer_lambert.pump_path", "0.5");
        Refuses(film with { Lots = [film.Lots[0]] }, "dots[red]", "red is not one");

        static void Refuses(Film film, string key, string found)
        {
            var fault = Assert.Single(Assert.Throws<InputException>(() => Solve(film)).Faults);
            Assert.Contains(key, fault.File, StringComparison.Ordinal);
            Assert.Contains(found, fault.Message, StringComparison.Ordinal);
        }
    }

    [Fact]
    public void OverflowingDepth_IsANumericalFailure()
    {
        var lot = Lot("lot", Spectrum.Gaussian<PhotonPerNm>(600, 30), _ => 1e308, 0.5);
        Assert.Throws<NumericalFailureException>(() => Solve(Film([Layer(1, [new(lot, 1e10)])], [lot])));
    }

    [Fact]
    public void Warnings_NameTheKeysNotUsed()
    {
        var film = TwoLots() with { Sheet = new(600, null) };
        string first = Solve(film).Warnings[0];
        Assert.Contains("layers[0].scattering_per_mm", first, StringComparison.Ordinal);
        Assert.Contains("layers[0].anisotropy", first, StringComparison.Ordinal);
        Assert.Contains("refractive_index", first, StringComparison.Ordinal);
        Assert.Contains("sheet.width_mm", first, StringComparison.Ordinal);
        Assert.DoesNotContain("order of the layers", first, StringComparison.Ordinal);

        string clear = Solve(Film([Layer(0.1, []), Layer(0.1, [])], [])).Warnings[0];
        Assert.DoesNotContain("scattering_per_mm", clear, StringComparison.Ordinal);
        Assert.Contains("order of the layers", clear, StringComparison.Ordinal);
    }

    // Source: ∫ R sin 2θ dθ by hand: for R = 1 − 2θ/π over 0 to π/2 it is 1/2.
    [Fact]
    public void ReturnByAngle_IsTakenAtItsLambertianMean_AndSaysSo()
    {
        var film = OneBox(0.25, Cavity(0.95) with { AboveReflectanceByAngle = new([0, 90], [1, 0], "return") });
        var output = Solve(film);
        Published.AssertMatches(".511727", output.Budget.Unconverted, "as the flat return of one half");
        Assert.Contains(output.Warnings, w => w.Contains("above_reflectance", StringComparison.Ordinal) && w.Contains("0.5", StringComparison.Ordinal));
    }

    // A profile that is flat is Lambertian light; one at the normal is a beam.
    [Theory]
    [InlineData(0, 90, 1.14590)]
    [InlineData(0, 0.5, 1)]
    public void Profile_TakesItsMeanPath(double fromDeg, double toDeg, double path)
    {
        var table = toDeg == 90 ? new AngleTable([fromDeg, toDeg], [1, 1], "flat") : new AngleTable([fromDeg, toDeg, toDeg + 0.5, 90], [1, 1, 0, 0], "beam");
        var film = Film([Layer(1, [], hostPerMm: 1)], [], incidence: new(IncidenceKind.Profile, table));
        Assert.Equal(path, -Math.Log(Solve(film).Budget.Unconverted), 2e-4);
    }

    [Fact]
    public void GivenPaths_ReplaceTheDefaults()
    {
        var film = Film([Layer(1, [], hostPerMm: 1)], []) with { BeerLambertPaths = new(2.5, null) };
        Assert.Equal(2.5, -Math.Log(Solve(film).Budget.Unconverted), 1e-12);
    }
}
