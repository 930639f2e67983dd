using System.Globalization;
using System.Text;
using Colorimetry;
using MathNet.Numerics.Distributions;

namespace FilmOptics.Tests.QuantumYields;

/// <summary>Yields from sphere scans: worked examples, limits, and the spread of noisy scans against the stated uncertainty.</summary>
public sealed class SphereYieldTests
{
    private static readonly WavelengthWindow Pump = new(440, 460), Emission = new(500, 600);

    // Counts as in the worked examples of the method; computed by an independent code, from the formula of de Mello et al. 1997.
    [Theory]
    [InlineData(60, .500, .600)]
    [InlineData(120, .500, .540)]
    public void ThreeMeasurements_OfWorkedCounts_GiveTheirYield(double pb, double absorptance, double expected)
    {
        var yield = SphereYield.Of(Measurement(1000, 800, 400, 0, pb, 330));
        Assert.Equal(absorptance, yield.AbsorptanceShare, 5e-4);
        Assert.Equal(expected, yield.YieldShare, 5e-4);
    }

    [Fact]
    public void BothForms_AgreeWhereTheSphereExcitesAsTheBeamDoes()
    {
        // P_a 0, P_b 120, P_c 360 with L 1000, 800, 400: both forms give .600 (computed, independent code).
        Assert.Equal(.600, SphereYield.Of(Measurement(1000, 800, 400, 0, 120, 360)).YieldShare, 5e-4);
        Assert.Equal(.600, SphereYield.Of(Measurement(1000, null, 400, 0, null, 360)).YieldShare, 5e-4);
        Assert.Equal(.550, SphereYield.Of(Measurement(1000, null, 400, 0, null, 330)).YieldShare, 5e-4);
    }

    [Fact]
    public void StrayLightOfTheEmptySphere_IsTakenOff() => Assert.Equal(
        SphereYield.Of(Measurement(1000, 800, 400, 0, 60, 330)).YieldShare,
        SphereYield.Of(Measurement(1000, 800, 400, 25, 85, 355)).YieldShare,
        1e-12);

    // Algebra by an independent code; the form is that of Ahn et al. 2007.
    [Theory]
    [InlineData(.9, .3, .863014)]
    [InlineData(.95, .2, .938272)]
    [InlineData(.8, .5, .666667)]
    [InlineData(.9, .74536, .696211)]
    public void SelfAbsorption_LowersTheObservedYield_AndBack(double yield, double reabsorbed, double observed)
    {
        Assert.Equal(observed, SelfAbsorption.Observed(yield, reabsorbed), 5e-7);
        Assert.Equal(yield, SelfAbsorption.Corrected(SelfAbsorption.Observed(yield, reabsorbed), reabsorbed), 1e-12);
    }

    [Fact]
    public void SelfAbsorption_FromSpectra_FindsWhatWasTaken()
    {
        // The sample's own absorption takes the blue side of its line; the tail is that of the dilute sample.
        static double Line(double nm) => Math.Exp(-Math.Pow((nm - 540) / 12, 2));
        static double Kept(double nm) => 1 - (0.8 / (1 + Math.Exp((nm - 538) / 3)));
        double whole = 0, left = 0;
        for (double nm = 500; nm <= 600; nm += 0.01)
            (whole, left) = (whole + Line(nm), left + (Line(nm) * Kept(nm)));
        double s = 1 - (left / whole), truth = 0.9, observed = SelfAbsorption.Observed(truth, s);

        // Half of 1000 pump photons absorbed; emission scaled so that the observed yield is right.
        double scale = observed * 500 / (left * 0.01);
        var measurement = Measurement(1000, 1000, 500, 0, 0, 0) with
        {
            InBeam = Scan("c", nm => PumpLine(nm, 500) + (nm >= 500 ? scale * Line(nm) * Kept(nm) : 0)),
            Dilute = Scan("dilute", nm => 7 * Line(nm)),
            TailFromNm = 560,
        };
        var yield = SphereYield.Of(measurement);
        Assert.Equal(observed, yield.YieldShare, 1e-3);
        Assert.Equal(s, yield.SelfAbsorption!.ReabsorbedShare, 2e-3);
        Assert.Equal(truth, yield.BestYieldShare, 2e-3);
    }

    [Fact]
    public void StatedUncertainty_IsTheSpreadOfNoisyScans()
    {
        // 400 sets of scans with independent normal noise (MathNet.Numerics); the spread of 400 values is known to 3.5 %.
        var random = new Normal(0, 1, new Random(7));
        List<double> yields = [], stated = [];
        for (int i = 0; i < 400; i++)
        {
            SphereScan Noisy(string name, double pump, double emission) =>
                Scan(name, nm => PumpLine(nm, pump) + EmissionLine(nm, emission) + (0.4 * random.Sample()));
            var yield = SphereYield.Of(new SphereMeasurement
            {
                Empty = Noisy("a", 1000, 0), Beside = Noisy("b", 800, 60), InBeam = Noisy("c", 400, 330), Pump = Pump, Emission = Emission,
            });
            yields.Add(yield.YieldShare);
            stated.Add(yield.YieldUncertaintyShare);
        }

        double mean = yields.Average(), spread = Math.Sqrt(yields.Sum(y => (y - mean) * (y - mean)) / (yields.Count - 1));
        Assert.Equal(0.6, mean, 4 * spread / 20);
        Assert.InRange(stated.Average() / spread, 0.85, 1.15);
    }

    [Fact]
    public void ResponseUncertainty_AddsToTheNoise()
    {
        var sure = Measurement(1000, 800, 400, 0, 60, 330);
        Assert.Equal(0.03 * 0.6, SphereYield.Of(sure with { ResponseUncertaintyShare = 0.03 }).YieldUncertaintyShare, 1e-3);
    }

    [Fact]
    public void SmallAbsorptance_IsWarnedOf()
    {
        Assert.Contains(SphereYield.Of(Measurement(1000, 1000, 950, 0, 0, 30)).Warnings, warning => warning.Contains("biased low", StringComparison.Ordinal));
        Assert.Empty(SphereYield.Of(Measurement(1000, 1000, 500, 0, 0, 300)).Warnings);
    }

    [Fact]
    public void SampleThatAbsorbsNothing_IsRefused() => Assert.Contains(
        "which scan is which",
        Assert.Throws<InputException>(() => SphereYield.Of(Measurement(1000, 800, 900, 0, 0, 100))).Message,
        StringComparison.Ordinal);

    [Fact]
    public void PowerScans_CountPhotons()
    {
        // The same photons, once as power: 540 nm carries fewer joules a photon than 450.
        double Ratio(string column, Func<double, double> weight)
        {
            SphereScan Of(string name, double pump, double emission) => SphereScan.From(
                Table(name, column, nm => weight(nm) * (PumpLine(nm, pump) + EmissionLine(nm, emission))), null);
            return SphereYield.Of(new SphereMeasurement { Empty = Of("a", 1000, 0), Beside = Of("b", 800, 60), InBeam = Of("c", 400, 330), Pump = Pump, Emission = Emission }).YieldShare;
        }

        Assert.Equal(Ratio("photons_per_nm", _ => 1), Ratio("power_per_nm", nm => 1 / nm), 1e-12);
    }

    [Fact]
    public void Response_DividesTheScans()
    {
        var response = Table("response", "response", nm => nm < 480 ? 2 : 1);
        SphereScan Of(string name, double pump, double emission) => SphereScan.From(
            Table(name, "photons_per_nm", nm => (nm < 480 ? 2 : 1) * (PumpLine(nm, pump) + EmissionLine(nm, emission))), response);
        var yield = SphereYield.Of(new SphereMeasurement { Empty = Of("a", 1000, 0), Beside = Of("b", 800, 60), InBeam = Of("c", 400, 330), Pump = Pump, Emission = Emission });
        Assert.Equal(0.6, yield.YieldShare, 1e-3);
        var gap = Read("wavelength_nm,response\n430,1\n500,1\n", "gap.csv");
        Assert.Contains("the scan reaches", Assert.Throws<InputException>(() => SphereScan.From(Table("a", "photons_per_nm", _ => 1), gap)).Message, StringComparison.Ordinal);
    }

    private static SphereMeasurement Measurement(double la, double? lb, double lc, double pa, double? pb, double pc) => new()
    {
        Empty = Scan("a", nm => PumpLine(nm, la) + EmissionLine(nm, pa)),
        Beside = lb is { } pump ? Scan("b", nm => PumpLine(nm, pump) + EmissionLine(nm, pb!.Value)) : null,
        InBeam = Scan("c", nm => PumpLine(nm, lc) + EmissionLine(nm, pc)),
        Pump = Pump,
        Emission = Emission,
    };

    // Lines that are zero at both ends of their windows, of a given area.
    private static double PumpLine(double nm, double area) => area * Math.Exp(-Math.Pow((nm - 450) / 2, 2)) / (2 * Math.Sqrt(Math.PI));

    private static double EmissionLine(double nm, double area) => area * Math.Exp(-Math.Pow((nm - 545) / 10, 2)) / (10 * Math.Sqrt(Math.PI));

    private static SphereScan Scan(string name, Func<double, double> photonsPerNm) => SphereScan.From(Table(name, "photons_per_nm", photonsPerNm), null);

    private static SpectrumTable Table(string name, string column, Func<double, double> valueAtNm)
    {
        var text = new StringBuilder($"wavelength_nm,{column}\n");
        for (double nm = 430; nm <= 610; nm += 0.5)
            text.Append(CultureInfo.InvariantCulture, $"{nm},{valueAtNm(nm):R}\n");
        return Read(text.ToString(), $"{name}.csv");
    }

    private static SpectrumTable Read(string text, string name)
    {
        using var stream = new MemoryStream(Encoding.UTF8.GetBytes(text));
        return SpectrumFile.Read(stream, name);
    }
}
