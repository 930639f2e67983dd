namespace Colorimetry;

/// <summary>A measured or published table as it stands in its file: one first column, one or more columns of values.</summary>
/// <remarks>Rows rise in the first column, whatever their order in the file. Every number is finite; no first-column value occurs twice.</remarks>
public sealed class SpectrumTable
{
    private readonly double[] _first;
    private readonly double[][] _values;
    private readonly int[] _lines;
    private readonly int[][] _textColumns;

    // Checked by SpectrumFile, the only one who makes tables.
    internal SpectrumTable(
        string path, string firstColumn, IReadOnlyList<string> columns, double[] first, double[][] values, int[] lines, int[][] textColumns)
    {
        (Path, FirstColumn, Columns) = (path, firstColumn, columns);
        (_first, _values, _lines, _textColumns) = (first, values, lines, textColumns);
    }

    /// <summary>The file's name without its folder: names the data in results.</summary>
    public string Name => System.IO.Path.GetFileName(Path);

    /// <summary>The file as it was asked for: names it in faults.</summary>
    public string Path { get; }

    /// <summary>Name of the first column: <c>wavelength_nm</c> or <c>angle_deg</c>.</summary>
    public string FirstColumn { get; }

    /// <summary>Names of the value columns, in the order of the file.</summary>
    public IReadOnlyList<string> Columns { get; }

    /// <summary>The wavelengths, nm, rising.</summary>
    /// <exception cref="InputException">It is a table by angle.</exception>
    public ReadOnlySpan<double> WavelengthsNm => First(SpectrumFile.WavelengthColumn);

    /// <summary>The polar angles in air, degrees, rising.</summary>
    /// <exception cref="InputException">It is a table by wavelength.</exception>
    public ReadOnlySpan<double> AnglesDeg => First(SpectrumFile.AngleColumn);

    /// <summary>The values of a column, one per row.</summary>
    /// <param name="column">One of <see cref="Columns"/>.</param>
    /// <exception cref="InputException">There is no such column.</exception>
    public ReadOnlySpan<double> Values(string column) => _values[IndexOf(column)];

    /// <summary>Line of the file that a row stands on, from 1.</summary>
    /// <param name="row">0 to the number of rows less one, in rising order of the first column.</param>
    public int LineOf(int row) => _lines[row];

    /// <summary>A fault of one value, with its place.</summary>
    /// <param name="row">Row, in rising order of the first column.</param>
    /// <param name="column">One of <see cref="Columns"/>.</param>
    /// <param name="message">What was found and what is allowed.</param>
    public InputFault FaultAt(int row, string column, string message) =>
        new(Path, _lines[row], _textColumns[IndexOf(column)][row], message);

    /// <summary>A fault of the whole table.</summary>
    /// <param name="message">What was found and what is allowed.</param>
    public InputFault Fault(string message) => new(Path, null, null, message);

    private int IndexOf(string column)
    {
        for (int i = 0; i < Columns.Count; i++)
        {
            if (Columns[i] == column)
                return i;
        }

        throw new InputException(Fault($"there is no column {column}; the file has {string.Join(", ", Columns)}."));
    }

    private double[] First(string wanted) => FirstColumn == wanted
        ? _first
        : throw new InputException(Fault($"the first column is {FirstColumn}; {wanted} is needed here."));
}
