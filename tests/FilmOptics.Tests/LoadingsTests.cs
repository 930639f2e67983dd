using CsCheck;

namespace FilmOptics.Tests;

public sealed class LoadingsTests
{
    // Source: volume fraction of 1 wt% in a host of 1.1 g/mL, computed with independent code from the definition (volumes add);
    // densities: rutile 4.23, silicone 1.32, and CdSe 5.82, InP 4.81, CsPbBr3 4.75 g/mL from memory of handbook values.
    [Theory]
    [InlineData(4.23, ".002620")]
    [InlineData(5.82, ".001905")]
    [InlineData(4.81, ".002305")]
    [InlineData(4.75, ".002334")]
    [InlineData(1.32, ".008347")]
    public void VolumeShare_OfOneWtPercent_MatchesTheRow(double dotDensityGPerMl, string printed)
    {
        double share = Loadings.VolumeShareFromWtPercent(1, dotDensityGPerMl, 1.1);
        Assert.Equal(double.Parse(printed, System.Globalization.CultureInfo.InvariantCulture), share, 5e-7);

        // mg/mL of dots is 1000 times volume share times density.
        Assert.Equal(1000 * share * dotDensityGPerMl, Loadings.MgPerMlFromWtPercent(1, dotDensityGPerMl, 1.1), 1e-12);
    }

    [Fact]
    public void Conversions_ThereAndBack_GiveTheSame() =>
        Gen.Select(Gen.Double[0, 99.9], Gen.Double[0.5, 20], Gen.Double[0.5, 20]).Sample((percent, dot, host) =>
        {
            double mgPerMl = Loadings.MgPerMlFromWtPercent(percent, dot, host);
            Assert.Equal(percent, Loadings.WtPercentFromMgPerMl(mgPerMl, dot, host), 1e-9);
            Assert.Equal(percent, Loadings.WtPercentFromVolumeShare(Loadings.VolumeShareFromMgPerMl(mgPerMl, dot), dot, host), 1e-9);
        });

    [Theory]
    [InlineData(0, 0)]
    [InlineData(100, 1)]
    public void VolumeShare_AtTheEnds_IsNoneOrAll(double wtPercent, double share) =>
        Assert.Equal(share, Loadings.VolumeShareFromWtPercent(wtPercent, 3, 1.1));

    [Fact]
    public void EqualDensities_WeightIsVolume() => Assert.Equal(0.2, Loadings.VolumeShareFromWtPercent(20, 1.3, 1.3), 1e-15);
}
