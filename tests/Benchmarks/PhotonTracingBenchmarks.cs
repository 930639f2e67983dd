using System.Globalization;
using BenchmarkDotNet.Attributes;
using Colorimetry;
using FilmOptics;
using FilmOptics.PhotonTracing;

namespace Benchmarks;

/// <summary>Time per photon on one core, in lanes and by the scalar reference; divide by the interactions per photon printed at the start.</summary>
/// <remarks>Run with: dotnet run --project tests/Benchmarks -c Release -- --filter "*PhotonTracing*"</remarks>
[MemoryDiagnoser]
public class PhotonTracingBenchmarks
{
    private const int LanePhotons = 16 * PhotonTracingModel.BlockPhotons, ScalarPhotons = PhotonTracingModel.BlockPhotons;

    private TracedFilm _film = null!;
    private LaneFilm _lanes = null!;
    private Tally _tally = null!;

    /// <summary>The slab of optical thickness 2, albedo 0.9, g 0.8, index 1.5 in air; a scattering film with two lots between returns.</summary>
    [Params("slab", "film")]
    public string Case { get; set; } = "";

    [GlobalSetup]
    public void SetUp()
    {
        var film = Case == "slab" ? TracedExamples.Slab : TracedExamples.Film;
        (_film, _tally) = (new TracedFilm(film), new Tally(film.Lots.Count));
        _lanes = new LaneFilm(_film);
        LaneTracer.Trace(_lanes, Xoshiro256.ForBlock(1, 0), LanePhotons, _tally);
        Console.WriteLine(string.Create(
            CultureInfo.InvariantCulture, $"// {Case}: {(double)_tally.Interactions / _tally.Photons:0.00} interactions per photon"));
    }

    [Benchmark(OperationsPerInvoke = LanePhotons)]
    public void Lanes()
    {
        for (int block = 0; block < LanePhotons / PhotonTracingModel.BlockPhotons; block++)
            LaneTracer.Trace(_lanes, Xoshiro256.ForBlock(1, block), PhotonTracingModel.BlockPhotons, _tally);
    }

    [Benchmark(OperationsPerInvoke = ScalarPhotons)]
    public void Scalar() => ScalarTracer.Trace(_film, Xoshiro256.ForBlock(1, 0), ScalarPhotons, _tally);
}

/// <summary>Whole runs on one and two threads.</summary>
public class PhotonTracingThreadsBenchmarks
{
    private const int Photons = 2_000_000;

    [Params(1, 2)]
    public int Threads { get; set; }

    [Benchmark(OperationsPerInvoke = Photons)]
    public FilmOutput Film() => new PhotonTracingModel(Photons, 1, Threads).Solve(TracedExamples.Film);
}

/// <summary>One sphere at 81 wavelengths.</summary>
public class MieBenchmarks
{
    /// <summary>A pigment particle, a small bead, a large bead.</summary>
    [Params(0.125, 1.5, 5)]
    public double RadiusUm { get; set; }

    [Benchmark]
    public double Sphere()
    {
        double sum = 0;
        for (int nm = 380; nm <= 780; nm += 5)
            sum += MieSphere.Of(2 * Math.PI * RadiusUm * 1000 * 1.5 / nm, 1.06).ScatteringEfficiencyFactor;
        return sum;
    }
}

/// <summary>Invented films to trace.</summary>
internal static class TracedExamples
{
    public static Film Slab { get; } = new()
    {
        Title = "slab",
        Backlight = new(Spectrum.Sampled<PhotonPerNm>(nm => nm == 550 ? 1 : 0, "one wavelength"), Incidence.Normal, null),
        Cavity = new(Flat<Fraction>(0), Flat<Fraction>(0), Flat<Fraction>(0), 0),
        Lots = [],
        Layers = [LayerOf(1, 0.2, 1.8)],
    };

    public static Film Film { get; } = FilmWith(Lot("green", 530, 5, 0.95), Lot("red", 630, 2, 0.9));

    private static Film FilmWith(DotLot green, DotLot red) => new()
    {
        Title = "film",
        Backlight = new(Spectrum.Gaussian<PhotonPerNm>(450, 20).NormalisedToUnitSum(), Incidence.Lambertian, null),
        Cavity = new(Flat<Fraction>(0.95), Flat<Fraction>(0.5), Flat<Fraction>(0), 0),
        Lots = [green, red],
        Layers = [LayerOf(0.1, 0, 20) with { Dots = [new(green, 0.4), new(red, 0.5)] }],
    };

    private static Layer LayerOf(double thicknessMm, double hostPerMm, double scatteringPerMm) => new()
    {
        Name = "layer",
        ThicknessMm = thicknessMm,
        RefractiveIndex = 1.5,
        HostAbsorption = Flat<PerMm>(hostPerMm),
        Scattering = Flat<PerMm>(scatteringPerMm),
        Anisotropy = Flat<MeanCosine>(0.8),
        Dots = [],
    };

    private static DotLot Lot(string name, double peakNm, double perMm, double yieldShare) => new()
    {
        Name = name,
        QuantumYieldShare = yieldShare,
        Emission = Spectrum.Gaussian<PhotonPerNm>(peakNm, 26).NormalisedToUnitSum(),
        Absorbance = Spectrum.Sampled<AbsorbancePerCm>(
            nm => perMm * 10 / Math.Log(10) * Math.Exp((450 - nm) / 60) / (1 + Math.Exp((nm - peakNm + 15) / 5)), name),
    };

    private static Spectrum<TUnit> Flat<TUnit>(double value)
        where TUnit : struct, ISpectralUnit => Spectrum.Flat<TUnit>(value, "flat");
}
