using System.Globalization;
using System.Text;
using Colorimetry;

namespace FilmOptics.Tests.Reading;

/// <summary>A folder with invented spectra and a film file that a test may change.</summary>
public sealed class FilmFolder : IDisposable
{
    /// <summary>A film with every section of the film file in it; invented.</summary>
    public const string Whole = """
        # an invented film
        title: Two lots, one layer

        backlight:
          spectrum: led.csv   # as it reaches the film
          incidence: lambertian
          radiant_flux_w: 2.5

        cavity:
          below_reflectance: 0.95
          above_reflectance: 0.45
          above_absorptance: 0.02
          bypass_share: 0.01

        sheet: {width_mm: 600, height_mm: 340}

        host:
          refractive_index: 1.50
          density_g_per_ml: 1.12

        layers:   # bottom to top
          - name: barrier
            thickness_um: 50
            refractive_index: 1.6
          - name: dot layer
            thickness_um: 100
            absorption_per_mm: 0.002
            scattering_per_mm: 12
            anisotropy: 0.80
            dots:
              - {lot: green one, loading_mg_per_ml: 6.0}   # solved
              - {lot: red one, loading_mg_per_ml: 1.4}

        lots:
          - name: green one
            absorbance: green-absorbance.csv
            emission: green-emission.csv
            quantum_yield: 0.92
            film_yield_factor: 0.95
            film_extinction_factor: 1.02
            film_emission_shift_nm: 1
            density_g_per_ml: 2.0
            cadmium_mass_fraction: 0.1
            lead_mass_fraction: 0
            price_per_g: 12
            stock_wt_percent: 20
          - name: red one
            absorbance: red-absorbance.csv
            emission: red-emission.csv
            quantum_yield: 0.9
            density_g_per_ml: 2.2

        panel:
          filters: filters.csv
          area_shares: [0.3, 0.3, 0.3]

        target:
          at: panel
          view: hemisphere
          white_xy: [0.3127, 0.3290]
          tolerance_xy: 0.001
          free: [green one, {lot: red one, min_mg_per_ml: 0.5, max_mg_per_ml: 12}]
          gamuts: [BT.2020, DCI-P3]

        observer: CIE 1964 10°

        beer_lambert: {pump_path: 1.3, emission_path: 1.4}

        """;

    public FilmFolder()
    {
        Folder = Directory.CreateTempSubdirectory("film").FullName;
        Line("led.csv", "power_per_nm", 447, 19);
        Line("green-emission.csv", "photons_per_nm", 530, 30);
        Line("red-emission.csv", "photons_per_nm", 630, 32);
        Curve("green-absorbance.csv", "wavelength_nm,absorbance_per_cm", nm => Format(3 * Math.Exp(-(nm - 360) / 40.0)));
        Curve("red-absorbance.csv", "wavelength_nm,absorbance_per_cm", nm => Format(4 * Math.Exp(-(nm - 360) / 60.0)));
        Curve("filters.csv", "wavelength_nm,red,green,blue", nm => nm < 500 ? "0.01,0.02,0.8" : nm < 590 ? "0.02,0.85,0.03" : "0.9,0.03,0.01");
        File.WriteAllText(PathOf("profile.csv"), "angle_deg,radiance\n0,1\n30,0.9\n60,0.4\n90,0\n");
        File.WriteAllText(PathOf("return.csv"), "angle_deg,reflectance\n0,0.7\n45,0.5\n90,0.2\n");
    }

    public string Folder { get; }

    public string FilmPath => PathOf("case.film.yaml");

    public string PathOf(string name) => Path.Combine(Folder, name);

    public FilmCase Load(string yaml, params string[] overrides) => FilmFile.Parse(yaml, FilmPath, overrides);

    /// <summary>The whole film with one stretch of its text changed.</summary>
    public static string With(string old, string changed)
    {
        Assert.Contains(old, Whole, StringComparison.Ordinal);
        return Whole.Replace(old, changed, StringComparison.Ordinal);
    }

    public IReadOnlyList<InputFault> Faults(string yaml, params string[] overrides) =>
        Assert.Throws<InputException>(() => Load(yaml, overrides)).Faults;

    /// <summary>Asserts one fault, with these words in it, at the line and column of a stretch of the text.</summary>
    public void Refuses(string yaml, string at, params string[] words)
    {
        var fault = Assert.Single(Faults(yaml));
        int index = yaml.IndexOf(at, StringComparison.Ordinal);
        Assert.True(index >= 0, $"'{at}' is not in the text");
        int line = 1 + yaml[..index].Count(c => c == '\n'), column = index - yaml.LastIndexOf('\n', Math.Max(0, index - 1)) + (index == 0 ? 1 : 0);
        Assert.Equal((FilmPath, line, column), (fault.File, fault.Line, fault.Column));
        foreach (string word in words)
            Assert.Contains(word, fault.Message, StringComparison.Ordinal);
    }

    /// <summary>Writes a spectrum of 1 nm step.</summary>
    public void Curve(string name, string header, Func<int, string> values, int fromNm = 360, int toNm = 830)
    {
        var text = new StringBuilder("# invented\n").Append(header).Append('\n');
        for (int nm = fromNm; nm <= toNm; nm++)
            text.Append(CultureInfo.InvariantCulture, $"{nm},{values(nm)}\n");
        File.WriteAllText(PathOf(name), text.ToString());
    }

    public void Dispose() => Directory.Delete(Folder, recursive: true);

    private void Line(string name, string column, double peakNm, double fwhmNm) => Curve(
        name, $"wavelength_nm,{column}", nm => Format(Math.Exp(-4 * Math.Log(2) * (nm - peakNm) * (nm - peakNm) / (fwhmNm * fwhmNm))));

    private static string Format(double value) => value.ToString("G10", CultureInfo.InvariantCulture);
}
