namespace Colorimetry.Tests;

public sealed class DaylightIlluminantTests
{
    // Source: CIE 15:2018 daylight locus and M1, M2, computed from the published formulae by independent code, M unrounded.
    [Theory]
    [InlineData(4000, 0.382344, 0.383766, -1.504593, 2.826502)]
    [InlineData(5002.781641, 0.345659, 0.358601, -1.038670, 0.362659)]
    [InlineData(6503.616134, 0.312720, 0.329125, -0.294649, -0.689128)]
    [InlineData(9300, 0.283145, 0.297113, 0.793607, -0.509851)]
    [InlineData(15000, 0.261397, 0.270224, 2.020942, 0.585737)]
    public void ChromaticityAndFactors_AtACct_AreThoseOfTheFormulae(double cctKelvin, double x, double y, double m1, double m2)
    {
        Chromaticity white = DaylightIlluminant.ChromaticityAt(cctKelvin);
        Published.AssertWithin(x, white.X, 1e-6, "x");
        Published.AssertWithin(y, white.Y, 1e-6, "y");
        (double f1, double f2) = DaylightIlluminant.ComponentFactors(white);
        Published.AssertWithin(m1, f1, 2e-6, "M1");
        Published.AssertWithin(m2, f2, 2e-6, "M2");
    }

    // Source: the documented example of an open-source colour library (Python, BSD): 6504.38938305 K gives 0.3127077, 0.3291128.
    [Fact]
    public void ChromaticityAt_OfASecondLibrarysExample_Agrees()
    {
        Chromaticity white = DaylightIlluminant.ChromaticityAt(6504.38938305);
        Published.AssertWithin(0.3127077, white.X, 1e-7, "x");
        Published.AssertWithin(0.3291128, white.Y, 1e-7, "y");
    }

    // Source: CIE 15: with M rounded to three decimals the components give the D65 table to 0.001 (computed: 0.00085).
    [Fact]
    public void FromFactors_WithTheRoundedOnesOfD65_IsItsTable()
    {
        Spectrum<WattPerNm> made = DaylightIlluminant.FromFactors(-0.295, -0.689, "test");
        for (int nm = WavelengthGrid.FirstNm; nm <= WavelengthGrid.LastNm; nm++)
            Published.AssertWithin(StandardIlluminant.D65[nm], made[nm], 0.001, $"D65 at {nm} nm");
    }

    // Unrounded factors move D65 by less than 0.1 at any wavelength; the white stays on the locus. Own estimate, no source.
    [Fact]
    public void FromCct_Of6504Kelvin_IsNearD65()
    {
        Spectrum<WattPerNm> made = DaylightIlluminant.FromCct(6503.616134);
        Assert.Equal(100, made[560], 9);
        for (int nm = WavelengthGrid.FirstNm; nm <= WavelengthGrid.LastNm; nm++)
            Published.AssertWithin(StandardIlluminant.D65[nm], made[nm], 0.1, $"D65 at {nm} nm");
    }

    [Theory]
    [InlineData(3999.9)]
    [InlineData(25_000.1)]
    [InlineData(double.NaN)]
    public void FromCct_OutOfRange_IsRefused(double cctKelvin)
    {
        ArgumentOutOfRangeException refusal = Assert.Throws<ArgumentOutOfRangeException>(() => DaylightIlluminant.FromCct(cctKelvin));
        Assert.Contains("4000 to 25000 K", refusal.Message, StringComparison.Ordinal);
    }
}
