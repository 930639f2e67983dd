using System.Globalization;

namespace Colorimetry;

/// <summary>Brings a column of a table to the grid, and refuses what it would have to invent.</summary>
/// <remarks>
/// <para>Between rows: as they are where the table has a row at every whole nm; straight lines averaged over each nm where rows are
/// closer than that; Sprague's curve between even steps of 1 to 20 nm; a monotone cubic otherwise. The result says which.</para>
/// <para>Why averages for fine steps: a line narrower than 1 nm keeps its area, wherever it falls between two grid wavelengths, and
/// noise is averaged rather than picked. The price is a line wider by 0.25 nm² in variance at most, which moves xy by some 1e-5.</para>
/// <para>Never negative: where Sprague's curve would leave the values allowed, the monotone one stands in for that interval.</para>
/// <para>Source of the choice: CIE 167:2005 (Sprague for even steps); the limits are given at each check.</para>
/// </remarks>
public static class SpectrumImport
{
    /// <summary>Imports one column.</summary>
    /// <typeparam name="TUnit">
    /// Unit of the result, which decides the column names and rules: light and emission (<see cref="WattPerNm"/>: power_per_nm,
    /// <see cref="PhotonPerNm"/>: photons_per_nm) are zero outside the file and must have fallen to 0.1 % of the peak at its ends;
    /// <see cref="AbsorbancePerCm"/> (absorbance_per_cm), <see cref="Fraction"/> (transmittance, reflectance, absorptance, red, green, blue),
    /// <see cref="PerMm"/> (absorption_per_mm, scattering_per_mm) and <see cref="MeanCosine"/> (anisotropy) must cover what is needed.
    /// </typeparam>
    /// <param name="table">A table by wavelength.</param>
    /// <param name="column">The column; its name must be one of the unit's.</param>
    /// <param name="options">Range, shift and scale.</param>
    /// <exception cref="InputException">
    /// The column is missing or holds another unit; a value is out of range or below −0.1 % of the peak; rows are too far apart or too
    /// few for a line; the range is too short; more than 0.1 % of the light lies outside 360 to 830 nm; an option makes no sense.
    /// </exception>
    public static ImportedSpectrum<TUnit> ToGrid<TUnit>(SpectrumTable table, string column, ImportOptions options)
        where TUnit : struct, ISpectralUnit
    {
        ArgumentNullException.ThrowIfNull(table);
        ArgumentNullException.ThrowIfNull(options);
        SpectralQuantity quantity = SpectralQuantity.Of<TUnit>();
        bool isLight = default(TUnit) is ILightUnit;
        double[] values = table.Values(column).ToArray();
        double[] nm = [.. table.WavelengthsNm.ToArray().Select(w => w + options.ShiftNm)];
        var checks = new SpectrumChecks(table, column, quantity, options, nm);
        if (!quantity.Columns.Contains(column))
            checks.Add($"the column {column} was asked for {string.Join(" or ", quantity.Columns)}; a column is named for what it holds.");
        checks.Options(isLight);
        checks.ThrowIfAny();

        double peak = values.Max();
        if (isLight)
            checks.BeyondGrid(values);
        int noisy = 0;
        if (quantity.LowestValue == 0)
        {
            checks.Negatives(values, peak);
            noisy = values.Count(v => v < 0);
            values = [.. values.Select(v => Math.Max(v, 0))];
        }

        if (isLight && !(peak > 0))
            checks.Add($"{column} holds no light: its largest value is {peak}.");
        checks.Gaps(values, isLight);
        if (isLight)
        {
            checks.Lines(values);
            checks.Tails(values);
        }
        else
        {
            checks.Cover();
        }

        checks.ThrowIfAny();
        double factor = FactorOf(options, checks, nm, values, quantity);
        values = [.. values.Select(v => v * factor)];
        checks.Range(values);
        checks.ThrowIfAny();

        double[]? onGrid = OnGrid(nm, values, isLight, options.Outside);
        if (onGrid is not null)
            return Result<TUnit>(table, column, onGrid, Interpolation.OnGrid, "a row at every nm, taken as it is", nm, isLight, options, noisy);

        Curve curve = CurveThrough(nm, values, quantity);
        bool averaged = SmallestStep(nm) < 1 - EvenSteps.ToleranceNm;
        double[] samples = averaged ? Averages(curve, nm, isLight, options.Outside) : Points(curve, nm, isLight, options.Outside);
        return Result<TUnit>(table, column, samples, curve.Kind, Explain(curve, nm, averaged), nm, isLight, options, noisy);
    }

    /// <summary>The curve that the steps of a table call for.</summary>
    internal static Curve CurveThrough(double[] nm, double[] values, SpectralQuantity quantity)
    {
        if (WidestStep(nm) <= 1 + EvenSteps.ToleranceNm && SmallestStep(nm) < 1 - EvenSteps.ToleranceNm)
            return new LinearCurve(nm, values);
        if (nm.Length >= Sprague.FewestValues && EvenSteps.Of(nm) is { } step && step <= 20 + EvenSteps.ToleranceNm)
            return new SpragueCurve(nm, values, quantity);
        return new MonotoneCurve(nm, values);
    }

    private static double FactorOf(ImportOptions options, SpectrumChecks checks, double[] nm, double[] values, SpectralQuantity quantity)
    {
        if (options.Anchor is not { } anchor)
            return options.ScaleFactor;
        // The scale is not known yet, so no upper limit holds for this curve.
        double there = CurveThrough(nm, values, quantity with { HighestValue = double.PositiveInfinity }).At(anchor.AtNm);
        if (!(there > SpectralQuantity.NothingShare * values.Max()))
            checks.Add($"the spectrum is {there} at at_nm {anchor.AtNm} nm; more than 0.1 % of its peak is needed there to scale it by.");
        checks.ThrowIfAny();
        return anchor.Value / there;
    }

    private static double[]? OnGrid(double[] nm, double[] values, bool isLight, OutsideRule outside)
    {
        double first = Math.Round(nm[0]);
        if (EvenSteps.Of(nm) is not { } step
            || Math.Abs(nm[0] - first) > EvenSteps.ToleranceNm
            || Math.Abs(nm[^1] - first - (nm.Length - 1)) > EvenSteps.ToleranceNm
            || Math.Abs(step - 1) > EvenSteps.ToleranceNm)
        {
            return null;
        }

        return Filled(i =>
        {
            int row = WavelengthGrid.NmAt(i) - (int)first;
            return row < 0 ? Outside(values[0], isLight, outside) : row >= values.Length ? Outside(values[^1], isLight, outside) : values[row];
        });
    }

    private static double[] Points(Curve curve, double[] nm, bool isLight, OutsideRule outside) => Filled(i =>
    {
        double at = WavelengthGrid.NmAt(i);
        return at < nm[0] ? Outside(curve.At(nm[0]), isLight, outside)
            : at > nm[^1] ? Outside(curve.At(nm[^1]), isLight, outside)
            : curve.At(at);
    });

    private static double[] Averages(Curve curve, double[] nm, bool isLight, OutsideRule outside) => Filled(i =>
    {
        double from = WavelengthGrid.NmAt(i) - 0.5, to = from + 1;
        if (to <= nm[0])
            return Outside(curve.At(nm[0]), isLight, outside);
        if (from >= nm[^1])
            return Outside(curve.At(nm[^1]), isLight, outside);
        double coveredFrom = Math.Max(from, nm[0]), coveredTo = Math.Min(to, nm[^1]);
        double area = curve.Area(coveredFrom, coveredTo);
        // Light outside the file is nothing; anything else is known from the part of the bin that the file covers.
        return isLight ? area : area / (coveredTo - coveredFrom);
    });

    private static double Outside(double nearest, bool isLight, OutsideRule outside) =>
        isLight || outside == OutsideRule.Zero ? 0 : nearest;

    private static double[] Filled(Func<int, double> sampleAt)
    {
        var samples = new double[WavelengthGrid.Count];
        for (int i = 0; i < samples.Length; i++)
            samples[i] = sampleAt(i);
        return samples;
    }

    private static string Explain(Curve curve, double[] nm, bool averaged)
    {
        string steps = EvenSteps.Of(nm) is { } step
            ? string.Create(CultureInfo.InvariantCulture, $"steps of {step:0.###} nm")
            : string.Create(CultureInfo.InvariantCulture, $"uneven steps of {SmallestStep(nm):0.###} to {WidestStep(nm):0.###} nm");
        string method = curve switch
        {
            LinearCurve => "linear between rows",
            SpragueCurve { ReplacedIntervals: 0 } => "Sprague interpolation (CIE 167)",
            SpragueCurve s => string.Create(CultureInfo.InvariantCulture, $"Sprague interpolation (CIE 167), monotone cubic in "
                + $"{s.ReplacedIntervals} of {nm.Length - 1} intervals where it would have left the values allowed"),
            _ => "monotone cubic interpolation",
        };
        return $"{steps}: {method}{(averaged ? ", averaged over each nm so that areas are kept" : "")}";
    }

    private static ImportedSpectrum<TUnit> Result<TUnit>(
        SpectrumTable table, string column, double[] samples, Interpolation kind, string how, double[] nm, bool isLight, ImportOptions options, int noisy)
        where TUnit : struct, ISpectralUnit
    {
        string outside = nm[0] <= WavelengthGrid.FirstNm && nm[^1] >= WavelengthGrid.LastNm ? ""
            : string.Create(CultureInfo.InvariantCulture, $"; outside {nm[0]:0.###} to {nm[^1]:0.###} nm "
                + $"{(isLight || options.Outside == OutsideRule.Zero ? "zero" : "the value of the nearest row")}");
        string[] warnings = noisy == 0 ? []
            : [string.Create(CultureInfo.InvariantCulture, $"{table.Name}: {noisy} negative {(noisy == 1 ? "value" : "values")} of {column}, none "
                + $"below -0.1 % of the peak, taken as zero.")];
        // No curve leaves the values allowed by more than rounding: an average of ones is one.
        SpectralQuantity quantity = SpectralQuantity.Of<TUnit>();
        samples = [.. samples.Select(s => Math.Clamp(s, quantity.LowestValue, quantity.HighestValue))];
        return new(Spectrum.FromSamples<TUnit>(samples, table.Name), kind, warnings) { Explanation = $"{table.Name}, {column}: {how}{outside}." };
    }

    private static double SmallestStep(double[] nm) => Steps(nm).Min();

    private static double WidestStep(double[] nm) => Steps(nm).Max();

    private static IEnumerable<double> Steps(double[] nm) => nm.Skip(1).Zip(nm, (b, a) => b - a);
}
