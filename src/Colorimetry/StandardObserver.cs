using System.Globalization;

namespace Colorimetry;

/// <summary>Colour-matching functions on the grid.</summary>
/// <remarks>
/// The CIE tables are kept every 5 nm, as published, and brought to 1 nm by Sprague interpolation (CIE 167:2005). Against the
/// CIE's own 1 nm tables that is right to 1.0e-4 in x̄, 4.8e-5 in ȳ and 4.8e-4 in z̄ for 1931, and to 7.2e-4, 1.7e-3 and 3.4e-3 for 1964,
/// whose 1 nm table was made in another way. An observer file with the 1 nm table gives the difference back where it matters.
/// </remarks>
public sealed class StandardObserver
{
    /// <summary>A table must reach at least from here…</summary>
    private const double LatestFirstNm = 390;

    /// <summary>…to here. The CIE 2015 functions begin at 390 nm; abridged tables end at 780 nm.</summary>
    private const double EarliestLastNm = 780;

    private const double CoarsestStepNm = 5;

    private static readonly Lazy<StandardObserver> LazyCie1931 = new(
        () => FromTable(PublishedTables.Read("observers/cie-1931-2-degree.csv"), "CIE 1931 2°"));

    private static readonly Lazy<StandardObserver> LazyCie1964 = new(
        () => FromTable(PublishedTables.Read("observers/cie-1964-10-degree.csv"), "CIE 1964 10°"));

    private readonly double[] _xBar, _yBar, _zBar;

    private StandardObserver(string name, double[] xBar, double[] yBar, double[] zBar) =>
        (Name, _xBar, _yBar, _zBar) = (name, xBar, yBar, zBar);

    /// <summary>CIE 1931 standard observer, 2 degrees (ISO/CIE 11664-1:2019).</summary>
    public static StandardObserver Cie1931 => LazyCie1931.Value;

    /// <summary>CIE 1964 standard observer, 10 degrees (ISO/CIE 11664-1:2019).</summary>
    public static StandardObserver Cie1964 => LazyCie1964.Value;

    /// <summary>Name, such as "CIE 1931 2°".</summary>
    public string Name { get; }

    /// <summary>x̄ at each grid wavelength.</summary>
    public ReadOnlySpan<double> XBar => _xBar;

    /// <summary>ȳ at each grid wavelength.</summary>
    public ReadOnlySpan<double> YBar => _yBar;

    /// <summary>z̄ at each grid wavelength.</summary>
    public ReadOnlySpan<double> ZBar => _zBar;

    /// <summary>An observer from a table with the columns x_bar, y_bar, z_bar.</summary>
    /// <param name="table">
    /// Even steps of at most 5 nm, reaching at least from 390 to 780 nm, no value below 0. Outside its range the functions are 0, as in
    /// the standards whose tables end there; between its rows they are interpolated after Sprague.
    /// </param>
    /// <exception cref="InputException">The table is not of this kind.</exception>
    public static StandardObserver FromTable(SpectrumTable table)
    {
        ArgumentNullException.ThrowIfNull(table);
        return FromTable(table, Path.GetFileNameWithoutExtension(table.Name));
    }

    private static StandardObserver FromTable(SpectrumTable table, string name)
    {
        ReadOnlySpan<double> nm = table.WavelengthsNm;
        if (nm[0] > LatestFirstNm || nm[^1] < EarliestLastNm)
        {
            throw new InputException(table.Fault(string.Create(
                CultureInfo.InvariantCulture, $"the colour-matching functions reach from {nm[0]} to {nm[^1]} nm; at least {LatestFirstNm} to "
                    + $"{EarliestLastNm} nm are needed.")));
        }

        if (EvenSteps.Of(nm) is not { } step || step > CoarsestStepNm)
        {
            throw new InputException(table.Fault(string.Create(
                CultureInfo.InvariantCulture, $"the steps are uneven or wider than {CoarsestStepNm} nm; colour-matching functions need even steps "
                    + $"of at most that.")));
        }

        return new(name, OnGrid(table, "x_bar", step), OnGrid(table, "y_bar", step), OnGrid(table, "z_bar", step));
    }

    private static double[] OnGrid(SpectrumTable table, string column, double stepNm)
    {
        ReadOnlySpan<double> nm = table.WavelengthsNm, values = table.Values(column);
        double sum = 0;
        for (int row = 0; row < values.Length; row++)
        {
            if (values[row] < 0)
            {
                throw new InputException(table.FaultAt(row, column, string.Create(
                    CultureInfo.InvariantCulture, $"{column} is {values[row]} at {nm[row]} nm; at least 0 is allowed.")));
            }

            sum += values[row];
        }

        if (sum == 0)
            throw new InputException(table.Fault($"{column} is 0 throughout; an observer needs three functions."));

        double[] extended = Sprague.Extend(values);
        var samples = new double[WavelengthGrid.Count];
        for (int i = 0; i < samples.Length; i++)
        {
            double position = (WavelengthGrid.NmAt(i) - nm[0]) / stepNm;
            if (position < 0 || position > values.Length - 1)
                continue;
            int interval = Math.Min((int)position, values.Length - 2);
            // Beside a stretch of zeros the polynomial dips below them (by 7e-5 at most, in z̄ of 1964).
            samples[i] = Math.Max(0, Sprague.At(extended, interval, position - interval));
        }

        return samples;
    }
}
