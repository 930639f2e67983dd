using BenchmarkDotNet.Attributes;
using Colorimetry;
using FilmDesign;
using FilmOptics;
using FilmOptics.Tests;

namespace Benchmarks;

/// <summary>One film on the quick model, and a formulation on it, beside a plain matrix product of the same run.</summary>
[MemoryDiagnoser]
public class BeerLambertBenchmarks
{
    private readonly BeerLambertModel _model = new();
    private readonly Film _film = FilmGenerators.TwoLots();
    private readonly FilmCase _reachable = Case(new(0.3127, 0.3290), 500);
    private readonly FilmCase _fromNothing = Case(new(0.3127, 0.3290), 500, startFactor: 0);
    private readonly FilmCase _bounded = Case(new(0.3127, 0.3290), 1);
    private readonly FilmOutput _output = new BeerLambertModel().Solve(FilmGenerators.TwoLots());
    private double[] _left = [], _right = [], _product = [];

    [GlobalSetup]
    public void Setup()
    {
        var random = new Random(1);
        (_left, _right, _product) = (Numbers(), Numbers(), new double[128 * 128]);

        double[] Numbers() => [.. Enumerable.Range(0, 128 * 128).Select(_ => random.NextDouble())];
    }

    /// <summary>Goal: at most 100 µs.</summary>
    [Benchmark]
    public FilmOutput SolveTwoLots() => _model.Solve(_film);

    [Benchmark]
    public FilmAppraisal AppraiseTwoLots() => FilmAppraiser.Appraise(_reachable, _output);

    /// <summary>Goal: at most 10 ms.</summary>
    [Benchmark]
    public Formulation FormulateOnTarget() => LoadingSolver.Formulate(_reachable, _model);

    [Benchmark]
    public Formulation FormulateFromNothing() => LoadingSolver.Formulate(_fromNothing, _model);

    /// <summary>A target out of reach: the nearest film and the reason.</summary>
    [Benchmark]
    public Formulation FormulateOutOfReach() => LoadingSolver.Formulate(_bounded, _model);

    /// <summary>The yardstick: MathNet's managed product of two 128 × 128 matrices, one thread.</summary>
    [Benchmark(Baseline = true)]
    public double[] MatrixProduct128()
    {
        MathNet.Numerics.Control.UseSingleThread();
        MathNet.Numerics.LinearAlgebra.Double.DenseMatrix left = new(128, 128, _left), right = new(128, 128, _right), product = new(128, 128, _product);
        left.Multiply(right, product);
        return _product;
    }

    internal static FilmCase Case(Chromaticity white, double maxMgPerMl, double startFactor = 1) => new()
    {
        Film = FilmGenerators.TwoLots().WithLoadings((_, dots) => startFactor * dots.LoadingMgPerMl),
        Observer = StandardObserver.Cie1931,
        Target = new(
            TargetPlace.Film, TargetView.Hemisphere, white.X, white.Y, 0.0005,
            [new("green", 0, maxMgPerMl), new("red", 0, maxMgPerMl)], []),
    };
}
