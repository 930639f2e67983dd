using Colorimetry;

namespace FilmOptics.Reading;

/// <summary>Brings the spectra that a film file names onto the grid. Each file is read once for a shelf.</summary>
internal sealed class SpectrumLoader(string folder, SpectrumShelf shelf, FaultList faults, List<string> warnings)
{
    // Where light is below this share of its peak, nothing has to be known about what it meets.
    private const double LightShare = 1e-3;

    private const string Cie1931 = "CIE 1931 2°", Cie1964 = "CIE 1964 10°";

    private (double FirstNm, double LastNm)? _lightNm;

    /// <summary>Every scalar that named a file.</summary>
    public List<ScalarNode> FileNames { get; } = [];

    /// <summary>Says where there is light, which absorbance, transmittance and reflectance have to cover.</summary>
    /// <param name="lights">Source and emissions; null for those with a fault.</param>
    public void SetLight(IEnumerable<Spectrum<PhotonPerNm>?> lights)
    {
        var ranges = lights.OfType<Spectrum<PhotonPerNm>>().Select(RangeNm).ToList();
        _lightNm = ranges.Count == 0 ? null : (ranges.Min(range => range.FirstNm), ranges.Max(range => range.LastNm));
    }

    /// <summary>Light or emission, normalised to one photon; null with a fault.</summary>
    public Spectrum<PhotonPerNm>? Light(Node value, string key, SpectrumKind kind, double shiftNm)
    {
        if (SpectrumReference.Read(value, key, kind, faults) is not { } reference || Table(reference) is not { } table)
            return null;
        reference = reference.ShiftedBy(shiftNm);
        if (Column(reference, table, kind) is not { } column)
            return null;
        var photons = column == "power_per_nm"
            ? Import<WattPerNm>(reference, table, column)?.ToPhotons()
            : Import<PhotonPerNm>(reference, table, column);
        if (photons is null || photons.Integral > 0)
            return photons?.NormalisedToUnitSum();
        faults.Add(reference.File.Place,
            $"{key}: {Shown.Quoted(reference.File.Text)} does not integrate: it is 0 at every wavelength; a light is above 0 somewhere.");
        return null;
    }

    /// <summary>A spectrum that has to cover the light; null with a fault.</summary>
    public Spectrum<TUnit>? Spectrum<TUnit>(Node value, string key, SpectrumKind kind)
        where TUnit : struct, ISpectralUnit =>
        SpectrumReference.Read(value, key, kind, faults) is { } reference && Table(reference) is { } table && Column(reference, table, kind) is { } column
            ? Import<TUnit>(reference, table, column)
            : null;

    /// <summary>A number for all wavelengths or a spectrum file; 0 where the key is absent; null with a fault.</summary>
    public Spectrum<TUnit>? NumberOrSpectrum<TUnit>(Section section, string key, NumberRule rule, SpectrumKind kind)
        where TUnit : struct, ISpectralUnit
    {
        var value = section.Find(key);
        if (value is null)
            return Colorimetry.Spectrum.Flat<TUnit>(0, "film file");
        if (value is not MappingNode && !IsFileName(value))
        {
            double number = section.NumberOf(value, key, rule with { Words = $"{rule.Words}, or a spectrum file" });
            return double.IsNaN(number) ? null : Colorimetry.Spectrum.Flat<TUnit>(number, "film file");
        }

        return Spectrum<TUnit>(value, section.PathOf(key), kind);
    }

    /// <summary>Something worth saying that is no fault.</summary>
    public void Warn(string warning) => warnings.Add(warning);

    /// <summary>True where a file is named and its first column holds angles.</summary>
    public bool IsByAngle(Node? value, string key)
    {
        var name = value is MappingNode mapping ? mapping.Find("file")?.Value : value;
        return name is ScalarNode scalar && IsFileName(scalar) && shelf.Has(PathOf(scalar)) && Table(scalar, key)?.FirstColumn == "angle_deg";
    }

    /// <summary>A table over the polar angle; null with a fault.</summary>
    public AngleTable? ByAngle(Node value, string key, SpectrumKind kind, string column)
    {
        if (FileOnly(value, key, kind) is not { } reference || Table(reference) is not { } table)
            return null;
        if (table.FirstColumn != "angle_deg" || !Has(table, column))
            return Refused<AngleTable>(reference, table, $"angle_deg, {column}");
        int faultsBefore = faults.Count;
        var rule = column == "reflectance" ? NumberRule.Share : NumberRule.AtLeastZero;
        var angles = table.AnglesDeg;
        var values = table.Values(column);
        for (int i = 0; i < angles.Length; i++)
        {
            if (!rule.Allows(values[i]))
                faults.Add(table.FaultAt(i, column, $"{column} is {Shown.Number(values[i])} at {Shown.Number(angles[i])} degrees; {rule.Words} is allowed."));
        }

        return faults.Count > faultsBefore ? null : new(angles, values, table.Name);
    }

    /// <summary>The three filters of a panel; null with a fault.</summary>
    public (Spectrum<Fraction> Red, Spectrum<Fraction> Green, Spectrum<Fraction> Blue)? Filters(Node value, string key)
    {
        if (SpectrumReference.Read(value, key, SpectrumKind.Filters, faults) is not { } reference || Table(reference) is not { } table)
            return null;
        if (table.FirstColumn != "wavelength_nm" || !SpectrumKind.Filters.Columns.All(column => Has(table, column)))
        {
            Refused<Panel>(reference, table, "wavelength_nm, red, green, blue");
            return null;
        }

        var red = Import<Fraction>(reference, table, "red");
        var green = Import<Fraction>(reference, table, "green");
        var blue = Import<Fraction>(reference, table, "blue");
        return red is null || green is null || blue is null ? null : (red, green, blue);
    }

    /// <summary>An observer by name or from a file; null with a fault.</summary>
    public StandardObserver? Observer(Node value, string key)
    {
        switch (value)
        {
            case ScalarNode { Text: Cie1931 }:
                return StandardObserver.Cie1931;
            case ScalarNode { Text: Cie1964 }:
                return StandardObserver.Cie1964;
            case ScalarNode { IsNull: false } name when !name.Text.Contains('.', StringComparison.Ordinal):
                string nearest = Shown.Nearest(name.Text, [Cie1931, Cie1964])!;
                faults.Add(value.Place, $"{key} is {name.Described}; allowed is {Cie1931}, {Cie1964} or a CSV file (nearest: {nearest}).");
                return null;
        }

        if (FileOnly(value, key, SpectrumKind.Observer) is not { } reference || Table(reference) is not { } table)
            return null;
        if (table.FirstColumn != "wavelength_nm" || !SpectrumKind.Observer.Columns.All(column => Has(table, column)))
            return Refused<StandardObserver>(reference, table, "wavelength_nm, x_bar, y_bar, z_bar");
        return Guarded(reference.File, key, () => StandardObserver.FromTable(table));
    }

    private static (double FirstNm, double LastNm) RangeNm(Spectrum<PhotonPerNm> light)
    {
        double least = LightShare * light.Peak;
        int first = 0, last = WavelengthGrid.Count - 1;
        while (light.Samples[first] < least)
            first++;
        while (light.Samples[last] < least)
            last--;
        return (WavelengthGrid.NmAt(first), WavelengthGrid.NmAt(last));
    }

    private static bool IsFileName(Node value) =>
        value is ScalarNode { IsNull: false } name && !Section.TryNumber(name, out _) && name.Text.Contains('.', StringComparison.Ordinal)
        && !name.Text.All(c => char.IsAsciiDigit(c) || c is '.' or ',' or '-' or '+');

    private SpectrumReference? FileOnly(Node value, string key, SpectrumKind kind)
    {
        if (value is not MappingNode mapping)
            return SpectrumReference.Read(value, key, kind, faults);
        var section = new Section(mapping, key, faults);
        var file = section.Required("file");
        section.Close();
        return file is null ? null : SpectrumReference.Read(file, section.PathOf("file"), kind, faults);
    }

    private static bool Has(SpectrumTable table, string column) => table.Columns.Contains(column, StringComparer.Ordinal);

    private string PathOf(ScalarNode name) => Path.Combine(folder, name.Text);

    private SpectrumTable? Table(SpectrumReference reference)
    {
        FileNames.Add(reference.File);
        string path = PathOf(reference.File);
        if (shelf.Has(path))
            return Table(reference.File, reference.Key);
        string found = Directory.Exists(path) ? "is a folder" : $"is not there (looked for {path})";
        faults.Add(reference.File.Place, $"{reference.Key}: the file {Shown.Quoted(reference.File.Text)} {found}; a spectrum file is due.");
        return null;
    }

    private SpectrumTable? Table(ScalarNode file, string key)
    {
        string path = PathOf(file);
        return Guarded(file, key, () => shelf.Table(path));
    }

    private string? Column(SpectrumReference reference, SpectrumTable table, SpectrumKind kind)
    {
        string[] fitting = [.. kind.Columns.Where(column => Has(table, column) && (reference.Column ?? column) == column)];
        if (table.FirstColumn == "wavelength_nm" && fitting.Length == 1)
            return fitting[0];
        return fitting.Length > 1
            ? Refused<string>(reference, table, $"column: {string.Join(" or column: ", fitting)} beside file:")
            : Refused<string>(reference, table, $"wavelength_nm and {reference.Column ?? string.Join(" or ", kind.Columns)}");
    }

    private T? Refused<T>(SpectrumReference reference, SpectrumTable table, string due)
        where T : class
    {
        string columns = string.Join(", ", table.Columns.Prepend(table.FirstColumn));
        faults.Add(reference.File.Place, $"{reference.Key}: {Shown.Quoted(reference.File.Text)} has the columns {columns}; due is {due}.");
        return null;
    }

    private Spectrum<TUnit>? Import<TUnit>(SpectrumReference reference, SpectrumTable table, string column)
        where TUnit : struct, ISpectralUnit
    {
        // After a fault in all the lights nothing is known to be needed; the first row always covers itself.
        double firstNm = table.WavelengthsNm[0] + reference.Options.ShiftNm;
        var options = reference.Options with { NeededNm = _lightNm ?? (firstNm, firstNm) };
        var imported = Guarded(reference.File, reference.Key, () => shelf.Import<TUnit>(table, column, options));
        if (imported is not null)
            warnings.AddRange(imported.Warnings.Except(warnings, StringComparer.Ordinal).ToList());
        return imported?.Spectrum;
    }

    // A fault of a spectrum as a whole is told where the film file names it: its cure is often there.
    private T? Guarded<T>(ScalarNode file, string key, Func<T> read)
        where T : class
    {
        try
        {
            return read();
        }
        catch (InputException exception)
        {
            foreach (var fault in exception.Faults)
            {
                if (fault.Line is null)
                    faults.Add(file.Place, $"{key}: in {Shown.Quoted(file.Text)}, {fault.Message}");
                else
                    faults.Add(fault);
            }

            return null;
        }
    }
}
