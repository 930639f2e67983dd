using System.Globalization;
using FilmOptics;

namespace Dotcoat.Desk;

/// <summary>A number that the page can change.</summary>
/// <param name="Key">As --set takes it.</param>
/// <param name="Label">Its name on the page.</param>
/// <param name="Unit">Its unit; empty for a share.</param>
/// <param name="Text">As the file writes it, or the default it stands for.</param>
/// <param name="Low">Where the slider begins. Fields take more.</param>
/// <param name="High">Where the slider ends.</param>
/// <param name="Step">Step of the slider.</param>
/// <param name="Allowed">What the film file allows.</param>
internal sealed record FilmField(string Key, string Label, string Unit, string Text, double Low, double High, double Step, string Allowed);

/// <summary>Fields that belong together.</summary>
/// <param name="Name">Heading.</param>
/// <param name="Folded">Whether the group starts folded away.</param>
/// <param name="Fields">The fields.</param>
/// <param name="Lot">The lot that takes dropped spectra, or null.</param>
internal sealed record FieldGroup(string Name, bool Folded, IReadOnlyList<FilmField> Fields, string? Lot = null);

/// <summary>What the page of one film can change, in the order in which light travels.</summary>
internal sealed class FilmControls
{
    private readonly Dictionary<string, WrittenValue> _written;
    private static readonly string[] Primaries = ["red", "green", "blue"];

    private readonly FilmCase _filmCase;
    private readonly Dictionary<string, FilmField> _fields;
    private readonly HashSet<string> _spectra;

    private FilmControls(IReadOnlyList<WrittenValue> written, FilmCase filmCase)
    {
        _written = written.ToDictionary(value => value.Key, StringComparer.Ordinal);
        _filmCase = filmCase;
        Groups = [.. AllGroups().Where(group => group.Fields.Count > 0 || group.Lot is not null)];
        _fields = Groups.SelectMany(group => group.Fields).ToDictionary(field => field.Key, StringComparer.Ordinal);
        _spectra = [.. Groups.Where(group => group.Lot is not null).SelectMany(group => (string[])[AbsorbanceKey(group.Lot!), EmissionKey(group.Lot!)])];
    }

    public IReadOnlyList<FieldGroup> Groups { get; }

    /// <summary>The controls of a film.</summary>
    /// <param name="text">The film file's text.</param>
    /// <param name="path">The film file.</param>
    /// <param name="filmCase">The film as the file has it.</param>
    public static FilmControls Of(string text, string path, FilmCase filmCase) => new(FilmFile.Values(text, path), filmCase);

    public static string AbsorbanceKey(string lot) => $"lots[{lot}].absorbance";

    public static string EmissionKey(string lot) => $"lots[{lot}].emission";

    public bool HasField(string key) => _fields.ContainsKey(key);

    public bool TakesSpectrum(string key) => _spectra.Contains(key);

    public FilmField? Field(string key) => _fields.GetValueOrDefault(key);

    /// <summary>The field whose value stands at a place of the film file.</summary>
    public string? FieldAt(int? line, int? column) =>
        _written.Values.FirstOrDefault(value => value.Line == line && value.Column == column) is { } found && HasField(found.Key) ? found.Key : null;

    /// <summary>What a solved film's loadings are in the fields of this page; a coat weight keeps the thickness.</summary>
    public IReadOnlyDictionary<string, string> LoadingsOf(Film solved)
    {
        var values = new Dictionary<string, string>(StringComparer.Ordinal);
        foreach (var layer in solved.Layers)
        {
            var wtPercents = Loadings.WtPercents(layer);
            for (int i = 0; i < layer.Dots.Count; i++)
            {
                string entry = EntryKey(layer, layer.Dots[i]);
                Set($"{entry}.loading_mg_per_ml", layer.Dots[i].LoadingMgPerMl);
                Set($"{entry}.loading_wt_percent", wtPercents[i]);
            }

            Set($"{LayerKey(layer)}.coat_weight_g_per_m2", Loadings.CoatWeightGPerM2(layer));
        }

        return values;

        // As many digits as a balance could follow.
        void Set(string key, double? value)
        {
            if (HasField(key) && value is { } number)
                values[key] = number.ToString("G6", CultureInfo.InvariantCulture);
        }
    }

    /// <summary>What follows from a field and is worth seeing beside it.</summary>
    public IReadOnlyDictionary<string, string> Readings(FilmCase filmCase)
    {
        var readings = new Dictionary<string, string>(StringComparer.Ordinal);
        var light = filmCase.Film.Backlight.Photons;
        Set("backlight.spectrum.shift_nm", $"peak at {Colorimetry.WavelengthGrid.NmAt(light.Samples.IndexOf(light.Peak))} nm");
        foreach (var lot in filmCase.Film.Lots)
            Set($"{LotKey(lot)}.film_yield_factor", string.Create(CultureInfo.InvariantCulture, $"yield in film {lot.FilmYieldShare:0.000}"));
        foreach (var layer in filmCase.Film.Layers)
        {
            if (Loadings.CoatWeightGPerM2(layer) is { } weight)
                Set($"{LayerKey(layer)}.thickness_um", string.Create(CultureInfo.InvariantCulture, $"{weight:0.0} g/m²"));
            Set($"{LayerKey(layer)}.coat_weight_g_per_m2", string.Create(CultureInfo.InvariantCulture, $"{layer.ThicknessMm * 1000:0.0} µm"));
        }

        return readings;

        void Set(string key, string reading)
        {
            if (HasField(key))
                readings[key] = reading;
        }
    }

    private IEnumerable<FieldGroup> AllGroups()
    {
        yield return new("Backlight", false, [.. Backlight()]);
        foreach (var layer in _filmCase.Film.Layers)
            yield return new(_filmCase.Film.Layers.Count == 1 ? "Film" : $"Film: {layer.Name}", false, [.. LayerFields(layer)]);
        foreach (var lot in _filmCase.Film.Lots.Where(lot => _filmCase.Film.Layers.Any(layer => layer.Dots.Any(dots => dots.Lot.Name == lot.Name))))
            yield return new($"Lot {lot.Name}", true, [.. LotFields(lot)], lot.Name.Contains(']', StringComparison.Ordinal) ? null : lot.Name);
        yield return new("Cavity", false, [.. CavityFields()]);
        yield return new("Panel", true, [.. PanelFields()]);
        yield return new("Target", false, [.. TargetFields()]);
    }

    private IEnumerable<FilmField> Backlight()
    {
        string shape = _written.ContainsKey("backlight.peak_nm") ? "backlight" : "backlight.spectrum";
        if (_written.ContainsKey($"{shape}.peak_nm"))
        {
            double peakNm = Value($"{shape}.peak_nm", 0);
            yield return Field($"{shape}.peak_nm", "LED peak", "nm", peakNm, Math.Min(430, peakNm), Math.Max(480, peakNm), 0.5, "360 to 830 nm");
            yield return Field($"{shape}.fwhm_nm", "LED width (FWHM)", "nm", 20, 8, 40, 0.5, "above 0");
        }
        else
        {
            yield return Field("backlight.spectrum.shift_nm", "LED peak shift", "nm", 0, -15, 15, 0.5, "−200 to 200 nm");
        }

        if (_written.ContainsKey("backlight.radiant_flux_w"))
            yield return Scaled("backlight.radiant_flux_w", "Optical power", "W", 1, "above 0");
    }

    private IEnumerable<FilmField> LayerFields(Layer layer)
    {
        string at = LayerKey(layer);
        foreach (var dots in layer.Dots)
        {
            string entry = EntryKey(layer, dots);
            bool byWeight = _written.ContainsKey($"{entry}.loading_wt_percent");
            yield return byWeight
                ? Scaled($"{entry}.loading_wt_percent", $"Loading {dots.Lot.Name}", "wt%", 1, "at least 0, below 100 %")
                : Scaled($"{entry}.loading_mg_per_ml", $"Loading {dots.Lot.Name}", "mg/mL", 5, "at least 0");
        }

        if (_written.ContainsKey($"{at}.coat_weight_g_per_m2"))
            yield return Scaled($"{at}.coat_weight_g_per_m2", "Coat weight", "g/m²", 100, "above 0");
        else
            yield return Scaled($"{at}.thickness_um", "Thickness", "µm", 100, "above 0, to 10 000 µm");
        foreach (string percent in (string[])["volume_percent", "weight_percent"])
        {
            if (_written.ContainsKey($"{at}.particles.{percent}"))
                yield return Scaled($"{at}.particles.{percent}", "Particles", percent[0] == 'v' ? "vol%" : "wt%", 1, "at least 0, below 100 %");
        }

        if (!_written.Keys.Any(key => key.StartsWith($"{at}.particles.", StringComparison.Ordinal)))
        {
            if (IsNumberOrAbsent($"{at}.scattering_per_mm"))
                yield return Scaled($"{at}.scattering_per_mm", "Scattering", "1/mm", 20, "at least 0");
            if (IsNumberOrAbsent($"{at}.anisotropy"))
                yield return Field($"{at}.anisotropy", "Anisotropy g", "", 0, -0.95, 0.95, 0.01, "above −1, below 1");
        }

        if (IsNumberOrAbsent($"{at}.absorption_per_mm"))
            yield return Scaled($"{at}.absorption_per_mm", "Host absorption", "1/mm", 0.01, "at least 0");
    }

    private IEnumerable<FilmField> LotFields(DotLot lot)
    {
        string at = LotKey(lot);
        yield return Field($"{at}.quantum_yield", "Quantum yield, dilute", "", 0, 0.5, 1, 0.005, "0 to 1");
        yield return Field($"{at}.film_yield_factor", "Yield factor, film ÷ dilute", "", 1, 0.5, 1.1, 0.005, "above 0, yield × factor at most 1");
        yield return Field($"{at}.film_extinction_factor", "Extinction factor, film ÷ dilute", "", 1, 0.5, 1.5, 0.01, "above 0");
        yield return Field($"{at}.film_emission_shift_nm", "Emission shift, film − dilute", "nm", 0, -15, 15, 0.5, "−200 to 200 nm");
    }

    private IEnumerable<FilmField> CavityFields()
    {
        foreach (var (key, label) in ((string, string)[])[("below_reflectance", "Reflectance below"), ("above_reflectance", "Reflectance above"), ("above_absorptance", "Absorptance above")])
        {
            if (IsNumberOrAbsent($"cavity.{key}"))
                yield return Field($"cavity.{key}", label, "", 0, 0, key == "above_absorptance" ? 0.2 : 1, 0.005, key == "below_reflectance" ? "0 to 1" : "0 to 1, above in all at most 1");
        }

        yield return Field("cavity.bypass_share", "Bypass share", "", 0, 0, 0.2, 0.002, "0 to 1");
    }

    private IEnumerable<FilmField> PanelFields()
    {
        for (int i = 0; i < 3 && _written.ContainsKey("panel.area_shares[2]"); i++)
            yield return Field($"panel.area_shares[{i}]", $"Area of {Primaries[i]}", "", 0, 0, 0.5, 0.005, "0 to 1, in all at most 1");
    }

    private IEnumerable<FilmField> TargetFields()
    {
        if (_filmCase.Target is null)
            yield break;
        yield return Field("target.white_xy[0]", "White x", "", 0, 0.25, 0.4, 0.0005, "0 to 1");
        yield return Field("target.white_xy[1]", "White y", "", 0, 0.25, 0.4, 0.0005, "above 0, x + y at most 1");
        yield return Field("target.tolerance_xy", "Tolerance in xy", "", 0.0005, 0.0001, 0.01, 0.0001, "above 0");
    }

    private string LayerKey(Layer layer) => $"layers[{Item(layer.Name, _filmCase.Film.Layers.Select(other => other.Name))}]";

    private string EntryKey(Layer layer, DotLoading dots) => $"{LayerKey(layer)}.dots[{Item(dots.Lot.Name, layer.Dots.Select(other => other.Lot.Name))}]";

    private string LotKey(DotLot lot) => $"lots[{Item(lot.Name, _filmCase.Film.Lots.Select(other => other.Name))}]";

    // By name as messages name it, unless a bracket in the name would end the step early.
    private static string Item(string name, IEnumerable<string> all) =>
        name.Contains(']', StringComparison.Ordinal) ? all.ToList().IndexOf(name).ToString(CultureInfo.InvariantCulture) : name;

    private bool IsNumberOrAbsent(string key) =>
        _written.TryGetValue(key, out var value)
            ? double.TryParse(value.Text, NumberStyles.Float, CultureInfo.InvariantCulture, out _)
            : !_written.Keys.Any(other => other.StartsWith($"{key}.", StringComparison.Ordinal));

    private double Value(string key, double absent) =>
        _written.TryGetValue(key, out var value) && double.TryParse(value.Text, NumberStyles.Float, CultureInfo.InvariantCulture, out double number) ? number : absent;

    private FilmField Field(string key, string label, string unit, double absent, double low, double high, double step, string allowed)
    {
        double value = Value(key, absent);
        string text = _written.TryGetValue(key, out var written) ? written.Text : absent.ToString(CultureInfo.InvariantCulture);
        return new(key, label, unit, text, Math.Min(low, value), Math.Max(high, value), step, allowed);
    }

    // From 0 to about two and a half times the value, on a round scale that does not move with later changes.
    private FilmField Scaled(string key, string label, string unit, double usual, string allowed)
    {
        double value = Value(key, 0), wished = 2.5 * (value > 0 ? value : usual), power = Math.Pow(10, Math.Floor(Math.Log10(wished)));
        double high = Math.Ceiling(wished / power) * power;
        bool isOpen = allowed.StartsWith("above", StringComparison.Ordinal);
        double step = power / (high / power <= 3 ? 100 : 50);
        return Field(key, label, unit, 0, isOpen ? step : 0, high, step, allowed);
    }
}
