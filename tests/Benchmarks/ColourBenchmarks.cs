using BenchmarkDotNet.Attributes;
using Colorimetry;

namespace Benchmarks;

/// <summary>Colour of one spectrum: what every solve, slider and search step pays.</summary>
[MemoryDiagnoser]
public class ColourBenchmarks
{
    private readonly Spectrum<WattPerNm> _light =
        Spectrum.Gaussian<WattPerNm>(450, 20) + Spectrum.Gaussian<WattPerNm>(530, 30) + Spectrum.Gaussian<WattPerNm>(630, 30);

    private readonly StandardObserver _observer = StandardObserver.Cie1931;

    [Benchmark]
    public Tristimulus TristimulusOfASpectrum() => Tristimulus.Of(_light, _observer);

    [Benchmark]
    public (double Kelvin, double Duv)? CctAndDuv() => CorrelatedColourTemperature.Of(new(0.3127, 0.3290));
}
