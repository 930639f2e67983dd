namespace FilmOptics.Tests.Reading;

/// <summary>Faults of the spectra that a film file names.</summary>
public sealed class FilmFileSpectraTests : IDisposable
{
    private readonly FilmFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Theory]
    [InlineData("spectrum: led.csv", "spectrum: led2.csv", "led2.csv", "is not there")]
    [InlineData("spectrum: led.csv", "spectrum: filters.csv", "filters.csv   #", "wavelength_nm, red, green, blue", "power_per_nm or photons_per_nm")]
    [InlineData("spectrum: led.csv", "spectrum: {file: led.csv, column: power}", "power}", "power_per_nm, photons_per_nm")]
    [InlineData("spectrum: led.csv", "spectrum: {file: led.csv, column: photons_per_nm}", "led.csv, column", "due is wavelength_nm and photons_per_nm")]
    [InlineData("spectrum: led.csv", "spectrum: {file: led.csv, outside: hold}", "hold", "allowed is zero")]
    [InlineData("spectrum: led.csv", "spectrum: {file: led.csv, shift: 2}", "shift", "nearest is shift_nm")]
    [InlineData("spectrum: led.csv", "spectrum: {shift_nm: 2}", "{shift_nm", "has no file")]
    [InlineData("spectrum: led.csv", "spectrum: 447", "447   #", "peak_nm and fwhm_nm")]
    [InlineData("spectrum: led.csv", "spectrum: [led.csv]", "[led.csv]", "a list")]
    [InlineData("spectrum: led.csv", "spectrum: {peak_nm: 447}", "{peak_nm", "has no fwhm_nm")]
    [InlineData("spectrum: led.csv", "spectrum: {peak_nm: 370, fwhm_nm: 20}", "20}", "0.1 % of its peak", "360 to 830 nm")]
    [InlineData("spectrum: led.csv", "spectrum: {peak_nm: 447.5, fwhm_nm: 0.001}", "0.001}", "misses every sample")]
    [InlineData("spectrum: led.csv", "spectrum: {file: led.csv, peak_nm: 447, fwhm_nm: 19}", "led.csv, peak", "give one of them")]
    [InlineData("spectrum: led.csv", "spectrum: led.csv\n  peak_nm: 447\n  fwhm_nm: 19", "led.csv\n", "give one of them")]
    [InlineData("absorbance: red-absorbance.csv", "absorbance: {file: red-absorbance.csv, at_nm: 450}", "450}", "needs value")]
    [InlineData("absorbance: red-absorbance.csv", "absorbance: {file: red-absorbance.csv, at_nm: 450, value: 1, scale: 2}", "2}", "give one of them")]
    [InlineData("absorbance: red-absorbance.csv", "absorbance: red-emission.csv", "red-emission.csv\n    emission", "due is wavelength_nm and absorbance_per_cm")]
    [InlineData("absorbance: red-absorbance.csv", "absorbance: 3", "3\n    emission: red", "a spectrum file")]
    [InlineData("incidence: lambertian", "incidence: return.csv", "return.csv", "due is angle_deg, radiance")]
    [InlineData("incidence: lambertian", "incidence: led.csv", "led.csv\n", "due is angle_deg, radiance")]
    [InlineData("below_reflectance: 0.95", "below_reflectance: return.csv", "return.csv", "due is wavelength_nm and reflectance")]
    [InlineData("above_reflectance: 0.45", "above_reflectance: profile.csv", "profile.csv", "due is angle_deg, reflectance")]
    [InlineData("above_absorptance: 0.02\n", "above_absorptance: 0.4\n", null, "at 0 degrees", "at most 1")]
    [InlineData("observer: CIE 1964 10°", "observer: led.csv", "led.csv\n\nbeer", "x_bar, y_bar, z_bar")]
    [InlineData("filters: filters.csv", "filters: led.csv", "led.csv\n  area", "wavelength_nm, red, green, blue")]
    public void Spectrum_NamedWrongly_IsOneFaultInTheFilmFile(string old, string changed, string? at, params string[] words)
    {
        string yaml = FilmFolder.With(old, changed);
        if (at is null)
            yaml = yaml.Replace("above_reflectance: 0.45", "above_reflectance: return.csv", StringComparison.Ordinal);
        _folder.Refuses(yaml, at ?? "0.4\n", words);
    }

    [Fact]
    public void Emission_ThatIsZero_DoesNotIntegrate()
    {
        _folder.Curve("red-emission.csv", "wavelength_nm,photons_per_nm", _ => "0");
        _folder.Refuses(FilmFolder.Whole, "red-emission.csv", "lots[red one].emission", "no light");
    }

    [Theory]
    [InlineData(430, 830, "430")]
    [InlineData(360, 600, "600")]
    public void Absorbance_ThatStopsWithinTheLight_NamesTheWavelengths(int fromNm, int toNm, string end)
    {
        _folder.Curve("red-absorbance.csv", "wavelength_nm,absorbance_per_cm", _ => "1", fromNm, toNm);
        _folder.Refuses(FilmFolder.Whole, "red-absorbance.csv", "lots[red one].absorbance", $"{end} ", "there is light from 4", "outside: hold");
        Assert.Equal(0, _folder.Load(FilmFolder.With("absorbance: red-absorbance.csv", "absorbance: {file: red-absorbance.csv, outside: zero}")).Film.Lots[1].Absorbance[fromNm == 430 ? 400 : 700]);
        Assert.Equal(1, _folder.Load(FilmFolder.With("absorbance: red-absorbance.csv", "absorbance: {file: red-absorbance.csv, outside: hold}")).Film.Lots[1].Absorbance[fromNm == 430 ? 400 : 700]);
    }

    [Fact]
    public void Absorbance_OfALotThatEmitsIntoNoUsedLight_NeedNotCoverAnUnusedLotsLine()
    {
        // A spare lot at 780 nm is in no layer: the others need not be known there.
        _folder.Curve("spare-emission.csv", "wavelength_nm,photons_per_nm", nm => nm is > 770 and < 790 ? "1" : "0");
        _folder.Curve("red-absorbance.csv", "wavelength_nm,absorbance_per_cm", _ => "1", 360, 720);
        string yaml = FilmFolder.With("lots:\n", "lots:\n  - {name: spare, absorbance: green-absorbance.csv, emission: spare-emission.csv, quantum_yield: 0.5}\n");
        Assert.Equal(3, _folder.Load(yaml).Film.Lots.Count);
    }

    [Fact]
    public void Return_WithAbsorptanceSpectrum_NamesTheFirstWavelengthOverOne()
    {
        _folder.Curve("sheets.csv", "wavelength_nm,reflectance", nm => nm < 600 ? "0.4" : "0.99");
        string yaml = FilmFolder.With("above_reflectance: 0.45", "above_reflectance: sheets.csv");
        _folder.Refuses(yaml, "0.02", "0.99", "600 nm (and up to 830 nm)");
    }

    [Theory]
    [InlineData("angle_deg,radiance\n0,1\n95,1\n", "0 to 90 degrees")]
    [InlineData("angle_deg,radiance\n0,1\n45,-0.5\n", "at least 0")]
    public void Profile_WithWrongRow_NamesItsLine(string text, string words)
    {
        File.WriteAllText(_folder.PathOf("profile.csv"), text);
        var fault = Assert.Single(_folder.Faults(FilmFolder.With("incidence: lambertian", "incidence: profile.csv")));
        Assert.Equal((_folder.PathOf("profile.csv"), 3), (fault.File, fault.Line));
        Assert.Contains(words, fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Profile_WithoutRadiance_IsRefused()
    {
        File.WriteAllText(_folder.PathOf("profile.csv"), "angle_deg,radiance\n0,0\n90,0\n");
        _folder.Refuses(FilmFolder.With("incidence: lambertian", "incidence: profile.csv"), "profile.csv", "0 at every angle");
    }

    [Fact]
    public void View_NormalWithABeamAlongTheNormal_IsRefused() =>
        _folder.Refuses(
            FilmFolder.With("view: hemisphere", "view: normal").Replace("incidence: lambertian", "incidence: normal", StringComparison.Ordinal),
            "normal\n  white_xy", "beam along the normal");

    [Fact]
    public void At_PanelWithoutPanel_IsRefused() =>
        _folder.Refuses(FilmFolder.With("panel:\n  filters: filters.csv\n  area_shares: [0.3, 0.3, 0.3]\n", ""), "panel\n  view", "the file has no panel");

    [Theory]
    [InlineData("lot: green one, loading_mg_per_ml: 6.0", "lot: green one, loading_wt_percent: 2", "2}", "host.density_g_per_ml, lots[green one].density_g_per_ml")]
    [InlineData("thickness_um: 100", "coat_weight_g_per_m2: 112", "112\n", "host.density_g_per_ml, lots[green one].density_g_per_ml")]
    public void Densities_WhereTheyAreNeededAndMissing_AreNamed(string old, string changed, string at, string words)
    {
        string yaml = FilmFolder.With(old, changed)
            .Replace("  density_g_per_ml: 1.12\n", "", StringComparison.Ordinal)
            .Replace("    density_g_per_ml: 2.0\n", "", StringComparison.Ordinal);
        _folder.Refuses(yaml, at, words);
    }

    [Fact]
    public void CoatWeight_ThatIsTooThick_IsRefused() =>
        _folder.Refuses(FilmFolder.With("thickness_um: 100", "coat_weight_g_per_m2: 20000"), "20000", "µm", "10 000 µm");
}
