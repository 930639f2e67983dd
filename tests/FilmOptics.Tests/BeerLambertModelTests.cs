using Colorimetry;
using CsCheck;
using static FilmOptics.Tests.FilmGenerators;

namespace FilmOptics.Tests;

public sealed partial class BeerLambertModelTests
{
    private const double Exact = 1e-12;

    private static FilmOutput Solve(Film film) => new BeerLambertModel().Solve(film, TestContext.Current.CancellationToken);

    // A film of one wavelength at 450 nm whose host absorbs a given share of one pass; light along the normal.
    private static Film OneBox(double absorbedPerPass, Cavity cavity) => Film(
        [Layer(1, [], hostPerMm: -Math.Log(1 - absorbedPerPass))], [], cavity, Incidence.Normal) with
    {
        Backlight = new(SingleLine(450), Incidence.Normal, null),
    };

    private static Spectrum<PhotonPerNm> SingleLine(double at) => Spectrum.Sampled<PhotonPerNm>(nm => nm == at ? 1 : 0, "one wavelength");

    // A lot that absorbs at 450 nm and at its own single emission wavelength, as Napierian depths at 1 mg/mL and 1 mm.
    private static DotLot LineLot(string name, double emitsAt, double depthAt450, double depthAtEmission, double yieldShare, double depthElsewhere = 0) => Lot(
        name,
        SingleLine(emitsAt),
        nm => (nm == 450 ? depthAt450 : nm == emitsAt ? depthAtEmission : depthElsewhere) / DotLot.PerMmFromDecadicPerCm,
        yieldShare);

    // Source: one-box recycling cavity, six digits, computed with independent code from the bounces themselves.
    [Theory]
    [InlineData(.25, .5, .95, ".511727", ".469083", ".019190")]
    [InlineData(.10, .5, .95, ".731410", ".235677", ".032913")]
    [InlineData(.25, .6, .98, ".448263", ".541651", ".010086")]
    [InlineData(.40, .5, .90, ".357995", ".620525", ".021480")]
    public void Cavity_OfOneBox_MatchesTheRow(double absorbed, double above, double below, string @out, string inFilm, string lost)
    {
        var budget = Solve(OneBox(absorbed, Cavity(below, above))).Budget;
        Published.AssertMatches(@out, budget.Unconverted, "out");
        Published.AssertMatches(inFilm, budget.LostInHost, "absorbed");
        Published.AssertMatches(lost, budget.LostBelow, "lost below");
    }

    // Source: Beer 1852, Lambert 1760: a clear path attenuates by exp(−kd); the path of Lambertian light, 2n²(1 − √(1 − 1/n²)), computed with independent code.
    [Theory]
    [InlineData(1.40, "1.17657")]
    [InlineData(1.45, "1.16000")]
    [InlineData(1.50, "1.14590")]
    [InlineData(1.55, "1.13376")]
    [InlineData(1.60, "1.12320")]
    public void LambertianLight_OfAnIndex_TakesTheMeanPath(double index, string path)
    {
        var film = Film([Layer(1, [], index, hostPerMm: 1)], []);
        Published.AssertMatches(path, -Math.Log(Solve(film).Budget.Unconverted), $"path at n = {index}");
    }

    [Fact]
    public void Absorbance_AlongTheNormal_IsTheDecadicOne()
    {
        // 3 per cm at 1 mg/mL, 2 mg/mL and 0.5 mm: 0.3 decades.
        var lot = Lot("grey", Spectrum.Gaussian<PhotonPerNm>(600, 30), _ => 3, 0.5);
        var budget = Solve(Film([Layer(0.5, [new(lot, 2)])], [lot], incidence: Incidence.Normal)).Budget;
        Assert.Equal(Math.Pow(10, -0.3), budget.Unconverted, Exact);
        Assert.Equal(1 - Math.Pow(10, -0.3), budget.SourceAbsorbedBy[0], Exact);
    }

    // Source: generation series q P + q(1 − P) q P + … = qP/(1 − q(1 − P)); out per absorbed photon and its P, computed with independent code.
    [Theory]
    [InlineData(.24536, .8, ".49532")]
    [InlineData(.24536, .9, ".68830")]
    [InlineData(.24536, .95, ".82338")]
    [InlineData(.24536, .99, ".96046")]
    [InlineData(.18368, .8, ".42354")]
    [InlineData(.18368, .95, ".77728")]
    [InlineData(.18368, .99, ".94787")]
    public void Generations_OfOneLot_SumToTheClosedForm(double escape, double yield, string printed)
    {
        // The quick model has no faces: the depth at the emission line is chosen so that (1 − exp(−x))/x is the escape probability.
        double depth = DepthOfEscape(escape);
        var lot = LineLot("lot", 600, 5, depth, yield);
        var film = Film([Layer(1, [new(lot, 1)])], [lot], incidence: Incidence.Normal) with
        {
            Backlight = new(SingleLine(450), Incidence.Normal, null),
            BeerLambertPaths = new(1, 1),
        };
        var budget = Solve(film).Budget;
        double perAbsorbed = (budget.Converted + budget.LostBelow) / budget.SourceAbsorbedBy[0];
        // The printed P has five digits, which moves the fifth of the result by up to two units.
        Assert.Equal(double.Parse(printed, System.Globalization.CultureInfo.InvariantCulture), perAbsorbed, 3e-5);
        Assert.Equal(yield * escape / (1 - (yield * (1 - escape))), perAbsorbed, 1e-10);
        Assert.Equal(1 / (1 - (yield * (1 - escape))), budget.Excitations[0] / budget.SourceAbsorbedBy[0], 1e-10);
    }

    [Fact]
    public void Cascade_OfThreeLots_EqualsGenerationByGeneration()
    {
        var film = ThreeLots(Cavity(0.97, 0.5, 0.03, 0.04));
        var output = Solve(film);
        // Each generation alone: lots with the yields of one emission only. Take the matrix from films with a single emitting lot.
        int count = film.Lots.Count;
        var first = output.Budget.SourceAbsorbedBy;
        var per = new double[count, count];
        for (int j = 0; j < count; j++)
        {
            // With every other yield 0, the excitations of i beyond the first are P_ij φ_j J_j.
            var alone = film with { Lots = [.. film.Lots.Select((lot, i) => i == j ? lot : lot with { QuantumYieldShare = 0 })] };
            alone = alone with { Layers = [.. alone.Layers.Select(l => l with { Dots = [.. l.Dots.Select(d => d with { Lot = alone.Lots[film.IndexOf(d.Lot)] })] })] };
            var budget = Solve(alone).Budget;
            for (int i = 0; i < count; i++)
                per[i, j] = (budget.Excitations[i] - first[i]) / budget.Excitations[j];
        }

        double[] total = [.. first], generation = [.. first];
        for (int g = 0; g < 400; g++)
        {
            generation = [.. Enumerable.Range(0, count).Select(i => Enumerable.Range(0, count).Sum(j => per[i, j] * generation[j]))];
            for (int i = 0; i < count; i++)
                total[i] += generation[i];
        }

        for (int i = 0; i < count; i++)
            Assert.Equal(total[i], output.Budget.Excitations[i], 1e-10);
    }

    [Fact]
    public void Budget_OfRandomFilms_ClosesWithEveryLineAShare()
    {
        int solved = 0, caught = 0;
        Films.Sample(
            film =>
            {
                FilmOutput output;
                try
                {
                    output = Solve(film);
                }
                catch (InputException e) when (IsCaught(film, e))
                {
                    Interlocked.Increment(ref caught);
                    return;
                }

                Interlocked.Increment(ref solved);
                var budget = output.Budget;
                Assert.Equal(1, budget.Sum, 1e-12);
                Assert.All(
                    [budget.Unconverted, budget.Converted, budget.LostBelow, budget.LostAbove, budget.LostInHost, .. budget.LostInLots, .. budget.SourceAbsorbedBy],
                    line => Assert.InRange(line, 0, 1 + 1e-12));
                Assert.Equal(budget.Unconverted, output.Unconverted.Integral, 1e-12);
                Assert.Equal(budget.Converted, output.ConvertedByLot.Sum(lot => lot.Integral), 1e-12);
            },
            iter: 10_000);
        Assert.True(solved > 9 * caught, $"{solved} solved, {caught} refused");
    }

    [Fact]
    public void TwoHalfLayers_OfAnyFilm_AreOne() => Films.Where(CanEnd).Sample(
        film =>
        {
            var halves = film with { Layers = [.. film.Layers.SelectMany(l => Enumerable.Repeat(l with { ThicknessMm = l.ThicknessMm / 2 }, 2))] };
            AssertSame(Solve(film), Solve(halves), 1e-10);
        },
        iter: 200);

    [Fact]
    public void ClearBarrier_OfAnyIndex_ChangesNothing()
    {
        var film = TwoLots();
        AssertSame(
            Solve(film),
            Solve(film with { Layers = [Layer(0.2, [], index: 1.65), .. film.Layers, Layer(0.05, [], index: 1)] }),
            Exact);
    }

    [Fact]
    public void Leakage_WithMoreOfALot_Falls()
    {
        double last = 1;
        for (double mgPerMl = 0; mgPerMl <= 200; mgPerMl = (mgPerMl * 1.4) + 0.1)
        {
            double leakage = Solve(TwoLots(greenMgPerMl: mgPerMl, cavity: Cavity(0.95, 0.5))).Budget.Unconverted;
            Assert.True(leakage < last, $"{leakage} at {mgPerMl} mg/mL, {last} before");
            last = leakage;
        }
    }

    [Fact]
    public void SplitLot_IntoTwoOfTheSameKind_ChangesNothing()
    {
        var film = TwoLots();
        var dots = film.Layers[0].Dots;
        var twin = dots[0].Lot with { Name = "twin" };
        var split = film with
        {
            Lots = [.. film.Lots, twin],
            Layers = [film.Layers[0] with { Dots = [dots[0] with { LoadingMgPerMl = 2 }, dots[1], new(twin, 4)] }],
        };
        var (one, two) = (Solve(film), Solve(split));
        Assert.Equal(one.Budget.Excitations[0], two.Budget.Excitations[0] + two.Budget.Excitations[2], Exact);
        Assert.Equal(one.Budget.Unconverted, two.Budget.Unconverted, Exact);
        Assert.Equal(one.Budget.Converted, two.Budget.Converted, Exact);
        // The twin has two thirds of the dots, so it has two thirds of the light.
        Assert.Equal(2 * two.ConvertedByLot[0].Integral, two.ConvertedByLot[2].Integral, Exact);
    }

    private static Film ThreeLots(Cavity cavity)
    {
        DotLot[] lots = [Lot("green", 525, 30, 2, 0.95), Lot("yellow", 575, 40, 2.5, 0.85), Lot("red", 630, 35, 3, 0.9)];
        return Film([Layer(0.1, [new(lots[0], 9), new(lots[1], 6), new(lots[2], 4)], hostPerMm: 0.1)], lots, cavity);
    }

    private static double DepthOfEscape(double share)
    {
        double low = 0, high = 100;
        for (int i = 0; i < 200; i++)
        {
            double middle = (low + high) / 2;
            if ((1 - Math.Exp(-middle)) / middle > share)
                low = middle;
            else
                high = middle;
        }

        return low;
    }

    private static bool IsCaught(Film film, InputException e) =>
        !CanEnd(film) && e.Message.Contains("cavity", StringComparison.Ordinal);

    // Two perfect mirrors at some wavelength are the one thing that can catch light for ever.
    private static bool CanEnd(Film film) =>
        film.Cavity.BelowReflectance.Peak < 1 || (film.Cavity.AboveReflectanceByAngle is null && film.Cavity.AboveReflectance.Peak < 1)
        || film.Cavity.AboveReflectanceByAngle is not null;

    private static void AssertSame(FilmOutput expected, FilmOutput found, double tolerance)
    {
        Assert.Equal(expected.Budget.Unconverted, found.Budget.Unconverted, tolerance);
        Assert.Equal(expected.Budget.Converted, found.Budget.Converted, tolerance);
        Assert.Equal(expected.Budget.LostBelow, found.Budget.LostBelow, tolerance);
        Assert.Equal(expected.Budget.LostAbove, found.Budget.LostAbove, tolerance);
        Assert.Equal(expected.Budget.LostInHost, found.Budget.LostInHost, tolerance);
        for (int i = 0; i < expected.Budget.Excitations.Count; i++)
        {
            Assert.Equal(expected.Budget.Excitations[i], found.Budget.Excitations[i], tolerance);
            Assert.Equal(expected.ConvertedByLot[i].Integral, found.ConvertedByLot[i].Integral, tolerance);
        }
    }
}
