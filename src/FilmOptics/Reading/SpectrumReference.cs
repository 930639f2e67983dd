using Colorimetry;

namespace FilmOptics.Reading;

/// <summary>A key's spectrum as the film file names it: the file, and how to read it.</summary>
/// <param name="Key">The key in full, for messages.</param>
/// <param name="File">The scalar that holds the file's name.</param>
/// <param name="Options">How to bring it onto the grid.</param>
/// <param name="Column">The column asked for, or null.</param>
internal sealed record SpectrumReference(string Key, ScalarNode File, ImportOptions Options, string? Column)
{
    private static readonly NumberRule AnchorNm = new(100, 5000, "100 to 5000 nm");

    /// <summary>Reads a file name, or a mapping with file and options; null with a fault.</summary>
    /// <param name="value">What stands at the key.</param>
    /// <param name="key">The key in full.</param>
    /// <param name="kind">What the spectrum is; decides which options make sense.</param>
    /// <param name="faults">Takes what is wrong.</param>
    public static SpectrumReference? Read(Node value, string key, SpectrumKind kind, FaultList faults)
    {
        if (value is ScalarNode name)
            return IsFileName(name, key, kind, faults) ? new(key, name, new(), null) : null;
        if (value is not MappingNode mapping)
        {
            faults.Add(value.Place, $"{key} is {value.Described}; {kind.Due} is due.");
            return null;
        }

        int faultsBefore = faults.Count;
        var section = new Section(mapping, key, faults);
        var file = section.Required("file") as ScalarNode;
        if (file is not null)
            IsFileName(file, section.PathOf("file"), kind, faults);
        else if (section.Has("file"))
            section.Fault("file", $"{section.PathOf("file")} is {section.Find("file")!.Described}; a file name is due.");
        string? column = kind.Columns.Length > 1 && kind.IsLight || kind.Columns.Length == 1 ? section.Word("column", kind.Columns) : null;
        string? outside = kind.IsLight ? section.Word("outside", "zero") : section.Word("outside", "zero", "hold");
        double shiftNm = section.Number("shift_nm", NumberRule.ShiftNm, 0);
        double factor = section.Number("scale", NumberRule.AboveZero, 1);
        var anchor = Anchor(section);
        section.Close();
        return faults.Count > faultsBefore ? null : new(key, file!, new()
        {
            Outside = outside switch { "zero" => OutsideRule.Zero, "hold" => OutsideRule.Hold, _ => OutsideRule.Refuse },
            ShiftNm = shiftNm,
            ScaleFactor = factor,
            Anchor = anchor,
        }, column);
    }

    /// <summary>The reference with a further shift, as dots in a film have.</summary>
    public SpectrumReference ShiftedBy(double shiftNm) => this with { Options = Options with { ShiftNm = Options.ShiftNm + shiftNm } };

    private static (double AtNm, double Value)? Anchor(Section section)
    {
        double? atNm = section.OptionalNumber("at_nm", AnchorNm), value = section.OptionalNumber("value", NumberRule.AboveZero);
        if ((atNm is null) != (value is null))
        {
            string missing = atNm is null ? "at_nm" : "value", given = atNm is null ? "value" : "at_nm";
            section.Fault(given, $"{section.PathOf(given)} needs {missing} beside it: the value at one wavelength.");
        }

        if (atNm is not null && section.Has("scale"))
            section.Fault("scale", $"{section.PathOf("scale")} and at_nm with value both set the scale; give one of them.");
        return atNm is { } nm && value is { } known ? (nm, known) : null;
    }

    private static bool IsFileName(ScalarNode name, string key, SpectrumKind kind, FaultList faults)
    {
        bool isName = !name.IsNull && !string.IsNullOrWhiteSpace(name.Text) && !Section.TryNumber(name, out _) && !name.Text.Contains('\0', StringComparison.Ordinal);
        if (!isName)
            faults.Add(name.Place, $"{key} is {name.Described}; {kind.Due} is due.");
        return isName;
    }
}

/// <summary>What a spectrum in the film file is.</summary>
/// <param name="Due">What may stand at its key, for messages.</param>
/// <param name="IsLight">Light or emission: only the shape counts, and it ends by itself.</param>
/// <param name="Columns">Names that its column may have.</param>
internal sealed record SpectrumKind(string Due, bool IsLight, params string[] Columns)
{
    public static readonly SpectrumKind Light = new("a spectrum file, or a mapping with file or with peak_nm and fwhm_nm,", true, "power_per_nm", "photons_per_nm");
    public static readonly SpectrumKind Emission = new("a spectrum file, or a mapping with file,", true, "power_per_nm", "photons_per_nm");
    public static readonly SpectrumKind Absorbance = new("a spectrum file, or a mapping with file,", false, "absorbance_per_cm");
    public static readonly SpectrumKind Absorption = new("a number or a spectrum file", false, "absorption_per_mm");
    public static readonly SpectrumKind Scattering = new("a number or a spectrum file", false, "scattering_per_mm");
    public static readonly SpectrumKind ParticleIndex = new("a number or a spectrum file", false, "refractive_index");
    public static readonly SpectrumKind Reflectance = new("a number or a spectrum file", false, "reflectance");
    public static readonly SpectrumKind Absorptance = new("a number or a spectrum file", false, "absorptance");
    public static readonly SpectrumKind Filters = new("a file with the columns wavelength_nm, red, green, blue", false, "red", "green", "blue");
    public static readonly SpectrumKind ByAngle = new("lambertian, normal or a file with the columns angle_deg, radiance", false, "radiance");
    public static readonly SpectrumKind Observer = new("the name of an observer or a file with the columns wavelength_nm, x_bar, y_bar, z_bar", false, "x_bar", "y_bar", "z_bar");
}
