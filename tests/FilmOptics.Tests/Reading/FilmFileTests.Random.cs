using System.Globalization;
using System.Text;
using Colorimetry;
using CsCheck;

namespace FilmOptics.Tests.Reading;

/// <summary>Random films written as YAML read back equal; random damage is always a named fault.</summary>
public sealed class FilmFileRandomTests : IDisposable
{
    private readonly FilmFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    private sealed record RandomLayer(double ThicknessUm, double RefractiveIndex, double ScatteringPerMm, double Anisotropy, double GreenMgPerMl, double RedMgPerMl);

    private sealed record RandomFilm(RandomLayer[] Layers, double Below, double Above, double Absorptance, double Bypass, double YieldShare, double FluxW);

    private static readonly Gen<RandomFilm> Films =
        from layers in (from t in Gen.Double[0.1, 9999] from n in Gen.Double[1, 3] from s in Gen.Double[0, 500] from g in Gen.Double[-0.99, 0.99]
                        from green in Gen.Double[0, 900] from red in Gen.Double[0, 900]
                        select new RandomLayer(t, n, s, g, green, red)).Array[1, 6]
        from below in Gen.Double[0, 1] from above in Gen.Double[0, 1] from rest in Gen.Double[0, 1]
        from bypass in Gen.Double[0, 1] from yieldShare in Gen.Double[0, 1] from flux in Gen.Double[1e-6, 1e6]
        select new RandomFilm(layers, below, above, (1 - above) * rest, bypass, yieldShare, flux);

    private static string Text(double value) => value.ToString("R", CultureInfo.InvariantCulture);

    private static string Yaml(RandomFilm film, bool isFlow)
    {
        var text = new StringBuilder();
        text.Append(CultureInfo.InvariantCulture, $"backlight: {{spectrum: led.csv, radiant_flux_w: {film.FluxW:R}}}\nhost: {{refractive_index: 1.5}}\n");
        text.Append(CultureInfo.InvariantCulture, $"cavity: {{below_reflectance: {film.Below:R}, above_reflectance: {film.Above:R}, above_absorptance: {film.Absorptance:R}, bypass_share: {film.Bypass:R}}}\nlayers:\n");
        for (int i = 0; i < film.Layers.Length; i++)
        {
            var layer = film.Layers[i];
            string[] keys = [$"name: layer {i}", $"thickness_um: {Text(layer.ThicknessUm)}", $"refractive_index: {Text(layer.RefractiveIndex)}", $"scattering_per_mm: {Text(layer.ScatteringPerMm)}", $"anisotropy: {Text(layer.Anisotropy)}",
                $"dots: [{{lot: g, loading_mg_per_ml: {Text(layer.GreenMgPerMl)}}}, {{lot: r, loading_mg_per_ml: {Text(layer.RedMgPerMl)}}}]"];
            text.Append(isFlow ? $"  - {{{string.Join(", ", keys)}}}\n" : $"  - {string.Join("\n    ", keys)}\n");
        }

        return text.Append(CultureInfo.InvariantCulture, $"lots:\n- {{name: g, absorbance: green-absorbance.csv, emission: green-emission.csv, quantum_yield: {film.YieldShare:R}}}\n- {{name: r, absorbance: red-absorbance.csv, emission: red-emission.csv, quantum_yield: 0.5}}\n").ToString();
    }

    [Fact]
    public void RandomFilm_WrittenAsYaml_ReadsBackEqual() =>
        Gen.Select(Films, Gen.Bool).Sample((film, isFlow) =>
        {
            var read = _folder.Load(Yaml(film, isFlow)).Film;
            Assert.Equal(
                (film.Below, film.Above, film.Absorptance, film.Bypass, film.YieldShare, film.FluxW),
                (read.Cavity.BelowReflectance[500], read.Cavity.AboveReflectance[500], read.Cavity.AboveAbsorptance[500], read.Cavity.BypassShare, read.Lots[0].QuantumYieldShare, read.Backlight.RadiantFluxW!.Value));
            Assert.Equal(film.Layers, read.Layers.Select(layer => new RandomLayer(
                layer.ThicknessMm * 1000, layer.RefractiveIndex, layer.Scattering[600], layer.Anisotropy[600], layer.Dots[0].LoadingMgPerMl, layer.Dots[1].LoadingMgPerMl)),
                (one, other) => Math.Abs(one.ThicknessUm - other.ThicknessUm) < 1e-9 && one with { ThicknessUm = 0 } == other with { ThicknessUm = 0 });
        }, iter: 60);

    [Fact]
    public void RandomFilm_SavedWithRandomLoadings_ReadsBackEqual() =>
        Gen.Select(Films, Gen.Double[0.1, 10]).Sample((film, factor) =>
        {
            string yaml = Yaml(film, isFlow: film.Layers.Length % 2 == 0);
            var solved = _folder.Load(yaml).Film.WithLoadings((_, dots) => dots.LoadingMgPerMl * factor);
            var back = _folder.Load(FilmFile.WithLoadings(yaml, _folder.FilmPath, [], solved, _folder.FilmPath)).Film;
            foreach (var (one, other) in solved.Layers.SelectMany(layer => layer.Dots).Zip(back.Layers.SelectMany(layer => layer.Dots)))
                Assert.Equal(one.LoadingMgPerMl, other.LoadingMgPerMl, one.LoadingMgPerMl * 1e-7);
        }, iter: 30);

    // Values that no key of the film file takes, and keys that it does not have.
    [Fact]
    public void RandomKey_WithAWrongValue_IsAFaultWithALine()
    {
        string[] lines = FilmFolder.Whole.Split('\n');
        int[] keyLines = [.. Enumerable.Range(0, lines.Length).Where(i => lines[i].Contains(": ", StringComparison.Ordinal))];
        string[] wrong = ["[[1]]", "{zz: 1}", "{a: {b: 1}}", "''", "[", "]", "{", "}", "&x", "*x", "!t 1", "\"", "'", "|", "> ", "@", "%", "`", "? ", "- ", ": :", "[a: 1, b: 2]", "{a: 1, a: 2}", "\u0001", "\uD800", "no: such: thing"];
        Gen.Select(Gen.Int[0, keyLines.Length - 1], Gen.Int[0, wrong.Length - 1]).Sample((at, which) =>
        {
            string line = lines[keyLines[at]];
            int colon = line.IndexOf(": ", StringComparison.Ordinal);
            string[] changed = [.. lines];
            changed[keyLines[at]] = line[..(colon + 2)] + wrong[which];
            Assert.All(_folder.Faults(string.Join('\n', changed)), fault => Assert.True(fault.Line > 0, fault.ToString()));
        }, iter: 200);
    }

    [Fact]
    public void RandomCharacters_PutInOrTakenOut_ReadOrAreAFaultWithALine()
    {
        const string odd = "\t\n\r :,[]{}#&*!|>'\"%@`?-\\~.\u0000\u0007\u0085\u2028\uFEFF\uD83D°é0aA";
        Gen.Select(Gen.Int[0, FilmFolder.Whole.Length - 1], Gen.Int[0, odd.Length - 1], Gen.Int[0, 40]).Sample((at, which, removed) =>
        {
            string yaml = FilmFolder.Whole.Remove(at, Math.Min(removed, FilmFolder.Whole.Length - at)).Insert(at, odd[which].ToString());
            ReadsOrIsRefused(yaml);
        }, iter: 400);
    }

    [Fact]
    public void RandomOverride_ReadsOrIsAFaultWithALine()
    {
        string[] keys = ["title", "backlight", "spectrum", "layers", "[0]", "[dot layer]", "[9]", "dots", "[green one]", "lots", ".", "[", "]", "=", "cavity", "target", "free", "", "x"];
        string[] values = ["1", "-1", "a.csv", "[1, 2]", "{a: 1}", "", "[", "{file: led.csv}", "~", "green one", "\n", "- a"];
        Gen.Select(Gen.Int[0, keys.Length - 1].Array[1, 5], Gen.Bool, Gen.Int[0, values.Length - 1]).Sample((steps, dotted, value) =>
            ReadsOrIsRefused(FilmFolder.Whole, $"{string.Join(dotted ? "." : "", steps.Select(step => keys[step]))}={values[value]}"), iter: 400);
    }

    private void ReadsOrIsRefused(string yaml, params string[] overrides)
    {
        try
        {
            Assert.NotEmpty(_folder.Load(yaml, overrides).Film.Layers);
        }
        catch (InputException exception)
        {
            Assert.NotEmpty(exception.Faults);
            Assert.All(exception.Faults, fault => Assert.True(fault.Line > 0, fault.ToString()));
        }
    }
}
