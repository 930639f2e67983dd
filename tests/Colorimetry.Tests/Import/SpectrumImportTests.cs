using System.Globalization;
using CsCheck;

namespace Colorimetry.Tests.Import;

public sealed class SpectrumImportTests
{
    // A Gaussian's area: height × FWHM × sqrt(π / (4 ln 2)). Closed form.
    private static readonly double GaussianArea = Math.Sqrt(Math.PI / (4 * Math.Log(2)));

    [Fact]
    public void ToGrid_WithARowAtEveryNm_TakesThemAsTheyAre()
    {
        ImportedSpectrum<WattPerNm> led = Light(Enumerable.Range(380, 200).Select(i => (double)i), nm => Line(nm, 447, 19));
        Assert.Equal(Interpolation.OnGrid, led.Interpolation);
        Assert.Equal("test.csv, power_per_nm: a row at every nm, taken as it is; outside 380 to 579 nm zero.", led.Explanation);
        for (int nm = 380; nm < 580; nm++)
            Assert.Equal(Line(nm, 447, 19), led.Spectrum[nm], 12);
        Assert.Equal(0, led.Spectrum[379]);
        Assert.Equal(0, led.Spectrum[830]);
        Assert.Empty(led.Warnings);
    }

    // Own calculation (independent code): at half the FWHM and finer Sprague's curve is right to 6 % of the peak, at a quarter to 0.21 %.
    [Theory]
    [InlineData(2, 8, 0.0022)]
    [InlineData(5, 20, 0.0022)]
    [InlineData(5, 15, 0.0093)]
    [InlineData(10, 40, 0.0022)]
    public void ToGrid_WithEvenSteps_IsNearTheTrueLine(double stepNm, double fwhmNm, double tolerance)
    {
        ImportedSpectrum<WattPerNm> line = Light(Range(400, 700, stepNm), nm => Line(nm, 551.3, fwhmNm));
        Assert.Equal(Interpolation.Sprague, line.Interpolation);
        Assert.Contains("Sprague", line.Explanation, StringComparison.Ordinal);
        for (int nm = 400; nm <= 700; nm++)
            Published.AssertWithin(Line(nm, 551.3, fwhmNm), line.Spectrum[nm], tolerance, $"{nm} nm");
        Published.AssertWithin(GaussianArea * fwhmNm, line.Spectrum.Integral, 1e-4 * fwhmNm, "area");
    }

    // The shift of half a nanometre must not blunt a line: Sprague's curve at 1 nm steps is right to 1e-6 of the peak.
    [Fact]
    public void ToGrid_ShiftedByHalfANanometre_MovesTheLine()
    {
        ImportedSpectrum<PhotonPerNm> line = SpectrumImport.ToGrid<PhotonPerNm>(
            Table("photons_per_nm", Range(400, 700, 1), nm => Line(nm, 530, 25)), "photons_per_nm", new() { ShiftNm = 1.5 });
        Assert.Equal(Interpolation.Sprague, line.Interpolation);
        for (int nm = 402; nm <= 700; nm++)
            Published.AssertWithin(Line(nm, 531.5, 25), line.Spectrum[nm], 1e-6, $"{nm} nm");
    }

    // A line far narrower than the grid keeps its area and its centre, wherever it falls. Area: closed form.
    [Theory]
    [InlineData(632.816, 0.3, 0.05)]
    [InlineData(632.5, 0.3, 0.1)]
    [InlineData(631.0, 1.0, 0.25)]
    [InlineData(447.2, 19, 0.5)]
    public void ToGrid_WithStepsFinerThanTheGrid_KeepsAreaAndCentre(double peakNm, double fwhmNm, double stepNm)
    {
        ImportedSpectrum<WattPerNm> line = Light(Range(400, 700, stepNm), nm => Line(nm, peakNm, fwhmNm));
        Assert.Equal(Interpolation.Linear, line.Interpolation);
        Published.AssertWithin(GaussianArea * fwhmNm, line.Spectrum.Integral, 1e-6 * fwhmNm, "area");
        double centre = 0;
        for (int nm = 400; nm <= 700; nm++)
            centre += nm * line.Spectrum[nm] / line.Spectrum.Integral;
        // Within one grid step a line has no place of its own.
        Published.AssertWithin(peakNm, centre, fwhmNm < 1 ? 0.5 : 0.01, "centre");
    }

    // The first and last bins are half covered: a filter is known from the half that is, light beyond the file is nothing.
    [Fact]
    public void ToGrid_WithFineStepsThatEndWithinABin_KnowsAFilterThereAndHalfOfTheLight()
    {
        Spectrum<Fraction> filter = SpectrumImport.ToGrid<Fraction>(
            Table("transmittance", Range(400, 700, 0.5), _ => 0.25), "transmittance", new() { Outside = OutsideRule.Zero }).Spectrum;
        Assert.Equal(0.25, filter[400], 12);
        Assert.Equal(0.25, filter[700], 12);
        Assert.Equal(0, filter[399]);
        Spectrum<WattPerNm> light = SpectrumImport.ToGrid<WattPerNm>(
            Table("power_per_nm", Range(400, 700, 0.5), _ => 0.25), "power_per_nm", new() { Outside = OutsideRule.Zero }).Spectrum;
        Assert.Equal(0.125, light[400], 12);
        Assert.Equal(0.25 * 300, light.Integral, 9);
    }

    [Fact]
    public void ToGrid_WithUnevenFineSteps_KeepsTheAreaOfItsRows()
    {
        double[] nm = [.. Range(380, 780, 0.4).Select(w => w + (0.15 * Math.Sin(w)))];
        ImportedSpectrum<WattPerNm> line = Light(nm, w => Line(w, 452, 18));
        Assert.Equal(Interpolation.Linear, line.Interpolation);
        Published.AssertWithin(GaussianArea * 18, line.Spectrum.Integral, 1e-3, "area");
    }

    [Fact]
    public void ToGrid_WithUnevenSteps_IsMonotoneBetweenRows()
    {
        double[] nm = [360, 380, 399, 410, 430, 441, 455, 470, 480, 499, 515, 530, 550, 561, 580, 600, 620, 640, 660, 680, 700, 720, 740, 760, 780, 800, 820, 830];
        ImportedSpectrum<Fraction> filter = Filter(nm, w => 1 / (1 + Math.Exp(-(w - 500) / 8)));
        Assert.Equal(Interpolation.Monotone, filter.Interpolation);
        for (int w = 361; w <= 830; w++)
            Assert.True(filter.Spectrum[w] >= filter.Spectrum[w - 1], $"{w} nm");
        Assert.Equal(1 / (1 + Math.Exp(-(480.0 - 500) / 8)), filter.Spectrum[480], 12);
    }

    // The dip of Sprague's curve beside a steep foot would be negative light: the monotone curve stands in there, and the result says so.
    [Fact]
    public void ToGrid_WhereSpragueWouldDipBelowZero_StaysAtZeroOrAboveAndSaysSo()
    {
        ImportedSpectrum<WattPerNm> line = Light(Range(400, 700, 5), nm => nm is >= 540 and <= 560 ? 1 : 0);
        Assert.Equal(Interpolation.Sprague, line.Interpolation);
        Assert.Contains("monotone cubic in", line.Explanation, StringComparison.Ordinal);
        Assert.All(line.Spectrum.Samples.ToArray(), s => Assert.True(s >= 0));
        Assert.Equal(0, line.Spectrum[533]);
        Assert.Equal(1, line.Spectrum[550], 12);
    }

    [Fact]
    public void ToGrid_OfAFilterThatSpragueWouldLiftAboveOne_StaysAtOneOrBelow() => Assert.All(
        Filter(Range(360, 830, 10), nm => nm >= 500 ? 1 : 0).Spectrum.Samples.ToArray(), s => Assert.InRange(s, 0, 1));

    [Fact]
    public void ToGrid_WithTwoRows_IsAStraightLine()
    {
        ImportedSpectrum<PerMm> host = SpectrumImport.ToGrid<PerMm>(
            Text.Table("wavelength_nm,absorption_per_mm\n450,0.01\n500,0.002\n"), "absorption_per_mm", new() { NeededNm = (460, 490) });
        Assert.Equal(0.006, host.Spectrum[475], 12);
        Assert.Equal(0.01, host.Spectrum[400], 12);
        Assert.Equal(0.002, host.Spectrum[600], 12);
    }

    // CIE 167: Sprague's curve returns polynomials up to degree 4; a straight line survives any of the curves.
    [Fact]
    public void ToGrid_OfAPolynomial_ReturnsItUpToTheDegreeOfTheCurve()
    {
        Gen<double> coefficient = Gen.Double[-1, 1];
        Gen.Select(coefficient, coefficient, coefficient, coefficient, Gen.OneOf(Gen.Const(1.0), Gen.Const(2.0), Gen.Const(5.0), Gen.Const(10.0)))
            .Sample((a, b, c, d, stepNm) =>
            {
                double Quartic(double nm)
                {
                    double t = (nm - 600) / 300;
                    return 10 + (t * (a + (t * (b + (t * (c + (t * d)))))));
                }

                double Straight(double nm) => 10 + (a * (nm - 600) / 300);
                Spectrum<AbsorbancePerCm> quartic = Absorbance(Range(360, 840, stepNm).Select(w => w - 0.5), Quartic);
                // Uneven rows, never over 10 nm apart.
                Spectrum<AbsorbancePerCm> straight = Absorbance(Range(350, 840, stepNm * 0.8).Select(w => w + (0.09 * stepNm * Math.Sin(w))), Straight);
                for (int nm = WavelengthGrid.FirstNm; nm <= WavelengthGrid.LastNm; nm++)
                {
                    // Off the two intervals at either end, where CIE 167 adds values of its own.
                    if (nm > 360 + (2 * stepNm) && nm < 830 - (2 * stepNm) && Math.Abs(quartic[nm] - Quartic(nm)) > 1e-11)
                        return false;
                    if (Math.Abs(straight[nm] - Straight(nm)) > 1e-11)
                        return false;
                }

                return true;
            }, iter: 100);
    }

    [Fact]
    public void ToGrid_OfAnything_IsNeverNegativeNorNaN()
    {
        Gen<double> value = Gen.OneOf(Gen.Double[0, 1], Gen.Const(0.0), Gen.Double[0, 1e-6], Gen.Const(1.0));
        Gen.Select(value.Array[60], Gen.Double[0.2, 10], Gen.Double[0, 0.9], Gen.Double[-30, 30])
            .Sample((values, stepNm, unevenShare, shiftNm) =>
            {
                double[] nm = [.. values.Select((_, i) => 450 + (stepNm * i) + (0.4 * unevenShare * stepNm * Math.Sin(i)))];
                string text = "wavelength_nm,transmittance\n"
                    + string.Concat(nm.Select((w, i) => string.Create(CultureInfo.InvariantCulture, $"{w},{values[i]}\n")));
                try
                {
                    ImportedSpectrum<Fraction> filter = SpectrumImport.ToGrid<Fraction>(
                        Text.Table(text), "transmittance", new() { Outside = OutsideRule.Zero, ShiftNm = shiftNm });
                    return filter.Spectrum.Samples.ToArray().All(s => s is >= 0 and <= 1);
                }
                catch (InputException e)
                {
                    return e.Message.Contains("is out of range", StringComparison.Ordinal);
                }
            }, iter: 1000);
    }

    [Fact]
    public void ToGrid_WithNoise_TakesItAsZeroAndCountsIt()
    {
        ImportedSpectrum<WattPerNm> led = Light(
            Range(380, 700, 1), nm => nm is 390 or 610 or 650 ? -0.0009 : Line(nm, 450, 20));
        Assert.Equal("test.csv: 3 negative values of power_per_nm, none below -0.1 % of the peak, taken as zero.", Assert.Single(led.Warnings));
        Assert.Equal(0, led.Spectrum[610]);
    }

    [Fact]
    public void ToGrid_WithAScaleOrAnAnchor_Scales()
    {
        SpectrumTable table = Table("absorbance_per_cm", Range(360, 830, 5), nm => 2 * Math.Exp(-(nm - 360) / 100));
        Spectrum<AbsorbancePerCm> scaled = SpectrumImport.ToGrid<AbsorbancePerCm>(table, "absorbance_per_cm", new() { ScaleFactor = 3 }).Spectrum;
        Assert.Equal(6, scaled[360], 12);
        Spectrum<AbsorbancePerCm> anchored = SpectrumImport.ToGrid<AbsorbancePerCm>(
            table, "absorbance_per_cm", new() { Anchor = (452, 3.1) }).Spectrum;
        Assert.Equal(3.1, anchored[452], 9);
        // A shift comes first: the anchor is a wavelength of the result.
        Spectrum<AbsorbancePerCm> both = SpectrumImport.ToGrid<AbsorbancePerCm>(
            table, "absorbance_per_cm", new() { Anchor = (450, 3.1), ShiftNm = 2, Outside = OutsideRule.Hold }).Spectrum;
        Assert.Equal(3.1, both[450], 9);
        Assert.Equal(both[362], both[360], 12);
    }

    [Fact]
    public void ToGrid_WithAnAnchorOnATransmittanceGivenInPercent_BringsItBelowOne() => Assert.Equal(
        0.5,
        SpectrumImport.ToGrid<Fraction>(Table("transmittance", Range(360, 830, 5), _ => 92), "transmittance", new() { Anchor = (500, 0.5) }).Spectrum[400],
        12);

    [Theory]
    [InlineData(OutsideRule.Zero, 0)]
    [InlineData(OutsideRule.Hold, 0.25)]
    public void ToGrid_OutsideTheFile_DoesAsTold(OutsideRule outside, double expected)
    {
        SpectrumTable table = Table("reflectance", Range(400, 700, 10), _ => 0.25);
        Spectrum<Fraction> filter = SpectrumImport.ToGrid<Fraction>(table, "reflectance", new() { Outside = outside }).Spectrum;
        Assert.Equal(expected, filter[399], 12);
        Assert.Equal(expected, filter[830], 12);
        Assert.Equal(0.25, filter[400], 12);
    }

    [Fact]
    public void ToGrid_OfAnisotropy_MayBeNegative() => Assert.Equal(
        -0.25,
        SpectrumImport.ToGrid<MeanCosine>(Table("anisotropy", Range(360, 830, 47), _ => -0.25), "anisotropy", ImportOptions.Default).Spectrum[600],
        12);

    private static double Line(double nm, double peakNm, double fwhmNm) =>
        Math.Exp(-4 * Math.Log(2) * (nm - peakNm) * (nm - peakNm) / (fwhmNm * fwhmNm));

    private static IEnumerable<double> Range(double first, double last, double step) =>
        Enumerable.Range(0, (int)Math.Round((last - first) / step) + 1).Select(i => Math.Round(first + (i * step), 6));

    private static ImportedSpectrum<WattPerNm> Light(IEnumerable<double> nm, Func<double, double> power) =>
        SpectrumImport.ToGrid<WattPerNm>(Table("power_per_nm", nm, power), "power_per_nm", ImportOptions.Default);

    private static ImportedSpectrum<Fraction> Filter(IEnumerable<double> nm, Func<double, double> transmittance) =>
        SpectrumImport.ToGrid<Fraction>(Table("transmittance", nm, transmittance), "transmittance", ImportOptions.Default);

    private static Spectrum<AbsorbancePerCm> Absorbance(IEnumerable<double> nm, Func<double, double> absorbance) =>
        SpectrumImport.ToGrid<AbsorbancePerCm>(Table("absorbance_per_cm", nm, absorbance), "absorbance_per_cm", ImportOptions.Default).Spectrum;

    private static SpectrumTable Table(string column, IEnumerable<double> nm, Func<double, double> value) => Text.Table(
        $"wavelength_nm,{column}\n" + string.Concat(nm.Select(w => string.Create(CultureInfo.InvariantCulture, $"{w},{value(w)}\n"))));
}
