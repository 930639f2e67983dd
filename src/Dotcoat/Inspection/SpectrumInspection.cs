using Colorimetry;

namespace Dotcoat.Inspection;

/// <summary>What a measured file holds.</summary>
/// <param name="Table">The file as read.</param>
/// <param name="StepAt">Step, in the unit of the first column; null where it is not the same throughout.</param>
/// <param name="Columns">Each column after the first.</param>
/// <param name="Warnings">What stood in the way of a figure.</param>
internal sealed record SpectrumInspection(
    SpectrumTable Table, double? StepAt, IReadOnlyList<ColumnInspection> Columns, IReadOnlyList<string> Warnings)
{
    private const double StepTolerance = 1e-6;

    /// <summary>Whether the file is a table over the polar angle.</summary>
    public bool IsAngleTable => Table.FirstColumn == SpectrumFile.AngleColumn;

    /// <summary>The first column: wavelengths in nm, or angles in degrees.</summary>
    public ReadOnlySpan<double> At => FirstColumn(Table);

    /// <summary>Inspects a file that was read.</summary>
    public static SpectrumInspection Of(SpectrumTable table)
    {
        var warnings = new List<string>();
        var columns = table.Columns.Select(name => ColumnInspection.Of(table, name, warnings)).ToArray();
        return new(table, Step(FirstColumn(table)), columns, warnings);
    }

    internal static ReadOnlySpan<double> FirstColumn(SpectrumTable table) =>
        table.FirstColumn == SpectrumFile.AngleColumn ? table.AnglesDeg : table.WavelengthsNm;

    private static double? Step(ReadOnlySpan<double> at)
    {
        if (at.Length < 2)
            return null;
        double step = at[1] - at[0];
        for (int i = 2; i < at.Length; i++)
        {
            if (Math.Abs(at[i] - at[i - 1] - step) > StepTolerance)
                return null;
        }

        return Math.Round(step, 6);
    }
}

/// <summary>One column.</summary>
/// <param name="Name">Its header.</param>
/// <param name="Kind">What such a column measures.</param>
/// <param name="Figures">Figures every curve has.</param>
internal sealed record ColumnInspection(string Name, ColumnKind Kind, CurveFigures Figures)
{
    /// <summary>How light is brought to the 1 nm grid, in a sentence; null for anything else.</summary>
    public string? Interpolation { get; private init; }

    /// <summary>For light: its colour; null where the file's ends do not allow it.</summary>
    public LightColour? Colour { get; private init; }

    /// <summary>For absorbance: where the first exciton may be, from the red end.</summary>
    public IReadOnlyList<ExcitonCandidate> Excitons { get; private init; } = [];

    /// <summary>For filters and reflectors: where the curve passes half of its greatest value.</summary>
    public IReadOnlyList<LevelCrossing> Edges { get; private init; } = [];

    /// <summary>For angle tables: mean over the hemisphere, weighted by sin θ cos θ.</summary>
    public double? HemisphereMean { get; private init; }

    public static ColumnInspection Of(SpectrumTable table, string name, List<string> warnings)
    {
        var at = SpectrumInspection.FirstColumn(table);
        var values = table.Values(name);
        var kind = ColumnKind.Of(table.FirstColumn, name);
        var inspection = new ColumnInspection(name, kind, CurveFigures.Of(at, values));
        if (kind.Family == ColumnFamily.Unknown)
            warnings.Add($"{name} is no column that dotcoat knows: its figures are those of any curve.");
        return kind.Family switch
        {
            ColumnFamily.Light => inspection.WithColour(table, warnings),
            ColumnFamily.Absorbance => inspection with { Excitons = ExcitonCandidate.Of(at, values) },
            ColumnFamily.Filter => inspection with { Edges = LevelCrossing.Of(at, values, inspection.Figures.Peak / 2) },
            ColumnFamily.Angle => inspection with { HemisphereMean = MeanOverHemisphere(at, values) },
            _ => inspection,
        };
    }

    // A refusal to bring the light to the grid costs its colour, not the other figures.
    private ColumnInspection WithColour(SpectrumTable table, List<string> warnings)
    {
        try
        {
            return Name == "photons_per_nm"
                ? WithColour(SpectrumImport.ToGrid<PhotonPerNm>(table, Name, ImportOptions.Default), light => light.ToPower(), warnings)
                : WithColour(SpectrumImport.ToGrid<WattPerNm>(table, Name, ImportOptions.Default), light => light, warnings);
        }
        catch (InputException refused)
        {
            warnings.AddRange(refused.Faults.Select(fault => $"No colour: {fault.Message}"));
            return this;
        }
    }

    private ColumnInspection WithColour<TUnit>(
        ImportedSpectrum<TUnit> imported, Func<Spectrum<TUnit>, Spectrum<WattPerNm>> toPower, List<string> warnings)
        where TUnit : struct, ISpectralUnit
    {
        warnings.AddRange(imported.Warnings);
        return this with { Interpolation = imported.Explanation, Colour = LightColour.Of(toPower(imported.Spectrum)) };
    }

    private static double MeanOverHemisphere(ReadOnlySpan<double> anglesDeg, ReadOnlySpan<double> values)
    {
        var table = new FilmOptics.AngleTable(anglesDeg, values, "inspected");
        const int steps = 9000;
        double sum = 0;
        for (int i = 0; i < steps; i++)
            sum += table.At(Math.Sqrt((i + 0.5) / steps)); // even steps of cos²θ carry equal weight
        return sum / steps;
    }
}

/// <summary>Families of columns, by what can be said about them.</summary>
internal enum ColumnFamily
{
    Light,
    Absorbance,
    Coefficient,
    Filter,
    Observer,
    Angle,
    Unknown,
}

/// <summary>What a column measures.</summary>
/// <param name="Family">Its family.</param>
/// <param name="Words">In words.</param>
/// <param name="Unit">Its unit; null where the curve is relative.</param>
internal sealed record ColumnKind(ColumnFamily Family, string Words, string? Unit)
{
    public static ColumnKind Of(string firstColumn, string name) => (firstColumn, name) switch
    {
        (SpectrumFile.AngleColumn, "radiance") => new(ColumnFamily.Angle, "radiance against angle", null),
        (SpectrumFile.AngleColumn, "reflectance") => new(ColumnFamily.Angle, "return against angle", "1"),
        (SpectrumFile.AngleColumn, _) => new(ColumnFamily.Angle, "quantity against angle", null),
        (_, "power_per_nm") => new(ColumnFamily.Light, "light, power", null),
        (_, "photons_per_nm") => new(ColumnFamily.Light, "light, photons", null),
        (_, "absorbance_per_cm") => new(ColumnFamily.Absorbance, "decadic absorbance", "1/cm at 1 mg/mL"),
        (_, "absorption_per_mm") => new(ColumnFamily.Coefficient, "absorption coefficient", "1/mm"),
        (_, "scattering_per_mm") => new(ColumnFamily.Coefficient, "scattering coefficient", "1/mm"),
        (_, "transmittance" or "red" or "green" or "blue") => new(ColumnFamily.Filter, "transmittance", "1"),
        (_, "reflectance") => new(ColumnFamily.Filter, "reflectance", "1"),
        (_, "absorptance") => new(ColumnFamily.Filter, "absorptance", "1"),
        (_, "x_bar" or "y_bar" or "z_bar") => new(ColumnFamily.Observer, "colour-matching function", "1"),
        _ => new(ColumnFamily.Unknown, "unknown", null),
    };
}
