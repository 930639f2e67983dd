using FilmOptics.Tests.Reading;

namespace FilmOptics.Tests.DotPhysics;

/// <summary>Lots by description: their line, their scale, and what a film file may say.</summary>
public sealed class DescribedDotTests : IDisposable
{
    private const string Described =
        "  - name: green one\n    material: CdSe\n    core_diameter_nm: 2.9\n    size_spread_percent: 5\n    homogeneous_fwhm_mev: 60\n"
        + "    stokes_shift_nm: 12\n    core_mass_fraction: 0.3\n    quantum_yield: 0.92\n";

    private readonly FilmFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void FivePercentOfSpread_IsTheWidthThatTheCurveImplies()
    {
        var dot = Dot() with { HomogeneousFwhmMev = 10 };
        var curve = SizingCurve.Of("CdSe").First();
        double peakNm = curve.PeakNm(dot.CoreDiameterNm)!.Value;

        // The sizes a standard deviation either way, through the curve itself, and the single dot's 10 meV.
        double Ev(double diameterNm) => EffectiveMass.PhotonEvNm / curve.PeakNm(diameterNm)!.Value;
        double spreadMev = 1000 * (Ev(0.95 * dot.CoreDiameterNm) - Ev(1.05 * dot.CoreDiameterNm)) / 2 * DotLine.FwhmPerDeviation;
        var band = EmissionBands.Of("dot", dot.Emission(0));
        Assert.Equal(1, DotLine.FwhmMev(band.FwhmNm!.Value, band.PeakNm!.Value) / DotLine.TotalFwhmMev(10, spreadMev), 0.03);
        Assert.Equal(peakNm + 12, band.PeakNm.Value, 0.5);
    }

    [Fact]
    public void Absorbance_FarAboveTheGap_IsLeatherdalesForAnySize()
    {
        // Source: Leatherdale et al. 2002, 5.501e5 a³ cm² at 350 nm; at 360 nm a little less. Bare dots: core_mass_fraction 1.
        foreach (double diameterNm in (double[])[2.4, 3, 4, 5])
        {
            var dot = Dot() with { CoreDiameterNm = diameterNm, CoreMassShare = 1 };
            double perCm = dot.Absorbance()[360] * Math.Log(10) * 1000 * 5.82;
            Assert.Equal(1, perCm / (1.3133e5 * Math.Pow(9.10e4 / 1.3133e5, 0.1)), 0.02);
        }
    }

    [Fact]
    public void Absorbance_AtItsFirstPeak_IsThePublishedExtinction()
    {
        // Jasieniak et al. 2009 holds for a half-width of 60 meV: a dot of that width, less what the next transitions add.
        var dot = Dot() with { SizeSpreadShare = 0, HomogeneousFwhmMev = 120, CoreMassShare = 1 };
        double peakNm = dot.FirstPeakNm(), volumeMl = 4.0 / 3 * Math.PI * Math.Pow(2.9e-7 / 2, 3);
        double molarMass = volumeMl * 5.82 * 6.02214076e23;
        double extinction = dot.Absorbance()[(int)Math.Round(peakNm)] * molarMass;
        double published = SizingCurve.Of("CdSe").Last().ExtinctionPerMPerCm(SizingCurve.Of("CdSe").Last().PeakNm(2.9)!.Value);
        Assert.InRange(extinction / published, 0.97, 1.35);
    }

    [Fact]
    public void Absorbance_GoesWithTheCoresShareOfTheMass() => Assert.Equal(
        0.3 * (Dot() with { CoreMassShare = 1 }).Absorbance()[450], Dot().Absorbance()[450], 1e-12);

    [Fact]
    public void AShell_MovesTheLineToTheRed_MoreSoTheThickerItIs()
    {
        // Measured shifts of two or three monolayers are some 30 nm; effective mass is known to give more (see the warning).
        double Shift(double shellNm) => (Dot() with { Shell = Semiconductor.Named("CdS"), ShellNm = shellNm }).FirstPeakNm() - Dot().FirstPeakNm();
        Assert.InRange(Shift(0.35), 5, Shift(0.7));
        Assert.InRange(Shift(0.7), Shift(0.35), Shift(2));
        Assert.InRange(Shift(2), Shift(0.7), 200);
    }

    [Fact]
    public void FilmFile_TakesALotByDescription_AndWarnsOfIt()
    {
        var filmCase = _folder.Load(WithDescription());
        var lot = filmCase.Film.Lots[0];
        Assert.InRange(EmissionBands.Of("green", lot.Emission).PeakNm!.Value, 540, 570);
        Assert.Equal(Dot().Absorbance()[450], lot.Absorbance[450], 1e-12);
        Assert.Contains(filmCase.Warnings, warning => warning.Contains("lots[green one]", StringComparison.Ordinal) && warning.Contains("no measurement", StringComparison.Ordinal));
        Assert.Equal(1, new DiscreteOrdinatesModel().Solve(filmCase.Film, TestContext.Current.CancellationToken).Budget.Sum, 1e-10);
    }

    [Theory]
    [InlineData("material: CdSe", "material: CdSex", "CdSe, InP")]
    [InlineData("core_diameter_nm: 2.9", "core_diameter_nm: 0.2", "1 to 20 nm")]
    [InlineData("core_mass_fraction: 0.3", "core_mass_fraction: 0", "above 0, to 1")]
    [InlineData("core_mass_fraction: 0.3", "core_mass_fracton: 0.3", "the nearest is core_mass_fraction")]
    [InlineData("stokes_shift_nm: 12", "absorbance: green-absorbance.csv", "measured or described")]
    [InlineData("material: CdSe", "absorbance: green-absorbance.csv\n    emission: green-emission.csv", "that needs material")]
    [InlineData("core_mass_fraction: 0.3", "core_mass_fraction: 0.3\n    shell: {material: CsPbBr3, thickness_nm: 1}", "CdTe, InP")]
    public void FilmFile_WithAWrongDescription_SaysWhatIsAllowed(string old, string wrong, string message) => Assert.Contains(
        _folder.Faults(WithDescription().Replace(old, wrong, StringComparison.Ordinal)),
        fault => fault.Message.Contains(message, StringComparison.Ordinal));

    private static DescribedDot Dot() => new()
    {
        Material = Semiconductor.Named("CdSe"),
        CoreDiameterNm = 2.9,
        SizeSpreadShare = 0.05,
        HomogeneousFwhmMev = 60,
        StokesShiftNm = 12,
        CoreMassShare = 0.3,
    };

    private static string WithDescription()
    {
        string whole = FilmFolder.Whole;
        int from = whole.IndexOf("  - name: green one", StringComparison.Ordinal), to = whole.IndexOf("  - name: red one", StringComparison.Ordinal);
        return whole[..from] + Described + whole[to..];
    }
}
