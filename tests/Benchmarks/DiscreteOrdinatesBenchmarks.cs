using BenchmarkDotNet.Attributes;
using Colorimetry;
using FilmDesign;
using FilmOptics;
using FilmOptics.Tests;

namespace Benchmarks;

/// <summary>The exact model, one core: a film by itself, the same film with other loadings, a formulation; the matrix product is the run's yardstick.</summary>
/// <remarks>
/// Each solve contains its error estimate. The film: one layer, two lots, scattering, recycling, 1 nm from 360 to 830 nm.
/// Run with: dotnet run --project tests/Benchmarks -c Release -- --filter "*DiscreteOrdinates*"
/// </remarks>
[MemoryDiagnoser]
public class DiscreteOrdinatesBenchmarks
{
    private readonly Film _film = FilmGenerators.TwoLots();
    private readonly Film _three = Three();
    private readonly DiscreteOrdinatesModel _kept = new(5e-4), _keptFine = new(2e-5);
    private readonly Film[] _others;
    private double[] _numbers = [];
    private int _next;

    public DiscreteOrdinatesBenchmarks() =>
        _others = [.. Enumerable.Range(0, 64).Select(i => _film.WithLoadings((_, dots) => dots.LoadingMgPerMl * (1 + (0.005 * i))))];

    [GlobalSetup]
    public void SetUp() => _numbers = [.. Enumerable.Range(0, 128 * 128).Select(i => Math.Sin(i))];

    /// <summary>Bound 300 µs.</summary>
    [Benchmark]
    public FilmOutput OneLayer() => new DiscreteOrdinatesModel(5e-4).Solve(_film);

    /// <summary>Bound 600 µs.</summary>
    [Benchmark]
    public FilmOutput OneLayerFine() => new DiscreteOrdinatesModel(2e-5).Solve(_film);

    /// <summary>Bound 1200 µs.</summary>
    [Benchmark]
    public FilmOutput ThreeLayers() => new DiscreteOrdinatesModel(5e-4).Solve(_three);

    /// <summary>Bound 2400 µs.</summary>
    [Benchmark]
    public FilmOutput ThreeLayersFine() => new DiscreteOrdinatesModel(2e-5).Solve(_three);

    /// <summary>Bound 30 µs.</summary>
    [Benchmark]
    public FilmOutput OtherLoadings() => _kept.Solve(_others[_next++ % _others.Length]);

    [Benchmark]
    public FilmOutput OtherLoadingsFine() => _keptFine.Solve(_others[_next++ % _others.Length]);

    /// <summary>Bound 5 ms: a fresh model, as a command has.</summary>
    [Benchmark]
    public Formulation Formulate() => LoadingSolver.Formulate(BeerLambertBenchmarks.Case(new(0.3127, 0.3290), 500), new DiscreteOrdinatesModel());

    [Benchmark(Baseline = true)]
    public double MatrixProduct128()
    {
        MathNet.Numerics.Control.UseSingleThread();
        MathNet.Numerics.LinearAlgebra.Double.DenseMatrix matrix = new(128, 128, _numbers);
        return matrix.Multiply(matrix)[0, 0];
    }

    private static Film Three()
    {
        var film = FilmGenerators.TwoLots();
        var layer = film.Layers[0];
        var (green, red) = (layer.Dots[0], layer.Dots[1]);
        return film with
        {
            Layers =
            [
                layer with { Name = "lower", Dots = [green] },
                layer with { Name = "middle", ThicknessMm = 0.05, Scattering = Spectrum.Flat<PerMm>(5, "five"), Dots = [red] },
                layer with { Name = "upper", ThicknessMm = 0.07, Scattering = Spectrum.Flat<PerMm>(20, "twenty"), Dots = [green with { LoadingMgPerMl = 2 }, red] },
            ],
        };
    }
}

/// <summary>100 000 films that differ in their loadings only. Bound 5 s on two cores.</summary>
public class ManyFilmsBenchmarks
{
    private const int Films = 100_000;
    private readonly Film _film = FilmGenerators.TwoLots();

    [Params(1, 2)]
    public int Threads { get; set; }

    [Benchmark]
    public double HundredThousandFilms()
    {
        var model = new DiscreteOrdinatesModel(5e-4);
        var leakage = new double[Films];
        Parallel.For(0, Films, new ParallelOptions { MaxDegreeOfParallelism = Threads }, i =>
            leakage[i] = model.Solve(_film.WithLoadings((_, dots) => dots.LoadingMgPerMl * (0.5 + (1.0 * i / Films)))).Budget.Unconverted);
        return leakage.Sum();
    }
}
