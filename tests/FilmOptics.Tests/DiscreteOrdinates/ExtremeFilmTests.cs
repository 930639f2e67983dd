using Colorimetry;

namespace FilmOptics.Tests.DiscreteOrdinates;

/// <summary>Films at the ends of what a file may say: the right limit, or a refusal.</summary>
public sealed class ExtremeFilmTests
{
    private static CancellationToken Cancellation => TestContext.Current.CancellationToken;

    [Fact]
    public void OpticalDensitySix_PassesAMillionth()
    {
        // Black host without scatter or faces: exp(−x) of a collimated beam (Bouguer–Lambert–Beer).
        double perMm = 6 * Math.Log(10) / 0.1;
        var film = FilmGenerators.Film([FilmGenerators.Layer(0.1, [], index: 1, hostPerMm: perMm)], [], incidence: Incidence.Normal);
        var budget = new DiscreteOrdinatesModel(1e-5).Solve(film, Cancellation).Budget;
        Assert.Equal(1, budget.Unconverted / 1e-6, 1e-6);
        Assert.Equal(1 - 1e-6, budget.LostInHost, 1e-9);
    }

    [Fact]
    public void DotsOfOpticalDensitySix_StillCloseTheBudget()
    {
        var film = FilmGenerators.TwoLots(greenMgPerMl: 260, redMgPerMl: 60);
        Assert.InRange(film.Layers[0].Dots.Sum(dots => dots.AbsorptionPerMm(WavelengthGrid.IndexOf(450))) * 0.1 / Math.Log(10), 6, 9);
        var output = new DiscreteOrdinatesModel(1e-4).Solve(film, Cancellation);
        Assert.Equal(1, output.Budget.Sum, 1e-10);
        Assert.True(output.Budget.Unconverted < 1e-5);
        Assert.True(output.Accuracy!.EstimateShare <= 1e-4);
    }

    [Fact]
    public void NothingAtAll_PassesAllButTheFaces()
    {
        // Two faces of n = 1.5, Lambertian light, no loss between them: T = (1 − r)/(1 + r) at each angle, averaged by 2 μ dμ. Own quadrature.
        double expected = 0;
        const int steps = 200_000;
        for (int i = 0; i < steps; i++)
        {
            double mu = (i + 0.5) / steps, inside = Math.Sqrt(1 - ((1 - (mu * mu)) / 2.25));
            double s = Math.Pow((mu - (1.5 * inside)) / (mu + (1.5 * inside)), 2), p = Math.Pow((inside - (1.5 * mu)) / (inside + (1.5 * mu)), 2);
            double r = (s + p) / 2;
            expected += 2 * mu * (1 - r) / (1 + r) / steps;
        }

        var film = FilmGenerators.Film([FilmGenerators.Layer(0.1, [])], []);
        var budget = new DiscreteOrdinatesModel(1e-5).Solve(film, Cancellation).Budget;
        Assert.Equal(expected, budget.Unconverted, 1e-5);
        Assert.Equal(1, budget.Unconverted + budget.LostBelow, 1e-12);
    }

    [Fact]
    public void ASingleWavelength_IsAFilmLikeAnyOther()
    {
        var film = FilmGenerators.TwoLots();
        var line = new double[WavelengthGrid.Count];
        line[WavelengthGrid.IndexOf(450)] = 1;
        var output = new DiscreteOrdinatesModel(1e-5).Solve(film with { Backlight = film.Backlight with { Photons = Spectrum.FromSamples<PhotonPerNm>(line, "laser") } }, Cancellation);
        Assert.Equal(1, output.Budget.Sum, 1e-10);
        Assert.Equal(output.Budget.Unconverted, output.Unconverted[450], 1e-15);
        Assert.True(output.Budget.Converted > 0.2);
    }

    [Fact]
    public void AThousandLayers_AreTheOneTheyMakeUp()
    {
        // Hosts that differ by less than matters, so that no two neighbours count as one layer.
        var lot = FilmGenerators.Lot("green", 530, 28, 2.2, 0.92);
        var one = FilmGenerators.Film([FilmGenerators.Layer(0.2, [], hostPerMm: 0.3, scatteringPerMm: 10)], [lot], FilmGenerators.Cavity(0.9, 0.4));
        var many = one with
        {
            Layers = [.. Enumerable.Range(0, 1000).Select(i => FilmGenerators.Layer(0.0002, [], hostPerMm: i % 2 == 0 ? 0.3 : 0.3 + 1e-9, scatteringPerMm: 10) with { Name = $"layer {i}" })],
        };
        var (whole, parts) = (new DiscreteOrdinatesModel(1e-4).Solve(one, Cancellation).Budget, new DiscreteOrdinatesModel(1e-4).Solve(many, Cancellation).Budget);
        Assert.Equal(whole.Unconverted, parts.Unconverted, 1e-8);
        Assert.Equal(whole.LostInHost, parts.LostInHost, 1e-8);
        Assert.Equal(1, parts.Sum, 1e-10);
    }

    [Fact]
    public void TwoHalfLayers_AreOne()
    {
        var film = FilmGenerators.TwoLots();
        var half = film.Layers[0] with { ThicknessMm = 0.05 };
        var halves = film with { Layers = [half with { Name = "lower" }, half with { Name = "upper", HostAbsorption = Spectrum.Flat<PerMm>(0.002 + 1e-12, "host") }] };
        var (whole, parts) = (new DiscreteOrdinatesModel(1e-5).Solve(film, Cancellation), new DiscreteOrdinatesModel(1e-5).Solve(halves, Cancellation));
        Assert.Equal(0, FilmOptics.DiscreteOrdinates.OutputError.Between(whole, parts), 1e-5);
    }

    [Theory]
    [InlineData(0, 0)]
    [InlineData(1, 0)]
    [InlineData(0, 1)]
    [InlineData(1, 1)]
    public void ReturnsOfNothingAndOfEverything_CloseTheBudget(double below, double above)
    {
        var output = new DiscreteOrdinatesModel(1e-4).Solve(FilmGenerators.TwoLots(cavity: FilmGenerators.Cavity(below, above)), Cancellation);
        Assert.Equal(1, output.Budget.Sum, 1e-10);
        Assert.Equal(below == 1, output.Budget.LostBelow == 0);
        Assert.Equal(above == 1, output.Budget.Unconverted + output.Budget.Converted < 1e-12);
    }

    [Fact]
    public void LotsWithoutLoading_AreAClearFilm()
    {
        var (none, empty) = (FilmGenerators.TwoLots(0, 0), FilmGenerators.TwoLots());
        empty = empty with { Layers = [empty.Layers[0] with { Dots = [] }] };
        var (zero, bare) = (new DiscreteOrdinatesModel(1e-5).Solve(none, Cancellation).Budget, new DiscreteOrdinatesModel(1e-5).Solve(empty, Cancellation).Budget);
        Assert.Equal(bare.Unconverted, zero.Unconverted, 1e-6);
        Assert.Equal(0, zero.Converted);
    }
}
