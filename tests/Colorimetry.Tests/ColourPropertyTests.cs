using CsCheck;

namespace Colorimetry.Tests;

/// <summary>What holds for every colour, triangle and light.</summary>
public sealed class ColourPropertyTests
{
    private static readonly Gen<Chromaticity> AnyColour =
        Gen.Select(Gen.Double[0.05, 0.7], Gen.Double[0.05, 0.8], (x, y) => x + y < 0.95 ? new Chromaticity(x, y) : new Chromaticity(x * 0.5, y * 0.5));

    private static readonly Gen<ColourGamut> AnyTriangle = Gen.Select(
        AnyColour, AnyColour, AnyColour, (r, g, b) => new ColourGamut("any", r, g, b, new(0.3127, 0.329), "random"))
        .Where(g => GamutCoverage.Area(g.Red, g.Green, g.Blue, ChromaticityDiagram.Xy1931) > 1e-3);

    private static readonly Gen<ChromaticityDiagram> AnyDiagram = Gen.Bool.Select(xy => xy ? ChromaticityDiagram.Xy1931 : ChromaticityDiagram.UvPrime1976);

    [Fact]
    public void Coverage_OfAnyTwoTriangles_IsAShareAndSeesTheSameOverlapFromBothSides() =>
        Gen.Select(AnyTriangle, AnyTriangle, AnyDiagram).Sample((a, b, diagram) =>
        {
            double ofB = GamutCoverage.Coverage(a.Red, a.Green, a.Blue, b, diagram), ofA = GamutCoverage.Coverage(b.Red, b.Green, b.Blue, a, diagram);
            double areaA = GamutCoverage.Area(a.Red, a.Green, a.Blue, diagram), areaB = GamutCoverage.Area(b.Red, b.Green, b.Blue, diagram);
            Assert.InRange(ofB, 0, 1 + 1e-12);
            Assert.Equal(ofB * areaB, ofA * areaA, 1e-12);
            Assert.Equal(1, GamutCoverage.Coverage(a.Red, a.Green, a.Blue, a, diagram), 1e-12);
            Assert.True(ofB <= GamutCoverage.AreaRatio(a.Red, a.Green, a.Blue, b, diagram) + 1e-12);
        });

    [Fact]
    public void UvPrime_AndBack_IsTheSameColour() => AnyColour.Sample(c =>
    {
        var back = Chromaticity.FromUvPrime(c.UPrime, c.VPrime);
        Assert.Equal(c.X, back.X, 1e-12);
        Assert.Equal(c.Y, back.Y, 1e-12);
    });

    [Fact]
    public void Cct_OfAPointOffTheLocus_IsWhatItWasMadeWith() =>
        Gen.Select(Gen.Double[40.5, 999], Gen.Double[-0.02, 0.02]).Sample((mired, duv) =>
        {
            var found = CorrelatedColourTemperature.Of(CorrelatedColourTemperature.ChromaticityAt(1e6 / mired, duv));
            Assert.NotNull(found);
            Assert.Equal(mired, 1e6 / found.Value.Kelvin, 1e-5);
            Assert.Equal(duv, found.Value.Duv, 1e-9);
        });

    [Theory]
    [InlineData(0.10, 0.80)] // green: far from the locus
    [InlineData(0.17, 0.02)] // blue: bluer than any black body up to 25 000 K
    [InlineData(0.70, 0.28)] // red: colder than 1000 K
    public void Cct_WhereItMeansNothing_IsUnknown(double x, double y) => Assert.Null(CorrelatedColourTemperature.Of(new(x, y)));

    [Theory]
    [InlineData(1000)]
    [InlineData(25000)]
    public void Cct_OfABlackBodyAtTheLimits_IsKnown(double kelvin) =>
        Assert.Equal(kelvin, CorrelatedColourTemperature.Of(PlanckianLocus.At(kelvin))!.Value.Kelvin, kelvin * 1e-6);

    [Fact]
    public void Cct_IsTheNearestPoint_NoOtherTemperatureIsNearer() => AnyColour.Sample(
        c =>
        {
            if (CorrelatedColourTemperature.Of(c) is not var (kelvin, duv))
                return;
            for (double mired = 41; mired < 1000; mired += 7)
            {
                var point = PlanckianLocus.At(1e6 / mired);
                double du = c.UPrime - point.UPrime, dv = c.V1960 - point.V1960;
                Assert.True(Math.Sqrt((du * du) + (dv * dv)) >= Math.Abs(duv) - 1e-12, $"{c} has {kelvin} K but {1e6 / mired} K is nearer");
            }
        },
        iter: 40);

    [Fact]
    public void Lab_AndBack_IsTheSameColour() =>
        Gen.Select(Gen.Double[0, 1.2], Gen.Double[0, 1.2], Gen.Double[0, 1.2]).Sample((x, y, z) =>
        {
            var white = Tristimulus.From(new(0.3127, 0.3290), 1);
            var back = Cielab.From(new(x, y, z), white).ToTristimulus(white);
            Assert.Equal(x, back.X, 1e-12);
            Assert.Equal(y, back.Y, 1e-12);
            Assert.Equal(z, back.Z, 1e-12);
        });

    [Fact]
    public void Chromaticity_DoesNotSeeTheAmountOfLight() =>
        Gen.Select(Gen.Double[400, 700], Gen.Double[2, 80], Gen.Double[1e-6, 1e6]).Sample((peakNm, fwhmNm, factor) =>
        {
            var light = Spectrum.Gaussian<WattPerNm>(peakNm, fwhmNm);
            var (one, other) = (Tristimulus.Of(light, StandardObserver.Cie1931), Tristimulus.Of(light.ScaledBy(factor), StandardObserver.Cie1931));
            Assert.Equal(one.Chromaticity.X, other.Chromaticity.X, 1e-12);
            Assert.Equal(one.Chromaticity.Y, other.Chromaticity.Y, 1e-12);
            // A real light lies inside the locus; violet below 380 nm, where the purple line begins here, reaches a hair beyond.
            if (DominantWavelength.Of(one.Chromaticity, new(1.0 / 3, 1.0 / 3)) is { } dominant)
                Assert.InRange(dominant.ExcitationPurityShare, 0, 1 + 1e-3);
        });

    [Fact]
    public void De2000_OfAColourWithItself_IsZero_AndIsTheSameBothWays() =>
        Gen.Select(Gen.Double[0, 100], Gen.Double[-90, 90], Gen.Double[-90, 90], Gen.Double[0, 100], Gen.Double[-90, 90], Gen.Double[-90, 90]).Sample((l, a, b, m, c, d) =>
        {
            Cielab one = new(l, a, b), other = new(m, c, d);
            Assert.Equal(0, ColourDifference.De2000(one, one));
            Assert.Equal(ColourDifference.De2000(one, other), ColourDifference.De2000(other, one), 1e-9);
        });

    [Fact]
    public void NoLight_HasNoColour()
    {
        var dark = Tristimulus.Of(Spectrum.Flat<WattPerNm>(0, "dark"), StandardObserver.Cie1931);
        Assert.False(dark.HasColour);
        Assert.Throws<InvalidOperationException>(() => dark.Chromaticity);
        Assert.Null(LuminousEfficacy.LumensPerWatt(Spectrum.Flat<WattPerNm>(0, "dark")));
    }
}
