using Colorimetry;
using CsCheck;
using FilmOptics.PhotonTracing;

namespace FilmOptics.Tests.PhotonTracing;

public sealed class PhotonTracingModelTests
{
    private static CancellationToken Token => TestContext.Current.CancellationToken;

    [Fact]
    public void SameSeed_OnOneAndTwoThreads_GivesTheSameBits()
    {
        var outputs = new[] { 1, 2 }.Select(threads =>
            new PhotonTracingModel(150_000, seed: 61, threads).Solve(ReferenceFilms.Gap, Token)).ToArray();
        Assert.Equal(outputs[0].Total.Samples, outputs[1].Total.Samples);
        Assert.Equal(outputs[0].Budget.LostInHost, outputs[1].Budget.LostInHost);
        Assert.Equal(outputs[0].Budget.Excitations, outputs[1].Budget.Excitations);
        Assert.Equal(outputs[0].Tracing!.StandardError.Excitations, outputs[1].Tracing!.StandardError.Excitations);
        Assert.Equal(outputs[0].Tracing!.Interactions, outputs[1].Tracing!.Interactions);
        var other = new PhotonTracingModel(150_000, seed: 62).Solve(ReferenceFilms.Gap, Token);
        Assert.NotEqual(outputs[0].Budget.LostInHost, other.Budget.LostInHost);
    }

    [Fact]
    public void Fates_OfAnyFilm_SumToThePhotonsExactly() => RandomFilm.Sample(
        film =>
        {
            var traced = new TracedFilm(film);
            var (lanes, scalar) = (new Tally(film.Lots.Count), new Tally(film.Lots.Count));
            LaneTracer.Trace(new LaneFilm(traced), Xoshiro256.ForBlock(5, 0), 3001, lanes);
            ScalarTracer.Trace(traced, Xoshiro256.ForBlock(5, 0), 501, scalar);
            Assert.Equal(3001, lanes.Fates);
            Assert.Equal(501, scalar.Fates);
            Assert.All(lanes.Excitations, (count, lot) => Assert.True(count >= lanes.SourceAbsorbedBy[lot] && count >= lanes.LostInLots[lot]));
        },
        iter: 60);

    [Fact]
    public void LanesAndScalarReference_AgreeOnRandomFilms()
    {
        // Some 100 comparisons of films that are drawn anew each time: 5 errors are met by chance in one run of 17 000.
        RandomFilm.Sample(
            film =>
            {
                var traced = new TracedFilm(film);
                var (lanes, scalar) = (new Tally(film.Lots.Count), new Tally(film.Lots.Count));
                LaneTracer.Trace(new LaneFilm(traced), Xoshiro256.ForBlock(6, 0), 200_000, lanes);
                ScalarTracer.Trace(traced, Xoshiro256.ForBlock(6, 1), 40_000, scalar);
                var (fast, slow) = (
                    new TracedOutput(film, lanes, 200_000, 6).Build("lanes"), new TracedOutput(film, scalar, 40_000, 6).Build("scalar"));
                foreach (var (name, line) in BudgetLines)
                {
                    // An impossible fate has no error of its own: a few photons are allowed.
                    Agreement.AssertWithin(
                        line(slow.Budget), Math.Sqrt(Math.Pow(line(slow.Tracing!.StandardError), 2) + 1e-10),
                        line(fast.Budget), line(fast.Tracing!.StandardError), $"{film.Title}: {name}", 5);
                }
            },
            iter: 12,
            seed: "000000000001");
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void ClearFilm_SendsTheGuidedShareOfItsEmissionToTheEdges(bool isSheetOfAbsorbingHost)
    {
        // Closed form: isotropic light outside the escape cones is √(1 − 1/n²) of all. Host absorption α takes all but
        // exp(−α w) of it before a flight of the sheet's width w.
        const double absorption = 0.002, width = 300;
        var film = ReferenceFilms.CaseA;
        double alpha = isSheetOfAbsorbingHost ? absorption : 0;
        film = film with
        {
            Layers = [film.Layers[0] with { HostAbsorption = ReferenceFilms.Flat<PerMm>(alpha) }],
            Sheet = isSheetOfAbsorbingHost ? new(width, 200) : null,
        };
        var output = new PhotonTracingModel(300_000, seed: 63).Solve(film, Token);
        double emitted = (0.95 * output.Budget.Excitations[0]) + (0.90 * output.Budget.Excitations[1]);
        double expected = emitted * Math.Sqrt(1 - (1 / 2.25)) * Math.Exp(-alpha * width);
        double error = Math.Sqrt(expected * (1 - expected) / output.Tracing!.Photons);
        Agreement.AssertWithin(expected, 1e-9, output.Budget.LostAtEdges, error, "lost at edges");
        Assert.Contains(output.Warnings, warning => warning.Contains("guided to the edges", StringComparison.Ordinal));
        output.Budget.RequireClosed(1e-12);
    }

    [Fact]
    public void GuidedLight_ThatRoamsBetweenClearLayers_EndsAtTheEdges()
    {
        var film = ReferenceFilms.CaseA;
        var clear = film.Layers[0] with { Name = "clear", Dots = [], RefractiveIndex = 1.55, HostAbsorption = ReferenceFilms.Flat<PerMm>(0) };
        film = film with { Layers = [film.Layers[0] with { HostAbsorption = ReferenceFilms.Flat<PerMm>(0) }, clear], Sheet = new(20, null) };
        var output = new PhotonTracingModel(100_000, seed: 64).Solve(film, Token);
        double emitted = (0.95 * output.Budget.Excitations[0]) + (0.90 * output.Budget.Excitations[1]);
        double expected = emitted * Math.Sqrt(1 - (1 / 2.25));
        Agreement.AssertWithin(expected, 1e-9, output.Budget.LostAtEdges, Math.Sqrt(expected / 100_000), "lost at edges");
    }

    [Fact]
    public void StandardErrors_AreTheSpreadOverSeeds()
    {
        const int runs = 40;
        var outputs = Enumerable.Range(0, runs)
            .Select(seed => new PhotonTracingModel(20_000, (ulong)seed + 100).Solve(ReferenceFilms.CaseD, Token)).ToArray();
        foreach (var (name, line) in BudgetLines)
            AssertSpread(name, output => line(output.Budget), output => line(output.Tracing!.StandardError));
        AssertSpread(
            "white x",
            output => Tristimulus.Of(output.Total.ToPower(), StandardObserver.Cie1931).Chromaticity.X,
            output => output.Tracing!.ChromaticityStandardError(StandardObserver.Cie1931).X);
        AssertSpread(
            "white y",
            output => Tristimulus.Of(output.Total.ToPower(), StandardObserver.Cie1931).Chromaticity.Y,
            output => output.Tracing!.ChromaticityStandardError(StandardObserver.Cie1931).Y);

        void AssertSpread(string what, Func<FilmOutput, double> figure, Func<FilmOutput, double> error)
        {
            double mean = outputs.Average(figure), stated = outputs.Average(error);
            if (stated == 0)
            {
                Assert.All(outputs, output => Assert.Equal(mean, figure(output)));
                return;
            }

            double chiSquared = outputs.Sum(output => Math.Pow((figure(output) - mean) / stated, 2));
            Agreement.AssertChiSquared(chiSquared, runs - 1, what);
        }
    }

    [Fact]
    public void Bypass_LeavesUnconvertedPastTheSheets()
    {
        // A film that absorbs all: what leaves is the bypass, past sheets that return 30 % (to a black film) and absorb 10 %.
        var film = ReferenceFilms.Slab(1, 60, 0, 0, Incidence.Normal);
        film = film with
        {
            Cavity = new(ReferenceFilms.Flat<Fraction>(0), ReferenceFilms.Flat<Fraction>(0.3), ReferenceFilms.Flat<Fraction>(0.1), 0.2),
        };
        var output = new PhotonTracingModel(300_000, seed: 65).Solve(film, Token);
        var error = output.Tracing!.StandardError;
        Agreement.AssertWithin(0.2 * 0.6, 1e-9, output.Budget.Unconverted, error.Unconverted, "unconverted");
        Agreement.AssertWithin(0.2 * 0.1, 1e-9, output.Budget.LostAbove, error.LostAbove, "lost above");
        Agreement.AssertWithin(0.8 + (0.2 * 0.3), 1e-9, output.Budget.LostInHost, error.LostInHost, "lost in host");
    }

    [Fact]
    public void Interruption_KeepsWhatWasTracedAndSaysSo()
    {
        using var source = new CancellationTokenSource();
        var progress = new Listener(_ => source.Cancel());
        var output = new PhotonTracingModel(200_000_000, seed: 66, threads: 2, progress).Solve(ReferenceFilms.CaseD, source.Token);
        Assert.InRange(output.Tracing!.Photons, 1, 199_999_999);
        Assert.Equal(200_000_000, output.Tracing.PhotonsAsked);
        Assert.StartsWith("Interrupted", output.Warnings[0], StringComparison.Ordinal);
        output.Budget.RequireClosed(1e-12);
        Assert.InRange(progress.Last!.StandardErrorShare, 1e-6, 1e-2);
    }

    [Fact]
    public void Interruption_BeforeTheFirstBlock_IsAnInterruption()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();
        Assert.Throws<OperationCanceledException>(() => new PhotonTracingModel(1000).Solve(ReferenceFilms.CaseC, source.Token));
    }

    [Theory]
    [InlineData(0, 1)]
    [InlineData(10, 0)]
    public void Model_WithoutPhotonsOrThreads_IsRefused(long photons, int threads) =>
        Assert.Throws<ArgumentOutOfRangeException>(() => new PhotonTracingModel(photons, 1, threads));

    [Fact]
    public void NegativeCoefficient_IsRefusedByLayerAndWavelength()
    {
        var film = ReferenceFilms.CaseC;
        film = film with { Layers = [film.Layers[0] with { Scattering = ReferenceFilms.Flat<PerMm>(-1000) }] };
        var refusal = Assert.Throws<NumericalFailureException>(() => new PhotonTracingModel(1000).Solve(film, Token));
        Assert.Contains("Layer 'dots'", refusal.Message, StringComparison.Ordinal);
        Assert.Contains("360 nm", refusal.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void FilmOfMoreLayersThanLanesTake_IsTracedAllTheSame()
    {
        var film = ReferenceFilms.CaseC;
        const int parts = LaneFilm.MostLayers + 1;
        var part = film.Layers[0] with { ThicknessMm = film.Layers[0].ThicknessMm / parts };
        var split = film with { Layers = [.. Enumerable.Range(0, parts).Select(i => part with { Name = $"part {i}" })] };
        Assert.False(PhotonTracingModel.UsesLanes(split));
        var whole = new PhotonTracingModel(200_000, seed: 67).Solve(film, Token);
        var divided = new PhotonTracingModel(40_000, seed: 68).Solve(split, Token);
        foreach (var (name, line) in BudgetLines)
        {
            Agreement.AssertWithin(
                line(whole.Budget), line(whole.Tracing!.StandardError), line(divided.Budget), line(divided.Tracing!.StandardError), name);
        }
    }

    internal static IEnumerable<(string Name, Func<PhotonBudget, double> Line)> BudgetLines =>
    [
        ("unconverted", budget => budget.Unconverted),
        ("converted", budget => budget.Converted),
        ("lost below", budget => budget.LostBelow),
        ("lost above", budget => budget.LostAbove),
        ("lost in host", budget => budget.LostInHost),
        ("lost at edges", budget => budget.LostAtEdges),
        ("lost in lots", budget => budget.LostInLots.Sum()),
        ("excitations", budget => budget.Excitations[0]),
    ];

    /// <summary>Invented films of one to four layers with unequal indices, gaps, profiles and returns by angle.</summary>
    private static Gen<Film> RandomFilm => Gen.Select(
        Gen.Select(Gen.Double[1.3, 1.8], Gen.Double[0.01, 0.2], Gen.Double[0, 40], Gen.Double[-0.3, 0.95], Gen.Double[0, 0.5], Gen.Double[0, 3], Gen.Bool)
            .Array[1, 4],
        Gen.Double[0, 0.97],
        Gen.Double[0, 0.7],
        Gen.Double[0, 0.2],
        Gen.Int[0, 2],
        Gen.Bool,
        Gen.Bool)
        .Select((layers, below, above, bypass, incidence, byAngle, isCut) =>
        {
            var reference = ReferenceFilms.Gap;
            return reference with
            {
                Title = $"{layers.Length} layers",
                Backlight = reference.Backlight with
                {
                    Incidence = incidence switch
                    {
                        0 => Incidence.Lambertian,
                        1 => Incidence.Normal,
                        _ => reference.Backlight.Incidence,
                    },
                },
                Cavity = reference.Cavity with
                {
                    BelowReflectance = ReferenceFilms.Flat<Fraction>(below),
                    AboveReflectance = ReferenceFilms.Flat<Fraction>(above),
                    AboveReflectanceByAngle = byAngle ? reference.Cavity.AboveReflectanceByAngle : null,
                    BypassShare = bypass,
                },
                Sheet = isCut ? new(50, 50) : null,
                Layers = [.. layers.Select((layer, i) => Layer(reference, i, layer))],
            };
        });

    private static Layer Layer(
        Film film, int position, (double Index, double Thickness, double Scattering, double G, double Host, double Loading, bool IsAir) layer)
    {
        bool isGap = layer.IsAir && position % 2 == 1;
        return film.Layers[0] with
        {
            Name = $"layer {position}",
            ThicknessMm = layer.Thickness,
            RefractiveIndex = isGap ? 1 : layer.Index,
            Scattering = ReferenceFilms.Flat<PerMm>(isGap ? 0 : layer.Scattering),
            Anisotropy = ReferenceFilms.Flat<MeanCosine>(layer.G),
            HostAbsorption = ReferenceFilms.Flat<PerMm>(isGap ? 0 : layer.Host),
            Dots = isGap ? [] : [new DotLoading(film.Lots[position % 2], layer.Loading)],
        };
    }

    private sealed class Listener(Action<TracingProgress> heard) : IProgress<TracingProgress>
    {
        public TracingProgress? Last { get; private set; }

        public void Report(TracingProgress value)
        {
            Last = value;
            heard(value);
        }
    }
}
