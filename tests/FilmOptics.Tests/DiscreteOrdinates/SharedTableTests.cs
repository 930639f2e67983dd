using Colorimetry;
using CsCheck;
using FilmOptics.DiscreteOrdinates;

namespace FilmOptics.Tests.DiscreteOrdinates;

/// <summary>Tables over absorption and coarser wavelengths stand for a solve of each wavelength.</summary>
public sealed class SharedTableTests
{
    private static readonly Effort Shared = new(6, 8, 8);

    [Fact]
    public void Table_OverAbsorption_GivesWhatEachWavelengthGives() => FilmGenerators.Lots.Array[1, 3].Select(Gen.Double[0.1, 40], Gen.Double[0.5, 60], Gen.Double[0, 0.98]).Sample(
        (lots, loading, scattering, below) =>
        {
            DotLot[] named = [.. lots.Select((lot, i) => lot with { Name = $"lot {i}" })];
            var film = FilmGenerators.Film(
                [FilmGenerators.Layer(0.1, [.. named.Select(lot => new DotLoading(lot, loading / named.Length))], hostPerMm: 0.002, scatteringPerMm: scattering)],
                named,
                FilmGenerators.Cavity(below, 0.5, 0.02));
            var model = new DiscreteOrdinatesModel(1e-4);
            var each = model.SolveAt(film, Shared with { StepNm = 1 }, CancellationToken.None);
            Assert.Equal(0, OutputError.Between(each, model.SolveAt(film, Shared, CancellationToken.None)), 0.2e-4);
        },
        iter: 100);

    [Fact]
    public void FilmWithOtherLoadings_GetsWhatAFreshModelGives()
    {
        var (first, kept) = (FilmGenerators.TwoLots(), new DiscreteOrdinatesModel(1e-5));
        foreach (double factor in (double[])[1, 0.1, 3, 30, 0, 1.01, 1])
        {
            var film = first.WithLoadings((_, dots) => factor * dots.LoadingMgPerMl);
            var (again, fresh) = (kept.Solve(film, TestContext.Current.CancellationToken), new DiscreteOrdinatesModel(1e-5).Solve(film, TestContext.Current.CancellationToken));
            Assert.Equal(fresh.Total.Samples.ToArray(), again.Total.Samples.ToArray());
            Assert.Equal(fresh.Budget.Excitations, again.Budget.Excitations);
        }
    }

    [Fact]
    public void AKeptModel_NoticesEveryOtherChange()
    {
        var (film, kept) = (FilmGenerators.TwoLots(), new DiscreteOrdinatesModel());
        var layer = film.Layers[0];
        Film[] changed =
        [
            film with { Layers = [layer with { ThicknessMm = 0.11 }] },
            film with { Layers = [layer with { RefractiveIndex = 1.6 }] },
            film with { Layers = [layer with { Scattering = Spectrum.Flat<PerMm>(30, "more") }] },
            film with { Layers = [layer with { Anisotropy = Spectrum.Flat<MeanCosine>(0, "none") }] },
            film with { Layers = [layer with { HostAbsorption = Spectrum.Flat<PerMm>(0.5, "more") }] },
            film with { Cavity = film.Cavity with { BypassShare = 0.1 } },
            film with { Backlight = film.Backlight with { Incidence = Incidence.Normal } },
            film with { Backlight = film.Backlight with { Photons = Spectrum.Gaussian<PhotonPerNm>(460, 20).NormalisedToUnitSum() } },
            FilmGenerators.Film(film.Layers.Select(old => old with { Dots = [old.Dots[0] with { Lot = film.Lots[0] with { QuantumYieldShare = 0.5 } }, old.Dots[1]] }).ToList(), [film.Lots[0] with { QuantumYieldShare = 0.5 }, film.Lots[1]], film.Cavity),
        ];
        double before = kept.Solve(film, TestContext.Current.CancellationToken).Budget.Converted;
        foreach (var other in changed)
        {
            var again = kept.Solve(other, TestContext.Current.CancellationToken);
            Assert.Equal(new DiscreteOrdinatesModel().Solve(other, TestContext.Current.CancellationToken).Budget.Converted, again.Budget.Converted, 1e-12);
            Assert.NotEqual(before, again.Budget.Converted, 1e-5);
        }

        Assert.Equal(before, kept.Solve(film, TestContext.Current.CancellationToken).Budget.Converted);
    }

    [Fact]
    public void ManyThreads_GetWhatOneGets()
    {
        var (film, kept) = (FilmGenerators.TwoLots(), new DiscreteOrdinatesModel());
        Film At(int i) => film.WithLoadings((_, dots) => dots.LoadingMgPerMl * (0.5 + (0.01 * i)));
        double[] one = [.. Enumerable.Range(0, 100).Select(i => new DiscreteOrdinatesModel().Solve(At(i)).Budget.Unconverted)];
        var many = new double[100];
        Parallel.For(0, 100, i => many[i] = kept.Solve(At(i)).Budget.Unconverted);
        Assert.Equal(one, many);
    }
}
