using System.Globalization;

namespace Colorimetry.Tests.Import;

public sealed class RefusedImportTests
{
    public static TheoryData<string, ImportOptions, string> BadLight => new()
    {
        { Rows(400, 600, 10, nm => nm == 500 ? -0.002 : Line(nm, 550, 40)), ImportOptions.Default, "led.csv:12:5: power_per_nm is -0.002 at 500 nm, -0.2 % of the peak; noise down to -0.1 % of the peak is allowed." },
        { Rows(400, 600, 5, _ => 0), ImportOptions.Default, "led.csv: power_per_nm holds no light: its largest value is 0." },
        { Rows(400, 600, 5, _ => -1), ImportOptions.Default, "led.csv:2:5: power_per_nm is -1 at 400 nm; at least 0 is allowed." },
        { Rows(430, 600, 5, nm => Line(nm, 450, 20)), ImportOptions.Default, "led.csv:2:5: power_per_nm is still 6.25 % of its peak at 430 nm, where the file begins; it must have fallen to 0.1 %. Measure further, or say outside: zero." },
        { Rows(380, 460, 5, nm => Line(nm, 450, 20)), ImportOptions.Default, "power_per_nm is still 50 % of its peak at 460 nm, where the file ends" },
        { Rows(400, 700, 20, nm => Line(nm, 550, 80)), ImportOptions.Default, "no row stands between 500 and 520 nm, 20 nm apart; power_per_nm is interpolated over at most 10 nm." },
        { Rows(400, 700, 5, nm => Line(nm, 552, 6)), ImportOptions.Default, "led.csv:32:5: the line at 550 nm has too few rows at or above half of its height, 2, 5 nm apart; at least 3 are needed for its shape" },
        { Rows(400, 700, 5, nm => Line(nm, 550, 40) + (0.2 * Line(nm, 632, 4))), ImportOptions.Default, "the line at 630 nm has too few rows at or above half of its height, 1," },
        { Rows(400, 900, 5, nm => Line(nm, 550, 40) + (0.01 * Line(nm, 860, 30))), ImportOptions.Default, "0.74 % of the light in power_per_nm lies outside 360 to 830 nm; 0.1 % is allowed" },
        { Rows(850, 1000, 5, nm => Line(nm, 900, 20)), ImportOptions.Default, "100 % of the light in power_per_nm lies outside" },
        { Rows(400, 600, 5, nm => Line(nm, 450, 20)), new() { Outside = OutsideRule.Hold }, "outside is hold; light and emission outside a file are zero" },
        { Rows(400, 600, 5, nm => Line(nm, 450, 20)), new() { ShiftNm = -80 }, "of the light in power_per_nm lies outside 360 to 830 nm" },
        { Rows(400, 600, 5, nm => Line(nm, 450, 20)), new() { ShiftNm = 201 }, "shift_nm is 201; -200 to 200 is allowed." },
        { Rows(400, 600, 5, nm => Line(nm, 450, 20)), new() { ShiftNm = double.NaN }, "shift_nm is NaN" },
        { Rows(400, 600, 5, nm => Line(nm, 450, 20)), new() { ScaleFactor = 0 }, "scale is 0; a number above 0 is needed." },
        { Rows(400, 600, 5, nm => Line(nm, 450, 20)), new() { ScaleFactor = double.PositiveInfinity }, "scale is Infinity" },
        { Rows(400, 600, 5, nm => Line(nm, 450, 20)), new() { Anchor = (450, -1) }, "value is -1; a number above 0 is needed." },
        { Rows(400, 600, 5, nm => Line(nm, 450, 20)), new() { Anchor = (350, 1) }, "at_nm is 350; the file reaches from 400 to 600 nm." },
        { Rows(400, 600, 5, nm => Line(nm, 450, 20)), new() { Anchor = (590, 1) }, "more than 0.1 % of its peak is needed there" },
        { Rows(400, 600, 5, nm => Line(nm, 450, 20)), new() { Anchor = (450, 1), ScaleFactor = 2 }, "scale and at_nm with value are both given" },
    };

    [Theory]
    [MemberData(nameof(BadLight))]
    public void ToGrid_OfLightThatCannotBeTrusted_SaysWhy(string rows, ImportOptions options, string expected) => Text.AssertRefused(
        () => SpectrumImport.ToGrid<WattPerNm>(Text.Table("wavelength_nm,power_per_nm\n" + rows, "led.csv"), "power_per_nm", options), expected);

    [Fact]
    public void ToGrid_WithOutsideZero_CutsLightThatHasNotFallenOff() => Assert.Equal(0, SpectrumImport.ToGrid<WattPerNm>(
        Text.Table("wavelength_nm,power_per_nm\n" + Rows(430, 600, 5, nm => Line(nm, 450, 20))), "power_per_nm", new() { Outside = OutsideRule.Zero }).Spectrum[429]);

    // Gaps where there is nothing invent nothing.
    [Fact]
    public void ToGrid_WithAGapInTheDark_IsTaken() => Assert.Equal(Interpolation.Monotone, SpectrumImport.ToGrid<WattPerNm>(
        Text.Table("wavelength_nm,power_per_nm\n" + Rows(400, 500, 2, nm => Line(nm, 450, 20)) + "700,0\n"), "power_per_nm", ImportOptions.Default).Interpolation);

    [Fact]
    public void ToGrid_OfAFilterThatDoesNotCoverTheLight_SaysWhatIsMissing()
    {
        SpectrumTable table = Text.Table("wavelength_nm,green\n" + Rows(400, 700, 10, _ => 0.5), "filters.csv");
        Text.AssertRefused(
            () => SpectrumImport.ToGrid<Fraction>(table, "green", new() { NeededNm = (390, 710) }),
            "filters.csv: green reaches from 400 to 700 nm, but there is light from 390 to 710 nm; measure further, or say outside: hold or outside: zero.");
        Assert.Equal(0.5, SpectrumImport.ToGrid<Fraction>(table, "green", new() { NeededNm = (400, 700) }).Spectrum[360]);
    }

    [Theory]
    [InlineData(390, 690)]
    [InlineData(410, 710)]
    public void ToGrid_OfAFilterThatIsShortAtOneEnd_IsRefused(double firstNm, double lastNm) => Text.AssertRefused(
        () => SpectrumImport.ToGrid<Fraction>(
            Text.Table("wavelength_nm,green\n" + Rows(400, 700, 10, _ => 0.5)), "green", new() { NeededNm = (firstNm, lastNm) }),
        $"but there is light from {firstNm} to {lastNm} nm");

    [Theory]
    [InlineData(1.01, "transmittance is 1.01 at 500 nm; 0 to 1 is allowed.")]
    [InlineData(-0.01, "transmittance is -0.01 at 500 nm, -1 % of the peak")]
    public void ToGrid_OfAShareOutOfRange_NamesItsPlace(double value, string expected) => Text.AssertRefused(
        () => SpectrumImport.ToGrid<Fraction>(
            Text.Table("wavelength_nm,transmittance\n" + Rows(360, 830, 10, nm => nm == 500 ? value : 1)), "transmittance", ImportOptions.Default),
        "test.csv:16:5: " + expected);

    [Theory]
    [InlineData(1)]
    [InlineData(-1)]
    public void ToGrid_OfAnAnisotropyOfOne_IsRefused(double g) => Text.AssertRefused(
        () => SpectrumImport.ToGrid<MeanCosine>(
            Text.Table("wavelength_nm,anisotropy\n" + Rows(360, 830, 47, _ => g)), "anisotropy", ImportOptions.Default),
        $"anisotropy is {g} at 360 nm; more than -1 and less than 1 is allowed");

    [Theory]
    [InlineData(20, 21)]
    [InlineData(50, 51)]
    public void ToGrid_OfAGapAtTheLimit_IsTakenAndBeyondItRefused(double widestNm, double tooWideNm)
    {
        Assert.NotNull(Import(widestNm));
        Text.AssertRefused(() => Import(tooWideNm), $"{tooWideNm} nm apart");

        object Import(double gapNm) => widestNm == 20
            ? SpectrumImport.ToGrid<Fraction>(Flat("transmittance", gapNm), "transmittance", ImportOptions.Default)
            : SpectrumImport.ToGrid<PerMm>(Flat("scattering_per_mm", gapNm), "scattering_per_mm", ImportOptions.Default);
        static SpectrumTable Flat(string column, double gapNm) => Text.Table($"wavelength_nm,{column}\n" + Rows(340, 900, gapNm, _ => 0.5));
    }

    [Fact]
    public void ToGrid_OfAColumnThatHoldsSomethingElse_SaysWhatWasExpected()
    {
        SpectrumTable table = Text.Table("wavelength_nm,counts,photons_per_nm\n" + Rows(400, 600, 5, nm => Line(nm, 450, 20)).Replace("\n", ",0\n", StringComparison.Ordinal));
        Text.AssertRefused(() => SpectrumImport.ToGrid<WattPerNm>(table, "counts", ImportOptions.Default), "the column counts was asked for power_per_nm; a column is named for what it holds.");
        Text.AssertRefused(() => SpectrumImport.ToGrid<WattPerNm>(table, "photons_per_nm", ImportOptions.Default), "the column photons_per_nm was asked for power_per_nm");
        Text.AssertRefused(() => SpectrumImport.ToGrid<WattPerNm>(table, "power_per_nm", ImportOptions.Default), "there is no column power_per_nm; the file has counts, photons_per_nm.");
        SpectrumTable byAngle = Text.Table("angle_deg,power_per_nm\n0,1\n10,1\n");
        Text.AssertRefused(() => SpectrumImport.ToGrid<WattPerNm>(byAngle, "power_per_nm", ImportOptions.Default), "the first column is angle_deg; wavelength_nm is needed here.");
    }

    private static double Line(double nm, double peakNm, double fwhmNm) =>
        Math.Exp(-4 * Math.Log(2) * (nm - peakNm) * (nm - peakNm) / (fwhmNm * fwhmNm));

    private static string Rows(double first, double last, double step, Func<double, double> value) => string.Concat(
        Enumerable.Range(0, (int)Math.Floor((last - first) / step) + 1)
            .Select(i => first + (i * step))
            .Select(nm => string.Create(CultureInfo.InvariantCulture, $"{nm},{value(nm)}\n")));
}
