namespace FilmOptics.Tests.Reading;

/// <summary>One wrong thing at a time in a film that is right otherwise: one fault, at its place, that says what is allowed.</summary>
public sealed class FilmFileFaultTests : IDisposable
{
    private readonly FilmFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Theory]
    // Numbers out of range.
    [InlineData("thickness_um: 100", "thickness_um: -5", "-5", "layers[dot layer].thickness_um is -5", "above 0, to 10 000 µm")]
    [InlineData("thickness_um: 100", "thickness_um: 10001", "10001", "10 000 µm")]
    [InlineData("quantum_yield: 0.92", "quantum_yield: 1.2", "1.2", "lots[green one].quantum_yield is 1.2", "0 to 1")]
    [InlineData("film_yield_factor: 0.95", "film_yield_factor: 1.1", "1.1\n", "0.92", "1.012", "at most 1")]
    [InlineData("film_yield_factor: 0.95", "film_yield_factor: 0", "0\n    film_ext", "above 0")]
    [InlineData("refractive_index: 1.6", "refractive_index: 0.9", "0.9\n", "layers[barrier].refractive_index", "1 to 3")]
    [InlineData("anisotropy: 0.80", "anisotropy: 1", "1\n    dots", "above -1, below 1")]
    [InlineData("scattering_per_mm: 12", "scattering_per_mm: -12", "-12", "at least 0, or a spectrum file")]
    [InlineData("bypass_share: 0.01", "bypass_share: 1.01", "1.01", "cavity.bypass_share", "0 to 1")]
    [InlineData("loading_mg_per_ml: 6.0", "loading_mg_per_ml: -6", "-6", "layers[dot layer].dots[0].loading_mg_per_ml", "at least 0")]
    [InlineData("radiant_flux_w: 2.5", "radiant_flux_w: 0", "0\n\ncavity", "above 0")]
    [InlineData("width_mm: 600", "width_mm: 0", "0, height", "sheet.width_mm", "above 0")]
    [InlineData("pump_path: 1.3", "pump_path: 0.99", "0.99", "at least 1")]
    [InlineData("stock_wt_percent: 20", "stock_wt_percent: 101", "101", "to 100 %")]
    [InlineData("price_per_g: 12", "price_per_g: -1", "-1", "at least 0")]
    [InlineData("density_g_per_ml: 2.0", "density_g_per_ml: 2000", "2000", "25 g/mL")]
    [InlineData("lead_mass_fraction: 0\n", "lead_mass_fraction: 0.95\n", "0.95\n    price", "sum to 1.05")]
    [InlineData("tolerance_xy: 0.001", "tolerance_xy: 0", "0\n  free", "above 0")]
    [InlineData("min_mg_per_ml: 0.5", "min_mg_per_ml: 13", "13", "13", "12", "below")]
    [InlineData("white_xy: [0.3127, 0.3290]", "white_xy: [0.7, 0.4]", "[0.7", "x + y at most 1")]
    [InlineData("area_shares: [0.3, 0.3, 0.3]", "area_shares: [0.4, 0.4, 0.4]", "[0.4", "sum to 1.2", "at most 1")]
    // Wrong types.
    [InlineData("thickness_um: 100", "thickness_um: yes", "yes", "'yes'", "a number is due")]
    [InlineData("thickness_um: 100", "thickness_um: 100 um", "100 um", "without a unit")]
    [InlineData("thickness_um: 100", "thickness_um: \"100\"", "\"100\"", "without quotation marks")]
    [InlineData("thickness_um: 100", "thickness_um: 99,5", "99,5", "with a decimal point")]
    [InlineData("thickness_um: 100", "thickness_um: [100]", "[100]", "a list", "a number is due")]
    [InlineData("thickness_um: 100", "thickness_um: {um: 100}", "{um", "a mapping", "a number is due")]
    [InlineData("thickness_um: 100", "thickness_um:", null, "no value")]
    [InlineData("thickness_um: 100", "thickness_um: .nan", ".nan", "a number is due")]
    [InlineData("thickness_um: 100", "thickness_um: 1e999", "1e999", "a number is due")]
    [InlineData("thickness_um: 100", "thickness_um: 0x64", "0x64", "a number is due")]
    [InlineData("below_reflectance: 0.95", "below_reflectance: high", "high", "'high'", "a number is due", "or a spectrum file")]
    [InlineData("title: Two lots, one layer", "title: [a, b]", "[a", "text is due")]
    [InlineData("title: Two lots, one layer", "title: \"a\\u0007b\"", "\"a", "'a?b'", "one line of text")]
    [InlineData("title: Two lots, one layer", "title: \"\"", "\"\"", "title is empty")]
    [InlineData("sheet: {width_mm: 600, height_mm: 340}", "sheet: 600", "600", "sheet is '600'", "a mapping is due")]
    [InlineData("white_xy: [0.3127, 0.3290]", "white_xy: [0.3127]", "[0.3127]", "a list of 1", "a list of two")]
    [InlineData("area_shares: [0.3, 0.3, 0.3]", "area_shares: 0.3", "0.3\n\ntarget", "list of three")]
    [InlineData("view: hemisphere", "view: sideways", "sideways", "hemisphere, normal")]
    [InlineData("incidence: lambertian", "incidence: lambert", "lambert\n", "lambertian, normal", "nearest: lambertian")]
    [InlineData("gamuts: [BT.2020", "gamuts: [BT.2021", "BT.2021", "nearest: BT.2020", "NTSC 1953")]
    [InlineData("observer: CIE 1964 10°", "observer: CIE 1964", "CIE 1964", "CIE 1931 2°", "nearest: CIE 1964 10°")]
    // Unknown and missing keys.
    [InlineData("thickness_um: 100", "thicknes_um: 100", null, "thicknes_um", "nearest is thickness_um")]
    [InlineData("    anisotropy: 0.80", "    anisotrpoy: 0.80", "anisotrpoy", "nearest is anisotropy")]
    [InlineData("observer: CIE 1964 10°", "obsever: CIE 1964 10°", "obsever", "a film file", "nearest is observer")]
    [InlineData("sheet: {width_mm: 600", "sheet: {width_mm: 600, 5", "5, height", "'5'", "decimal comma")]
    [InlineData("    quantum_yield: 0.92\n", "", null, "lots[green one] has no quantum_yield")]
    [InlineData("  refractive_index: 1.50\n  density", "  density", "density_g_per_ml: 1.12", "host has no refractive_index")]
    [InlineData("  white_xy: [0.3127, 0.3290]\n", "", "at: panel", "target has no white_xy")]
    [InlineData("  filters: filters.csv\n", "", "area_shares", "panel has no filters")]
    // Names.
    [InlineData("{lot: green one,", "{lot: grene one,", "grene one", "'grene one'", "nearest is 'green one'")]
    [InlineData("{lot: red one, loading", "{lot: green one, loading", null, "stands twice in layers[dot layer]")]
    [InlineData("- name: barrier", "- name: dot layer", null, "'dot layer' stands twice in layers")]
    [InlineData("free: [green one, {lot: red one, min_mg_per_ml: 0.5, max_mg_per_ml: 12}]", "free: [green one]", "[green one]", "names 1 lot", "two are due")]
    [InlineData("free: [green one, {lot: red one, min_mg_per_ml: 0.5, max_mg_per_ml: 12}]", "free: [green one, green one]", "green one]", "stands twice")]
    [InlineData("free: [green one, {lot: red one,", "free: [green one, {lot: red two,", "red two", "nearest is 'red one'")]
    // What belongs together.
    [InlineData("thickness_um: 100", "thickness_um: 100\n    coat_weight_g_per_m2: 112", "112\n", "thickness_um and coat_weight_g_per_m2", "give one")]
    [InlineData("loading_mg_per_ml: 6.0", "loading_mg_per_ml: 6.0, loading_wt_percent: 1", "1}   #", "give one")]
    [InlineData("lot: green one, loading_mg_per_ml: 6.0", "lot: green one", "{lot: green one}", "no loading_mg_per_ml and no loading_wt_percent")]
    [InlineData("loading_mg_per_ml: 6.0", "loading_mg_per_ml: 2100", "- {lot", "fill 105", "below 100 %")]
    [InlineData("above_absorptance: 0.02", "above_absorptance: 0.6", "0.6\n", "0.45", "360 nm", "at most 1")]
    [InlineData("  area_shares: [0.3, 0.3, 0.3]", "  area_shares: [0.3, 0.3, 0]", "[0.3, 0.3, 0]", "share of 0")]
    public void Load_OneThingWrong_IsOneFaultAtItsPlace(string old, string changed, string? at, params string[] words)
    {
        string yaml = FilmFolder.With(old, changed);
        if (at is null)
        {
            var fault = Assert.Single(_folder.Faults(yaml), fault => words.All(word => fault.Message.Contains(word, StringComparison.Ordinal)));
            Assert.NotNull(fault.Line);
            return;
        }

        _folder.Refuses(yaml, at, words);
    }
}
