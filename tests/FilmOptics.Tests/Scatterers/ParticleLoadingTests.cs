using Colorimetry;

namespace FilmOptics.Tests.Scatterers;

public sealed class ParticleLoadingTests
{
    /// <summary>Scatterers of films: diameter µm, wavelength nm, index, then Qsca, g and µs of 1 vol% per mm as printed.</summary>
    /// <remarks>
    /// Source: computed, independent code, in a binder of index 1.5; the index of rutile from Devore 1951 (mean of its axes; n_o published,
    /// n_e from memory) to four decimals.
    /// </remarks>
    public static TheoryData<double, int, double, string, string, string> FilmScatterers => new()
    {
        { 0.20, 450, 2.9295, "5.24713", ".55351", "393.5" },
        { 0.25, 450, 2.9295, "3.88788", ".40938", "233.3" },
        { 0.25, 530, 2.7738, "5.02985", ".60548", "301.8" },
        { 0.25, 630, 2.6816, "3.28653", ".50822", "197.2" },
        { 5, 450, 1.43, "2.7652", ".9940", "8.30" },
        { 1, 450, 1.46, ".14460", ".97358", "2.17" },
        { 0.2, 450, 2.5, "2.91487", ".57016", "218.6" },
        { 0.1, 450, 2.2, ".22054", ".21627", "33.1" },
        { 3, 450, 1.59, "3.3042", ".9901", "16.5" },
    };

    [Theory]
    [MemberData(nameof(FilmScatterers))]
    public void Scattering_OfFilmScatterers_AgreesToEveryPrintedDigit(
        double diameterUm, int wavelengthNm, double index, string efficiency, string cosine, string perMm)
    {
        var scattering = Particles(diameterUm / 2, index, 0.01).In(1.5);
        double scatteringPerMm = scattering.Scattering[wavelengthNm];
        MieSphereTests.AssertPrinted(efficiency, scatteringPerMm * diameterUm / 15, "Qsca");
        MieSphereTests.AssertPrinted(cosine, scattering.Anisotropy[wavelengthNm], "g");
        MieSphereTests.AssertPrinted(perMm, scatteringPerMm, "µs");
        Assert.Equal(0, scattering.Absorption.Peak);
    }

    // Source: as above; this row alone was computed from size and relative index as rounded for print.
    [Fact]
    public void Scattering_OfSiliconeOfTwoMicrometres_AgreesToEveryPrintedDigit()
    {
        var sphere = MieSphere.Of(20.9440, 0.95333);
        MieSphereTests.AssertPrinted("1.44825", sphere.ScatteringEfficiencyFactor, "Qsca");
        MieSphereTests.AssertPrinted(".99048", sphere.MeanCosine, "g");
        MieSphereTests.AssertPrinted("10.86", Particles(1, 1.43, 0.01).In(1.5).Scattering[450], "µs");
    }

    // Source: arithmetic on densities, computed by independent code: 1 wt% in a host of 1.1 g/mL.
    [Theory]
    [InlineData(4.23, ".002620")]
    [InlineData(1.32, ".008347")]
    public void VolumeShareFromWeight_OfOnePercent_IsThePrintedShare(double density, string printed) =>
        MieSphereTests.AssertPrinted(printed, ParticleLoading.VolumeShareFromWeight(1, density, 1.1), "volume share");

    [Fact]
    public void NarrowSpread_NearsOneSize()
    {
        var one = Particles(0.125, 2.77, 0.01).In(1.5);
        double last = double.MaxValue;
        foreach (double spread in new[] { 1.1, 1.03, 1.01 })
        {
            var spreadOut = (Particles(0.125, 2.77, 0.01) with { SizeSpreadFactor = spread }).In(1.5);
            double difference = Math.Abs(spreadOut.Scattering[530] - one.Scattering[530]);
            Assert.True(difference < last, $"spread {spread}: {difference}");
            last = difference;
        }

        Assert.InRange(last / one.Scattering[530], 0, 5e-3);
    }

    [Fact]
    public void RayleighSpheresWithSpread_ScatterByTheSixthMoment()
    {
        // Small spheres scatter as r³ per volume; over a log-normal volume distribution of spread σ that is exp(9/2 ln²σ) of the median.
        const double spread = 1.3;
        var one = Particles(0.001, 1.6, 0.01).In(1.5);
        var many = (Particles(0.001, 1.6, 0.01) with { SizeSpreadFactor = spread }).In(1.5);
        double expected = Math.Exp(4.5 * Math.Pow(Math.Log(spread), 2));
        Assert.Equal(expected, many.Scattering[550] / one.Scattering[550], 1e-3);
    }

    [Fact]
    public void AbsorbingSmallSpheres_AbsorbAsTheirVolume()
    {
        // Rayleigh limit, by hand: µa = f (6π/λ_medium) Im[(m² − 1)/(m² + 2)].
        var particles = Particles(0.001, 1.6, 0.01) with { AbsorbingIndex = Spectrum.Flat<RefractiveIndex>(0.05, "k") };
        var index = new System.Numerics.Complex(1.6, 0.05) / 1.5;
        double expected = 0.01 * 6 * Math.PI * 1.5 / 550e-6 * (((index * index) - 1) / ((index * index) + 2)).Imaginary;
        Assert.Equal(expected, particles.In(1.5).Absorption[550], expected * 1e-3);
    }

    [Fact]
    public void Particles_OfTheHostsIndex_AreInvisible()
    {
        var scattering = Particles(1, 1.5, 0.01).In(1.5);
        Assert.InRange(scattering.Scattering.Peak, 0, 1e-20);
        Assert.InRange(scattering.Anisotropy.Peak, -1, 1);
    }

    [Theory]
    [InlineData(0.049, 0)]
    [InlineData(0.051, 1)]
    public void CrowdedParticles_AreWarnedAbout(double volumeShare, int warnings) =>
        Assert.Equal(warnings, Particles(0.1, 2.5, volumeShare).In(1.5).Warnings.Count);

    [Fact]
    public void FiguresOutOfRange_AreRefusedByName()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => Particles(0, 2.5, 0.01).In(1.5));
        Assert.Throws<ArgumentOutOfRangeException>(() => Particles(1, 2.5, 1.5).In(1.5));
        Assert.Throws<ArgumentOutOfRangeException>(() => Particles(1, 2.5, double.NaN).In(1.5));
        Assert.Throws<ArgumentOutOfRangeException>(() => ParticleLoading.VolumeShareFromWeight(101, 4, 1));
    }

    private static ParticleLoading Particles(double radiusUm, double index, double volumeShare) => new()
    {
        RadiusUm = radiusUm,
        Index = Spectrum.Flat<RefractiveIndex>(index, "particle"),
        VolumeShare = volumeShare,
    };
}
