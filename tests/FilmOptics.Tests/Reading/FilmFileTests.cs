namespace FilmOptics.Tests.Reading;

public sealed class FilmFileTests : IDisposable
{
    private readonly FilmFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Load_WholeFilm_HasEveryFigure()
    {
        File.WriteAllText(_folder.FilmPath, FilmFolder.Whole);
        var read = FilmFile.Load(_folder.FilmPath, []);
        var film = read.Film;
        Assert.Equal("Two lots, one layer", film.Title);
        Assert.Equal(1, film.Backlight.Photons.Integral, 12);
        Assert.InRange(film.Backlight.Photons.Samples.IndexOf(film.Backlight.Photons.Peak) + 360, 446, 448);
        Assert.Equal((IncidenceKind.Lambertian, 2.5), (film.Backlight.Incidence.Kind, film.Backlight.RadiantFluxW));
        Assert.Equal((0.95, 0.45, 0.02, 0.01), (film.Cavity.BelowReflectance[500], film.Cavity.AboveReflectance[500], film.Cavity.AboveAbsorptance[500], film.Cavity.BypassShare));
        Assert.Equal(new Sheet(600, 340), film.Sheet);
        Assert.Equal(new BeerLambertPaths(1.3, 1.4), film.BeerLambertPaths);
        Assert.Equal("barrier, dot layer", string.Join(", ", film.Layers.Select(layer => layer.Name)));
        Assert.Equal([1.6, 1.5], film.Layers.Select(layer => layer.RefractiveIndex));
        var layer = film.Layers[1];
        Assert.Equal((0.1, 0.002, 12.0, 0.8, 1.12), (layer.ThicknessMm, layer.HostAbsorption[700], layer.Scattering[700], layer.Anisotropy[700], layer.HostDensityGPerMl));
        Assert.Equal([("green one", 6.0), ("red one", 1.4)], layer.Dots.Select(dots => (dots.Lot.Name, dots.LoadingMgPerMl)));
        var lot = film.Lots[0];
        Assert.Equal((0.92, 0.95, 1.02, 1.0), (lot.QuantumYieldShare, lot.FilmYieldFactor, lot.FilmExtinctionFactor, lot.FilmEmissionShiftNm));
        Assert.Equal((2.0, 0.1, 0.0, 12.0, 20.0), (lot.DensityGPerMl, lot.CadmiumMassShare, lot.LeadMassShare, lot.PricePerG, lot.StockWtPercent));
        Assert.Equal(3, lot.Absorbance[360], 9);
        Assert.Equal((0.9, 0.3), (read.Panel!.Red[700], read.Panel.GreenAreaShare));
        Assert.Equal("CIE 1964 10°", read.Observer.Name);
        var target = read.Target!;
        Assert.Equal((TargetPlace.Panel, TargetView.Hemisphere, 0.3127, 0.3290, 0.001), (target.Place, target.View, target.WhiteX, target.WhiteY, target.ToleranceXy));
        Assert.Equal([new("green one", 0, 500), new FreeLoading("red one", 0.5, 12)], target.Free);
        Assert.Equal(["BT.2020", "DCI-P3"], target.Gamuts);
    }

    [Fact]
    public void Load_JsonForm_ReadsAsYaml()
    {
        var read = _folder.Load("""
            {
            	"backlight": {"spectrum": "led.csv", "incidence": "profile.csv"},
            	"cavity": {"below_reflectance": 0.9, "above_reflectance": "return.csv", "above_absorptance": 2e-2},
            	"host": {"refractive_index": 1.5},
            	"layers": [{"name": "clear", "thickness_um": 60.0, "dots": []}],
            	"lots": []
            }
            """);
        Assert.Equal("case", read.Film.Title);
        Assert.Equal(0.4, read.Film.Backlight.Incidence.RadianceByAngle!.Values[2]);
        Assert.Equal(0.7, read.Film.Cavity.AboveReflectanceByAngle!.At(1));
        Assert.Equal(0.02, read.Film.Cavity.AboveAbsorptance[400]);
        Assert.Equal("CIE 1931 2°", read.Observer.Name);
        Assert.Null(read.Target);
        Assert.Null(read.Panel);
    }

    [Theory]
    [InlineData("  spectrum: led.csv   # as it reaches the film", "  spectrum: {peak_nm: 447, fwhm_nm: 19}")]
    [InlineData("  spectrum: led.csv   # as it reaches the film", "  peak_nm: 447\n  fwhm_nm: 19")]
    [InlineData("  spectrum: led.csv   # as it reaches the film", "  spectrum: {file: led.csv, column: power_per_nm, outside: zero}")]
    public void Backlight_AsShape_EqualsTheSameLineFromAFile(string old, string changed)
    {
        var fromFile = _folder.Load(FilmFolder.Whole).Film.Backlight.Photons;
        var other = _folder.Load(FilmFolder.With(old, changed)).Film.Backlight.Photons;
        for (int nm = 400; nm < 500; nm++)
            Assert.Equal(fromFile[nm], other[nm], 8);
    }

    [Fact]
    public void Lot_WithFilmShift_EmitsAtTheShiftedLine()
    {
        var lots = _folder.Load(FilmFolder.With("film_emission_shift_nm: 1", "film_emission_shift_nm: 6")).Film.Lots;
        Assert.Equal(536 - 360, lots[0].Emission.Samples.IndexOf(lots[0].Emission.Peak));
        Assert.Equal(630 - 360, lots[1].Emission.Samples.IndexOf(lots[1].Emission.Peak));
    }

    [Fact]
    public void Absorbance_WithAnchor_HasTheKnownValueThere()
    {
        var lot = _folder.Load(FilmFolder.With("absorbance: green-absorbance.csv", "absorbance: {file: green-absorbance.csv, at_nm: 450, value: 3.1}")).Film.Lots[0];
        Assert.Equal(3.1, lot.Absorbance[450], 9);
        Assert.Equal(3.1 * Math.Exp(-0.5), lot.Absorbance[470], 6);
    }

    [Fact]
    public void Warnings_FactorsAtTheirDefaults_NameTheLotOnce()
    {
        string[] uncalibrated = [.. _folder.Load(FilmFolder.Whole).Warnings.Where(warning => warning.Contains("not calibrated", StringComparison.Ordinal))];
        Assert.Contains("'red one'", Assert.Single(uncalibrated), StringComparison.Ordinal);
    }

    [Fact]
    public void Target_WithoutFree_TakesTheTwoLotsOfTheLayers()
    {
        string yaml = FilmFolder.With("  free: [green one, {lot: red one, min_mg_per_ml: 0.5, max_mg_per_ml: 12}]\n", "")
            .Replace("lots:\n", "lots:\n  - {name: spare, absorbance: red-absorbance.csv, emission: red-emission.csv, quantum_yield: 0.5}\n", StringComparison.Ordinal);
        var read = _folder.Load(yaml);
        Assert.Equal("green one, red one", string.Join(", ", read.Target!.Free.Select(free => free.LotName)));
        Assert.Equal(3, read.Film.Lots.Count);
    }

    [Fact]
    public void CoatWeight_BecomesTheThicknessOfThatMass()
    {
        var layer = _folder.Load(FilmFolder.With("    thickness_um: 100", "    coat_weight_g_per_m2: 112")).Film.Layers[1];
        // Volumes add: 6 mg/mL at 2.0 g/mL and 1.4 mg/mL at 2.2 g/mL in a host of 1.12 g/mL.
        double densityGPerMl = 0.0074 + (1.12 * (1 - 0.003 - (0.0014 / 2.2)));
        Assert.Equal(112 / densityGPerMl / 1000, layer.ThicknessMm, 12);
        Assert.Equal(112, Loadings.CoatWeightGPerM2(layer)!.Value, 9);
    }

    [Fact]
    public void Loadings_ByWeightAndByVolumeInOneLayer_BothHold()
    {
        var layer = _folder.Load(FilmFolder.With("lot: green one, loading_mg_per_ml: 6.0", "lot: green one, loading_wt_percent: 5")).Film.Layers[1];
        Assert.Equal(1.4, layer.Dots[1].LoadingMgPerMl);
        Assert.Equal(5, Loadings.WtPercents(layer)[0]!.Value, 12);
    }
}
