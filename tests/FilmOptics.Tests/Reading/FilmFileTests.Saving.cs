using Colorimetry;

namespace FilmOptics.Tests.Reading;

/// <summary>Solved loadings go into the text of the film file; the rest of the text stays.</summary>
public sealed class FilmFileSavingTests : IDisposable
{
    private readonly FilmFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    private static Film Scaled(Film film, double factor) => film.WithLoadings((_, dots) => dots.LoadingMgPerMl * factor);

    private string Saved(string yaml, string[] overrides, double factor, string? newPath = null) =>
        FilmFile.WithLoadings(yaml, _folder.FilmPath, overrides, Scaled(_folder.Load(yaml, overrides).Film, factor), newPath ?? _folder.PathOf("new.film.yaml"));

    [Fact]
    public void WithLoadings_ChangesTheLoadingsAndNothingElse() =>
        Assert.Equal(
            FilmFolder.With("6.0}", "9}").Replace("ml: 1.4}", "ml: 2.1}", StringComparison.Ordinal),
            Saved(FilmFolder.Whole, [], 1.5));

    [Fact]
    public void WithLoadings_UnchangedFilm_KeepsEveryCharacter() => Assert.Equal(FilmFolder.Whole, Saved(FilmFolder.Whole, [], 1));

    [Fact]
    public void WithLoadings_GivenByWeight_StaysByWeightAndReadsBackAsSolved()
    {
        string yaml = FilmFolder.With("lot: green one, loading_mg_per_ml: 6.0", "lot: green one, loading_wt_percent: 0.5")
            .Replace("thickness_um: 100", "coat_weight_g_per_m2: 112", StringComparison.Ordinal);
        var solved = Scaled(_folder.Load(yaml).Film, 3);
        string saved = FilmFile.WithLoadings(yaml, _folder.FilmPath, [], solved, _folder.PathOf("new.film.yaml"));
        Assert.Contains("loading_wt_percent: 1.", saved, StringComparison.Ordinal);
        Assert.DoesNotContain("coat_weight_g_per_m2: 112\n", saved, StringComparison.Ordinal);
        var back = _folder.Load(saved).Film.Layers[1];
        Assert.Equal(solved.Layers[1].ThicknessMm, back.ThicknessMm, 8);
        for (int i = 0; i < 2; i++)
            Assert.Equal(solved.Layers[1].Dots[i].LoadingMgPerMl, back.Dots[i].LoadingMgPerMl, 6);
    }

    [Fact]
    public void WithLoadings_Overrides_StandInTheText()
    {
        string saved = Saved(FilmFolder.Whole,
            ["layers[0].thickness_um=80", "lots[red one].film_yield_factor=0.97", "backlight.spectrum.shift_nm=2", "sheet.height_mm=300", "title='new: one'", "cavity={above_reflectance: 0.5}"], 1);
        Assert.Contains("    thickness_um: 80\n", saved, StringComparison.Ordinal);
        Assert.Contains("    density_g_per_ml: 2.2\n    film_yield_factor: 0.97\n\npanel:", saved, StringComparison.Ordinal);
        Assert.Contains("  spectrum: {file: led.csv, shift_nm: 2}   # as it reaches the film\n", saved, StringComparison.Ordinal);
        Assert.Contains("sheet: {width_mm: 600, height_mm: 300}\n", saved, StringComparison.Ordinal);
        Assert.Contains("title: \"new: one\"\n", saved, StringComparison.Ordinal);
        Assert.Contains("cavity: {above_reflectance: 0.5}\n\nsheet", saved, StringComparison.Ordinal);
        Assert.Contains("# an invented film\n", saved, StringComparison.Ordinal);
    }

    [Fact]
    public void WithLoadings_IntoAnotherFolder_FindsTheSameSpectra()
    {
        Directory.CreateDirectory(_folder.PathOf("trials/third"));
        string path = _folder.PathOf("trials/third/new.film.yaml");
        string saved = Saved(FilmFolder.Whole, ["lots[green one].absorbance.scale=2"], 2, path);
        Assert.Contains("spectrum: ../../led.csv   # as", saved, StringComparison.Ordinal);
        Assert.Contains("absorbance: {file: ../../green-absorbance.csv, scale: 2}", saved, StringComparison.Ordinal);
        Assert.Contains("observer: CIE 1964 10°", saved, StringComparison.Ordinal);
        var back = FilmFile.Parse(saved, path, []).Film;
        Assert.Equal(12, back.Layers[1].Dots[0].LoadingMgPerMl);
        Assert.Equal(6, back.Lots[0].Absorbance[360], 9);
    }

    [Fact]
    public void WithLoadings_Json_StaysJson()
    {
        const string json = """
            {"backlight": {"spectrum": "led.csv"}, "host": {"refractive_index": 1.5},
             "layers": [{"name": "a", "thickness_um": 100, "dots": [{"lot": "g", "loading_mg_per_ml": 6.0}]}],
             "lots": [{"name": "g", "absorbance": "green-absorbance.csv", "emission": "green-emission.csv", "quantum_yield": 0.9}]}
            """;
        string saved = Saved(json, ["backlight.spectrum.shift_nm=1", "title=trial", "lots[g].film_yield_factor=0.9"], 2, _folder.PathOf("x/new.film.yaml"));
        using var document = System.Text.Json.JsonDocument.Parse(saved);
        Assert.Equal("../led.csv", document.RootElement.GetProperty("backlight").GetProperty("spectrum").GetProperty("file").GetString());
        Assert.Equal("trial", document.RootElement.GetProperty("title").GetString());
        Assert.Equal(12, document.RootElement.GetProperty("layers")[0].GetProperty("dots")[0].GetProperty("loading_mg_per_ml").GetDouble());
    }

    [Fact]
    public void WithLoadings_OverridesInALayoutThatCannotTakeThem_IsRefused()
    {
        // A pair without braces in a list: a key after it would become an item of its own.
        string yaml = FilmFolder.Whole + "extra: [a: 1]\n";
        var fault = Assert.Single(Assert.Throws<InputException>(() => FilmFile.WithLoadings(
            yaml, _folder.FilmPath, ["extra[0].b=2"], _folder.Load(FilmFolder.Whole).Film, _folder.FilmPath)).Faults);
        Assert.Contains("write them in by hand", fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void WithLoadings_TextOfAnotherFilm_IsRefused()
    {
        var film = _folder.Load(FilmFolder.Whole).Film;
        string other = FilmFolder.With("- name: barrier", "- name: base");
        var fault = Assert.Single(Assert.Throws<InputException>(() => FilmFile.WithLoadings(other, _folder.FilmPath, [], film, _folder.FilmPath)).Faults);
        Assert.Contains("not those of the solved film", fault.Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("a:\n- x: 1 # c\n  y:\n- z: [1]\n", "a[0].y=5", "a:\n- x: 1 # c\n  y: 5\n- z: [1]\n")]
    [InlineData("a:\n- x: 1 # c\n- z: [1]\n", "a[0].y.w=5", "a:\n- x: 1 # c\n  y: {w: 5}\n- z: [1]\n")]
    [InlineData("a:\n- x: 1\n  b: |\n    text\n- z: 1\n", "a[0].y=5", "a:\n- x: 1\n  b: |\n    text\n  y: 5\n- z: 1\n")]
    [InlineData("a: |\n  text\nb: 1\n", "a=5", "a: 5\nb: 1\n")]
    [InlineData("a: {}\n", "a.b=5", "a: {b: 5}\n")]
    [InlineData("a: {c: 1,\n    d: 2  # last\n   }\n", "a.b=5", "a: {c: 1,\n    d: 2, b: 5  # last\n   }\n")]
    [InlineData("a: 1", "b=5", "a: 1\nb: 5\n")]
    [InlineData("a: 1\r\nb:\r\n  c: 2\r\n\r\nd: 3\r\n", "b.e=5", "a: 1\r\nb:\r\n  c: 2\r\n  e: 5\r\n\r\nd: 3\r\n")]
    [InlineData("a:\n  - 1\n  - 2\nb: 3\n", "a=[4]", "a: [4]\nb: 3\n")]
    [InlineData("a:\n- 1\n- 2\nb: 3\n", "a[1]=4", "a:\n- 1\n- 4\nb: 3\n")]
    [InlineData("a:   # later\nb: 3\n", "a.c=4", "a: {c: 4}   # later\nb: 3\n")]
    [InlineData("a: ~\n", "a=[1, 'two words', \"3\"]", "a: [1, \"two words\", \"3\"]\n")]
    public void Override_IntoText_KeepsTheLayout(string text, string option, string due) =>
        Assert.Equal(due, EditedText.With(text, option));
}
