using Colorimetry;
using CsCheck;

namespace FilmOptics.Tests.DotPhysics;

/// <summary>Sizes, band edges, shells, alloys, temperatures and absorption of dots against published and independently computed figures.</summary>
public sealed class DotPhysicsTests
{
    // E(R) without the correlation term; computed by an independent code from Brus 1984 with the constants of the table.
    [Theory]
    [InlineData("CdSe", 1.5, 3.2352)]
    [InlineData("CdSe", 2.0, 2.5507)]
    [InlineData("CdSe", 2.5, 2.2395)]
    [InlineData("CdSe", 3.0, 2.0734)]
    [InlineData("CdS", 1.5, 3.1239)]
    [InlineData("CdS", 2.0, 2.7596)]
    [InlineData("CdS", 2.5, 2.6012)]
    [InlineData("CdS", 3.0, 2.5208)]
    [InlineData("InP", 1.5, 3.5865)]
    [InlineData("InP", 2.0, 2.5795)]
    [InlineData("InP", 2.5, 2.1181)]
    [InlineData("InP", 3.0, 1.8701)]
    [InlineData("ZnSe", 1.5, 3.8493)]
    [InlineData("ZnSe", 2.0, 3.3112)]
    [InlineData("ZnSe", 2.5, 3.0685)]
    [InlineData("ZnSe", 3.0, 2.9402)]
    public void EffectiveMass_BandEdge_IsTheComputedOne(string material, double radiusNm, double expectedEv)
    {
        Assert.Equal(expectedEv, EffectiveMass.BandEdgeEv(Semiconductor.Named(material), radiusNm), 5.5e-5);
        Assert.Equal(radiusNm, EffectiveMass.RadiusNm(Semiconductor.Named(material), EffectiveMass.BandEdgeEv(Semiconductor.Named(material), radiusNm))!.Value, 1e-6);
    }

    // Reduced mass, Bohr radius and Rydberg energy of the pair; computed by an independent code.
    [Theory]
    [InlineData("CdSe", .10086, 5.56, 12.2)]
    [InlineData("CdS", .16634, 1.81, 69.7)]
    [InlineData("CdTe", .08370, 6.45, 10.9)]
    [InlineData("InP", .07020, 9.35, 6.2)]
    [InlineData("ZnSe", .12493, 3.85, 20.5)]
    [InlineData("CsPbBr3", .07241, 5.33, 18.5)]
    public void Semiconductor_PairFigures_AreTheComputedOnes(string name, double reduced, double bohrNm, double rydbergMev)
    {
        var material = Semiconductor.Named(name);
        Assert.Equal(reduced, material.ReducedMassFactor, 5.5e-6);
        Assert.Equal(bohrNm, material.BohrRadiusNm, 5.5e-3);
        Assert.Equal(rydbergMev, material.RydbergMev, 0.055);
    }

    // Polynomials of Yu et al. 2003 and Jasieniak et al. 2009 at tabulated wavelengths; evaluated by an independent code.
    [Theory]
    [InlineData("CdSe", "Yu 2003", 450, 1.9511, 3.443e4)]
    [InlineData("CdSe", "Yu 2003", 500, 2.3450, 5.605e4)]
    [InlineData("CdSe", "Yu 2003", 550, 3.0403, 1.115e5)]
    [InlineData("CdSe", "Yu 2003", 580, 3.8193, 2.041e5)]
    [InlineData("CdSe", "Yu 2003", 600, 4.5831, 3.309e5)]
    [InlineData("CdSe", "Yu 2003", 620, 5.6059, 5.644e5)]
    [InlineData("CdSe", "Yu 2003", 640, 6.9489, 9.971e5)]
    [InlineData("CdSe", "Jasieniak 2009", 450, 1.9206, 1.558e5)]
    [InlineData("CdSe", "Jasieniak 2009", 500, 2.4332, 1.597e5)]
    [InlineData("CdSe", "Jasieniak 2009", 550, 3.1949, 1.906e5)]
    [InlineData("CdSe", "Jasieniak 2009", 580, 3.9377, 2.615e5)]
    [InlineData("CdSe", "Jasieniak 2009", 600, 4.6296, 3.637e5)]
    [InlineData("CdSe", "Jasieniak 2009", 620, 5.5334, 5.472e5)]
    [InlineData("CdSe", "Jasieniak 2009", 640, 6.7027, 8.637e5)]
    [InlineData("CdS", "Yu 2003", 375, 2.6521, null)]
    [InlineData("CdS", "Yu 2003", 400, 3.3831, null)]
    [InlineData("CdS", "Yu 2003", 425, 4.2587, null)]
    [InlineData("CdS", "Yu 2003", 450, 5.2728, null)]
    [InlineData("CdTe", "Yu 2003", 550, 3.2420, null)]
    [InlineData("CdTe", "Yu 2003", 600, 3.6623, null)]
    [InlineData("CdTe", "Yu 2003", 650, 4.3405, null)]
    public void SizingCurve_AtTabulatedPeaks_GivesDiameterAndExtinction(string material, string name, double peakNm, double diameterNm, double? extinction)
    {
        var curve = SizingCurve.Of(material).Single(candidate => candidate.Name == name);
        Assert.Equal(diameterNm, curve.DiameterNm(peakNm), 5.5e-5);
        Assert.Equal(peakNm, curve.PeakNm(curve.DiameterNm(peakNm))!.Value, 1e-6);
        if (extinction is { } expected)
            Assert.Equal(1, curve.ExtinctionPerMPerCm(peakNm) / expected, 5.5e-4);
    }

    [Theory]
    [InlineData("CdSe", 449)]
    [InlineData("CdSe", 671)]
    [InlineData("CdTe", 700)]
    [InlineData("CdS", 374)]
    public void SizingCurve_OutsideItsRange_IsRefused(string material, double peakNm) => Assert.All(
        SizingCurve.Of(material),
        curve => Assert.Contains("outside its range", Assert.Throws<InputException>(() => curve.DiameterNm(peakNm)).Message, StringComparison.Ordinal));

    [Fact]
    public void EffectiveMass_OfASmallDot_IsTooBlue()
    {
        // Radius 1.5 nm: 3.24 eV against some 2.27 from the sizing curve, as the literature finds.
        var curve = SizingCurve.Of("CdSe").First();
        double measuredEv = EffectiveMass.PhotonEvNm / curve.PeakNm(3.0)!.Value;
        Assert.InRange(measuredEv, 2.2, 2.32);
        Assert.True(EffectiveMass.BandEdgeEv(Semiconductor.Named("CdSe"), 1.5) > measuredEv + 0.8);
    }

    [Fact]
    public void Well_OfHardWalls_IsTheTextbooks() => Gen.Select(Gen.Double[0.5, 10], Gen.Double[0.05, 1.5]).Sample((radiusNm, mass) =>
        Assert.Equal(
            1,
            SphericalWell.GroundStateEv([new(radiusNm, mass, 0)], double.PositiveInfinity)!.Value / (EffectiveMass.ConfinementEvNm2 * Math.PI * Math.PI / (mass * radiusNm * radiusNm)),
            1e-9));

    [Fact]
    public void Well_BelowTheCriticalDepth_HoldsNothing()
    {
        // Equal masses inside and out: no bound state for V₀ < π²ħ²/(8 m a²) (any quantum mechanics textbook).
        const double radiusNm = 2, mass = 0.2;
        double criticalEv = EffectiveMass.ConfinementEvNm2 * Math.PI * Math.PI / (4 * mass * radiusNm * radiusNm);
        Assert.Null(SphericalWell.GroundStateEv([new(radiusNm, mass, 0)], 0.999 * criticalEv, mass));
        Assert.NotNull(SphericalWell.GroundStateEv([new(radiusNm, mass, 0)], 1.01 * criticalEv, mass));
    }

    [Fact]
    public void Well_OfFiniteDepth_MeetsItsOwnCondition() => Gen.Select(Gen.Double[1, 5], Gen.Double[0.05, 0.5], Gen.Double[1, 6]).Sample((radiusNm, mass, barrierEv) =>
    {
        // Equal masses: k cot(k a) = −κ.
        if (SphericalWell.GroundStateEv([new(radiusNm, mass, 0)], barrierEv, mass) is not { } energy)
            return;
        double k = Math.Sqrt(mass * energy / EffectiveMass.ConfinementEvNm2), decay = Math.Sqrt(mass * (barrierEv - energy) / EffectiveMass.ConfinementEvNm2);
        Assert.Equal(-decay, k / Math.Tan(k * radiusNm), 1e-6 * (1 + decay));
        Assert.InRange(k * radiusNm, Math.PI / 2, Math.PI);
    });

    [Fact]
    public void Well_WithAShellOfItsOwnKind_IsAWiderWell() => Assert.Equal(
        SphericalWell.GroundStateEv([new(3, 0.13, 0)], 4)!.Value,
        SphericalWell.GroundStateEv([new(2, 0.13, 0), new(3, 0.13, 0)], 4)!.Value,
        1e-10);

    [Fact]
    public void AShell_ShiftsTheBandEdgeToTheRed()
    {
        var (core, shell) = (Semiconductor.Named("CdSe"), Semiconductor.Named("CdS"));
        double bare = EffectiveMass.BandEdgeEv(core, 2, null, 0, 4)!.Value, last = bare;
        foreach (double thicknessNm in (double[])[0.3, 0.7, 1.5, 3])
        {
            double covered = EffectiveMass.BandEdgeEv(core, 2, shell, thicknessNm, 4)!.Value;
            Assert.True(covered < last, $"{thicknessNm} nm: {covered} eV");
            last = covered;
        }

        Assert.InRange(bare - last, 0.03, 0.4);
        Assert.True(bare < EffectiveMass.BandEdgeEv(core, 2));
        Assert.Throws<InputException>(() => EffectiveMass.BandEdgeEv(core, 2, Semiconductor.Named("CsPbBr3"), 1, 4));
    }

    // Γ gap of Ga(x)In(1−x)P at 300 K, b = 0.65 eV (Vurgaftman et al. 2001), ends 1.352886 and 2.777039 eV; computed by an independent code.
    [Theory]
    [InlineData(.1, 1.43680)]
    [InlineData(.2, 1.53372)]
    [InlineData(.3, 1.64363)]
    [InlineData(.5, 1.90246)]
    public void Alloy_Gap_BowsAsPublished(double share, double expectedEv)
    {
        Semiconductor inP = Semiconductor.Named("InP") with { GapEv = 1.352886 }, gaP = inP with { Name = "GaP", GapEv = 2.777039 };
        Assert.Equal(expectedEv, Semiconductor.Alloy(gaP, inP, share, 0.65).GapEv, 5.5e-6);
    }

    [Fact]
    public void Alloy_Mass_MayFallBelowBothParents()
    {
        var (a, b) = (Semiconductor.Named("CdSe"), Semiconductor.Named("ZnSe"));
        Assert.True(Semiconductor.Alloy(a, b, 0.5, 0.4, -4).ElectronMassFactor < Math.Min(a.ElectronMassFactor, b.ElectronMassFactor));
        Assert.Equal(a.ElectronMassFactor, Semiconductor.Alloy(a, b, 1, 0.4, -4).ElectronMassFactor, 1e-12);
        Assert.InRange(Semiconductor.Alloy(a, b, 0.5, 0).ElectronMassFactor, a.ElectronMassFactor, b.ElectronMassFactor);
    }

    // Slopes at 300 K; InP after Vurgaftman et al. 2001, CdSe dots α 3.2e-4, β 220 (from memory); computed by an independent code.
    [Theory]
    [InlineData(3.2e-4, 220, -.2627, .0595, .0841)]
    [InlineData(3.63e-4, 162, -.3184, .0721, .1019)]
    public void Varshni_SlopesAndShifts_AreTheComputedOnes(double alpha, double beta, double slopeMev, double green, double red)
    {
        double slope = DotLine.VarshniSlopeMevPerKelvin(alpha, beta, 300);
        Assert.Equal(slopeMev, slope, 5.5e-5);
        Assert.Equal(green, DotLine.ShiftNmPerKelvin(slope, 530), 5.5e-5);
        Assert.Equal(red, DotLine.ShiftNmPerKelvin(slope, 630), 5.5e-5);
    }

    [Fact]
    public void Varshni_InPAt300K_IsThePublishedGap() => Assert.Equal(1.35289, DotLine.VarshniEv(1.4236, 3.63e-4, 162, 300), 5.5e-6);

    // First-order conversions; computed by an independent code.
    [Theory]
    [InlineData(25, 530, 110.35, 0.0055)]
    [InlineData(35, 530, 154.5, 0.055)]
    [InlineData(40, 530, 176.6, 0.055)]
    [InlineData(25, 630, 78.1, 0.055)]
    [InlineData(35, 630, 109.3, 0.055)]
    [InlineData(20, 520, 91.7, 0.055)]
    [InlineData(20, 450, 122.5, 0.055)]
    public void Linewidth_InEnergy_IsTheComputedOne(double fwhmNm, double peakNm, double fwhmMev, double half)
    {
        Assert.Equal(fwhmMev, DotLine.FwhmMev(fwhmNm, peakNm), half);
        Assert.Equal(fwhmNm, DotLine.FwhmNm(DotLine.FwhmMev(fwhmNm, peakNm), peakNm), 1e-12);
    }

    [Fact]
    public void SizeSpread_GivesTheWidthThatTheCurveImplies()
    {
        // Against the spread itself: sizes a standard deviation either way, through the curve.
        var curve = SizingCurve.Of("CdSe").First();
        double diameterNm = curve.DiameterNm(560), sigma = 0.02 * diameterNm;
        double ev(double d) => EffectiveMass.PhotonEvNm / curve.PeakNm(d)!.Value;
        double expectedMev = 1000 * (ev(diameterNm - sigma) - ev(diameterNm + sigma)) / 2 * DotLine.FwhmPerDeviation;
        Assert.Equal(1, DotLine.SpreadFwhmMev(curve.SlopeMevPerNm(560), diameterNm, 0.02) / expectedMev, 0.01);
        Assert.Equal(5, DotLine.TotalFwhmMev(3, 4));
    }

    // Leatherdale et al. 2002; extinction computed by an independent code.
    [Theory]
    [InlineData(2.0, 4.401e-15, 1.1510e6)]
    [InlineData(2.5, 8.595e-15, 2.248e6)]
    [InlineData(3.0, 1.4853e-14, 3.8845e6)]
    public void CrossSection_Of350Nm_IsLeatherdales(double radiusNm, double crossSection, double extinction)
    {
        double found = DotAbsorption.CdSe350CrossSectionCm2(radiusNm);
        Assert.Equal(1, found / crossSection, 1.3e-4);
        Assert.Equal(1, DotAbsorption.ExtinctionPerMPerCm(found) / extinction, 2.5e-4);
        Assert.Equal(1.3133e5, DotAbsorption.IntrinsicPerCm(found, radiusNm), 5.5);
    }

    // n + ik as published (Ninomiya and Adachi 1995; Aspnes and Studna 1983); computed by an independent code.
    [Theory]
    [InlineData(450, 3, 0.5, 1.5, 6.8938e4, 0.55)]
    [InlineData(350.4, 2.8511, 0.7860, 1.375, 1.274e5, 55)]
    [InlineData(450, 2.634, 0.539, 1.5, 9.10e4, 55)]
    [InlineData(413.3, 4.395, 1.247, 1.5, 8.22e4, 55)]
    [InlineData(335.1, 3.103, 1.816, 1.5, 2.63e5, 550)]
    public void LocalField_GivesTheIntrinsicCoefficient(double nm, double n, double k, double host, double perCm, double half) =>
        Assert.Equal(perCm, DotAbsorption.LocalFieldPerCm(nm, n, k, host), half);

    [Fact]
    public void LocalFieldFactor_IsTheComputedOne() => Assert.Equal(.246868, DotAbsorption.LocalFieldFactor(3, 0.5, 1.5), 5.5e-7);

    [Fact]
    public void Absorbance_OfAWeighedDot_ComesFromItsVolume()
    {
        // 0.1 vol% of CdSe (5.82 g/mL, 9.10e4 /cm at 450 nm) in 100 µm is an optical depth of 0.91 (rule of the same tables).
        double mgPerMl = 0.001 * 5.82 * 1000;
        double depth = DotAbsorption.AbsorbancePerCmPerMgPerMl(9.10e4, 5.82, 1) * mgPerMl * Math.Log(10) * 0.01;
        Assert.Equal(0.91, depth, 5.5e-3);
        Assert.Equal(0.25 * DotAbsorption.AbsorbancePerCmPerMgPerMl(9.10e4, 5.82, 1), DotAbsorption.AbsorbancePerCmPerMgPerMl(9.10e4, 5.82, 0.25), 1e-12);
    }

    [Fact]
    public void UnknownMaterial_IsRefusedWithTheKnownOnes() => Assert.Contains(
        "CdSe, CdS", Assert.Throws<InputException>(() => Semiconductor.Named("Unobtainium")).Message, StringComparison.Ordinal);
}
