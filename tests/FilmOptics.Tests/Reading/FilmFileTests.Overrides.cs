namespace FilmOptics.Tests.Reading;

public sealed class FilmFileOverrideTests : IDisposable
{
    private readonly FilmFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    private FilmCase With(params string[] overrides) => _folder.Load(FilmFolder.Whole, overrides);

    [Fact]
    public void Set_ItemsByIndexAndByName_ReachTheSameKeys()
    {
        Assert.Equal(0.08, With("layers[1].thickness_um=80").Film.Layers[1].ThicknessMm);
        Assert.Equal(0.08, With("layers[dot layer].thickness_um=80").Film.Layers[1].ThicknessMm);
        Assert.Equal(0.85, With("lots[green one].quantum_yield=0.85").Film.Lots[0].QuantumYieldShare);
        Assert.Equal(5, With("layers[dot layer].dots[green one].loading_mg_per_ml=5").Film.Layers[1].Dots[0].LoadingMgPerMl);
        Assert.Equal(5, With("layers[1].dots[0].loading_mg_per_ml=5").Film.Layers[1].Dots[0].LoadingMgPerMl);
    }

    [Fact]
    public void Set_Twice_TheLaterWins() =>
        Assert.Equal(0.07, With("layers[1].thickness_um=80", "layers[1].thickness_um=70").Film.Layers[1].ThicknessMm);

    [Fact]
    public void Set_KeyThatIsAbsent_IsAddedWithWhatHoldsIt()
    {
        string bare = FilmFolder.With("sheet: {width_mm: 600, height_mm: 340}\n", "");
        Assert.Equal(500, _folder.Load(bare, "sheet.width_mm=500").Film.Sheet!.WidthMm);
        Assert.Equal(2, With("lots[red one].film_emission_shift_nm=2").Film.Lots[1].FilmEmissionShiftNm);
        Assert.Equal(9, With("target.free[green one].max_mg_per_ml=9").Target!.Free[0].MaxMgPerMl);
        Assert.Equal(9, With("target.free[red one].max_mg_per_ml=9").Target!.Free[1].MaxMgPerMl);
    }

    [Fact]
    public void Set_OptionOfASpectrum_TurnsTheFileNameIntoAMapping()
    {
        var photons = With("backlight.spectrum.shift_nm=2").Film.Backlight.Photons;
        Assert.Equal(449 - 360, photons.Samples.IndexOf(photons.Peak));
        Assert.Equal(6, With("lots[green one].absorbance.scale=2").Film.Lots[0].Absorbance[360], 9);
        Assert.Equal(0.3, With("target.white_xy=[0.3, 0.32]").Target!.WhiteX);
    }

    [Fact]
    public void Set_ListOrMapping_ReplacesTheWhole()
    {
        var layer = With("layers[dot layer].dots=[{lot: red one, loading_mg_per_ml: 3}]", "target.free=[red one, red one]", "target={white_xy: [0.3, 0.3]}").Film.Layers[1];
        Assert.Equal(3, Assert.Single(layer.Dots).LoadingMgPerMl);
    }

    [Theory]
    [InlineData("layers[0].thickness_um=-5", 24, "layers[barrier].thickness_um is -5")]
    [InlineData("layers[0].thickness_um=thick", 24, "a number is due")]
    [InlineData("layers[dot layr].thickness_um=5", 8, "nearest: dot layer")]
    [InlineData("layers[2].thickness_um=5", 8, "allowed is 0 to 1")]
    [InlineData("layrs[0].thickness_um=5", 7, "nearest key: layers")]
    [InlineData("layers.thickness_um=5", 8, "choose an item")]
    [InlineData("title[0]=5", 7, "chooses from a list")]
    [InlineData("layers[0.thickness_um=5", 7, "not closed")]
    [InlineData("layers[0]thickness_um=5", 10, "A dot or = is due")]
    [InlineData("layers[0].=5", 11, "after the dot")]
    [InlineData("layers[0]..thickness_um=5", 11, "A key is due here")]
    [InlineData("[0]=5", 1, "A key is due here")]
    [InlineData("thickness", 1, "KEY=VALUE is due")]
    [InlineData("=5", 1, "KEY=VALUE is due")]
    [InlineData("title=", 6, "A value is due")]
    [InlineData("title=[a", 9, "flow sequence")]
    [InlineData("titel=new", 1, "nearest is title")]
    [InlineData("cavity.below_reflectance.shift_nm=2", 26, "'0.95' here, which has no keys")]
    [InlineData("backlight.spectrum.shft_nm=2", 20, "nearest is shift_nm")]
    [InlineData("backlight.spectrum.shift_nm=blue", 29, "a number is due")]
    public void Set_Wrong_NamesTheOptionAndThePlace(string option, int column, string words)
    {
        var fault = Assert.Single(_folder.Faults(FilmFolder.Whole, option));
        Assert.Equal($"--set {option}", fault.File);
        Assert.Equal((1, column), (fault.Line, fault.Column));
        Assert.Contains(words, fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Set_NameWithDotsAndEqualsSign_IsTakenWhole()
    {
        string yaml = FilmFolder.Whole.Replace("green one", "\"g=1.5\"", StringComparison.Ordinal);
        Assert.Equal(0.5, _folder.Load(yaml, "lots[g=1.5].quantum_yield=0.5").Film.Lots[0].QuantumYieldShare);
    }
}
