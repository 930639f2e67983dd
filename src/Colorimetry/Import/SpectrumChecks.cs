namespace Colorimetry;

/// <summary>What a column must satisfy before it is brought to the grid. Each check adds its faults; none changes a value.</summary>
/// <param name="table">The table.</param>
/// <param name="column">Its column.</param>
/// <param name="quantity">What the column holds.</param>
/// <param name="options">How it is imported.</param>
/// <param name="nm">Wavelengths after the shift.</param>
internal sealed class SpectrumChecks(SpectrumTable table, string column, SpectralQuantity quantity, ImportOptions options, double[] nm)
{
    /// <summary>Half a grid step: a table that begins at 360.3 nm covers 360 nm.</summary>
    public const double CoverSlackNm = 0.5;

    private const double FewestSamplesOfALine = 3;

    private readonly FaultList _faults = new(table.Path);

    /// <summary>The options make sense for this column.</summary>
    public void Options(bool isLight)
    {
        if (!(Math.Abs(options.ShiftNm) <= 200))
            Add($"shift_nm is {options.ShiftNm}; -200 to 200 is allowed.");
        if (!(options.ScaleFactor > 0) || !double.IsFinite(options.ScaleFactor))
            Add($"scale is {options.ScaleFactor}; a number above 0 is needed.");
        if (options.Anchor is { } anchor)
        {
            if (options.ScaleFactor != 1)
                Add("scale and at_nm with value are both given; one of them sets the scale.");
            if (!(anchor.Value > 0) || !double.IsFinite(anchor.Value))
                Add($"value is {anchor.Value}; a number above 0 is needed.");
            if (!(anchor.AtNm >= nm[0] && anchor.AtNm <= nm[^1]))
                Add($"at_nm is {anchor.AtNm}; the file reaches from {nm[0]} to {nm[^1]} nm.");
        }

        if (isLight && options.Outside == OutsideRule.Hold)
            Add("outside is hold; light and emission outside a file are zero, so leave it out or say outside: zero.");
    }

    /// <summary>No value is below the noise.</summary>
    /// <param name="values">As in the file.</param>
    /// <param name="peak">Largest of them.</param>
    public void Negatives(ReadOnlySpan<double> values, double peak)
    {
        for (int row = 0; row < values.Length; row++)
        {
            if (values[row] < -SpectralQuantity.NothingShare * Math.Max(peak, 0))
            {
                AddAt(row, peak > 0
                    ? $"{column} is {values[row]} at {nm[row]} nm, {100 * values[row] / peak:0.##} % of the peak; noise down to -0.1 "
                        + "% of the peak is allowed."
                    : $"{column} is {values[row]} at {nm[row]} nm; {quantity.AllowedValues}.");
            }
        }
    }

    /// <summary>Every value is in the allowed range.</summary>
    /// <param name="values">After scaling.</param>
    public void Range(ReadOnlySpan<double> values)
    {
        for (int row = 0; row < values.Length; row++)
        {
            if (!(values[row] >= quantity.LowestValue && values[row] <= quantity.HighestValue))
                AddAt(row, $"{column} is {values[row]}{(options is { ScaleFactor: 1, Anchor: null } ? "" : " after scaling")} at "
                    + $"{nm[row]} nm; {quantity.AllowedValues}.");
        }
    }

    /// <summary>Rows stand close enough wherever something depends on the values between them.</summary>
    public void Gaps(ReadOnlySpan<double> values, bool isLight)
    {
        double nothing = SpectralQuantity.NothingShare * Peak(values);
        (double first, double last) = options.NeededNm ?? (WavelengthGrid.FirstNm, WavelengthGrid.LastNm);
        for (int row = 1; row < nm.Length; row++)
        {
            bool matters = isLight ? values[row - 1] > nothing || values[row] > nothing : nm[row] > first && nm[row - 1] < last;
            if (matters && nm[row] - nm[row - 1] > quantity.WidestGapNm + EvenSteps.ToleranceNm)
            {
                AddAt(row, $"no row stands between {nm[row - 1]} and {nm[row]} nm, {nm[row] - nm[row - 1]:0.###} nm apart; {column} "
                    + $"is interpolated over at most {quantity.WidestGapNm} nm.");
            }
        }
    }

    /// <summary>Each line of light has enough rows for its shape to be known.</summary>
    /// <remarks>
    /// With three rows above half of a Gaussian's height Sprague's curve is right to 1 % of the peak and 1e-4 of the area; with two it can
    /// miss 5 % of the peak (own calculation). Rows up to 1 nm apart invent nothing, whatever the line.
    /// </remarks>
    public void Lines(ReadOnlySpan<double> values)
    {
        double noticeable = 0.05 * Peak(values);
        for (int row = 1; row < values.Length - 1; row++)
        {
            if (values[row] < noticeable || values[row] <= values[row - 1] || values[row] < values[row + 1])
                continue;
            int first = row, last = row;
            while (first > 0 && values[first - 1] >= values[row] / 2)
                first--;
            while (last < values.Length - 1 && values[last + 1] >= values[row] / 2)
                last++;
            double step = Math.Max(nm[row] - nm[row - 1], nm[row + 1] - nm[row]);
            if (step > 1 + EvenSteps.ToleranceNm && last - first + 1 < FewestSamplesOfALine)
            {
                AddAt(row, $"the line at {nm[row]} nm has too few rows at or above half of its height, {last - first + 1}, "
                    + $"{step:0.###} nm apart; at least {FewestSamplesOfALine} are needed for its shape, so measure in finer steps.");
            }
        }
    }

    /// <summary>Light has fallen off where the file ends, unless the grid ends first.</summary>
    public void Tails(ReadOnlySpan<double> values)
    {
        double peak = Peak(values);
        if (options.Outside == OutsideRule.Zero)
            return;
        if (nm[0] > WavelengthGrid.FirstNm + CoverSlackNm)
            Tail(0, values[0], peak, "begins");
        if (nm[^1] < WavelengthGrid.LastNm - CoverSlackNm)
            Tail(nm.Length - 1, values[^1], peak, "ends");
    }

    /// <summary>Hardly any light lies where colours are not computed.</summary>
    /// <param name="values">As in the file, so that noise of either sign cancels.</param>
    public void BeyondGrid(ReadOnlySpan<double> values)
    {
        var curve = new LinearCurve(nm, values.ToArray());
        double total = curve.Area(nm[0], nm[^1]), beyond = 0;
        if (nm[0] < WavelengthGrid.FirstNm)
            beyond += curve.Area(nm[0], Math.Min(nm[^1], WavelengthGrid.FirstNm));
        if (nm[^1] > WavelengthGrid.LastNm)
            beyond += curve.Area(Math.Max(nm[0], WavelengthGrid.LastNm), nm[^1]);
        if (total > 0 && beyond > SpectralQuantity.NothingShare * total)
        {
            Add($"{100 * beyond / total:0.##} % of the light in {column} lies outside {WavelengthGrid.FirstNm} to "
                + $"{WavelengthGrid.LastNm} nm; 0.1 % is allowed, because colours are computed there alone.");
        }
    }

    /// <summary>A quantity other than light is known wherever there is light.</summary>
    public void Cover()
    {
        if (options.Outside != OutsideRule.Refuse)
            return;
        (double first, double last) = options.NeededNm ?? (WavelengthGrid.FirstNm, WavelengthGrid.LastNm);
        if (nm[0] > first + CoverSlackNm || nm[^1] < last - CoverSlackNm)
        {
            Add($"{column} reaches from {nm[0]} to {nm[^1]} nm, but there is light from {first} to {last} nm; measure further, or "
                + "say outside: hold or outside: zero.");
        }
    }

    /// <summary>Adds a fault of the whole column.</summary>
    public void Add(string message) => _faults.Add(null, null, message);

    /// <summary>Throws if anything was found.</summary>
    public void ThrowIfAny()
    {
        if (_faults.Any)
            throw _faults.ToException();
    }

    private void Tail(int row, double value, double peak, string end)
    {
        if (value > SpectralQuantity.NothingShare * peak)
        {
            AddAt(row, $"{column} is still {100 * value / peak:0.##} % of its peak at {nm[row]} nm, where the file {end}; it must "
                + "have fallen to 0.1 %. Measure further, or say outside: zero.");
        }
    }

    private void AddAt(int row, string message)
    {
        InputFault fault = table.FaultAt(row, column, message);
        _faults.Add(fault.Line, fault.Column, fault.Message);
    }

    private static double Peak(ReadOnlySpan<double> values)
    {
        double peak = values[0];
        foreach (double value in values)
            peak = Math.Max(peak, value);
        return peak;
    }
}
