using System.Globalization;
using System.Text;
using CsvHelper;

namespace Colorimetry;

/// <summary>Collects the rows of one file below its header, and checks each field.</summary>
internal sealed class RowReader
{
    private readonly string[] _header;
    private readonly FaultList _faults;
    private readonly string _path;
    private readonly List<(double First, int Line, double[] Values, int[] TextColumns)> _rows = [];
    private char _decimalSign;
    private int _decimalSignLine;

    private RowReader(string[] header, string path, FaultList faults) => (_header, _path, _faults) = (header, path, faults);

    private int ValueCount => _header.Length - 1;

    /// <summary>Reads the header.</summary>
    public static RowReader FromHeader(CsvReader reader, FaultList faults)
    {
        int line = LineOf(reader);
        // A separator after the last name is a habit of spreadsheets and means nothing.
        int count = reader.FieldCount;
        while (count > 1 && reader.IsEmpty(count - 1))
            count--;
        var header = new string[count];
        for (int i = 0; i < count; i++)
            header[i] = reader.GetString(i);

        if (header[0] is not (SpectrumFile.WavelengthColumn or SpectrumFile.AngleColumn))
        {
            faults.Add(line, TextColumn(reader, 0), $"the first column is {SpectrumFile.Quoted(header[0])}; the first line names the columns, and "
                + "the first name is "
                + $"{SpectrumFile.WavelengthColumn} (or {SpectrumFile.AngleColumn} in a table by angle).");
            throw faults.ToException();
        }

        if (count < 2)
            faults.Add(line, null, $"there is one column, {header[0]}; at least one column of values must follow it, separated by comma, semicolon "
                + "or tab.");
        for (int i = 1; i < count; i++)
        {
            if (header[i].Length == 0)
                faults.Add(line, TextColumn(reader, i), "a column has no name; every column is named for what it holds.");
            else if (Array.IndexOf(header, header[i]) < i)
                faults.Add(line, TextColumn(reader, i), $"the column {SpectrumFile.Quoted(header[i])} occurs twice; names are unique.");
        }

        if (faults.Any)
            throw faults.ToException();
        return new(header, faults.File, faults);
    }

    /// <summary>Reads the row that the reader stands on.</summary>
    public void Add(CsvReader reader)
    {
        int line = LineOf(reader);
        if (_rows.Count == SpectrumFile.MostRows)
        {
            _faults.Add(line, null, string.Create(CultureInfo.InvariantCulture, $"there are more rows than the {SpectrumFile.MostRows} allowed."));
            throw _faults.ToException();
        }

        int count = reader.FieldCount;
        while (count > _header.Length && reader.IsEmpty(count - 1))
            count--;
        if (count != _header.Length)
        {
            string hint = count > _header.Length && reader.Separator == ',' ? " (with a decimal comma, separate columns by semicolon or tab)" : "";
            _faults.Add(line, null, string.Create(CultureInfo.InvariantCulture, $"fields in the row: {count}; the header has "
                + $"{_header.Length}{hint}."));
            return;
        }

        double first = Number(reader, 0, line);
        var values = new double[ValueCount];
        var textColumns = new int[ValueCount];
        for (int i = 0; i < values.Length; i++)
        {
            values[i] = Number(reader, i + 1, line);
            textColumns[i] = TextColumn(reader, i + 1);
        }

        if (_header[0] == SpectrumFile.WavelengthColumn && first is < 100 or > 10_000)
            _faults.Add(line, TextColumn(reader, 0), $"the wavelength {reader.GetString(0)} is out of range; 100 to 10000 nm are allowed.");
        else if (_header[0] == SpectrumFile.AngleColumn && first is < 0 or > 90)
            _faults.Add(line, TextColumn(reader, 0), $"the angle {reader.GetString(0)} is out of range; 0 to 90 degrees are allowed.");
        _rows.Add((first, line, values, textColumns));
    }

    /// <summary>All rows in rising order, or every fault found.</summary>
    public SpectrumTable ToTable()
    {
        if (_rows.Count < 2 && !_faults.Any)
            _faults.Add(null, null, string.Create(CultureInfo.InvariantCulture, $"rows below the header: {_rows.Count}; at least 2 are needed."));
        _rows.Sort((a, b) => a.First != b.First ? a.First.CompareTo(b.First) : a.Line.CompareTo(b.Line));
        for (int i = 1; i < _rows.Count; i++)
        {
            if (_rows[i].First == _rows[i - 1].First)
            {
                _faults.Add(_rows[i].Line, null, string.Create(
                    CultureInfo.InvariantCulture, $"{_header[0]} {_rows[i].First} stands on line {_rows[i - 1].Line} already; each occurs once."));
            }
        }

        if (_faults.Any)
            throw _faults.ToException();
        var values = new double[ValueCount][];
        var textColumns = new int[ValueCount][];
        for (int c = 0; c < ValueCount; c++)
        {
            values[c] = [.. _rows.Select(r => r.Values[c])];
            textColumns[c] = [.. _rows.Select(r => r.TextColumns[c])];
        }

        return new(_path, _header[0], _header[1..], [.. _rows.Select(r => r.First)], values, [.. _rows.Select(r => r.Line)], textColumns);
    }

    // NaN stands for a fault already noted; no table is made then.
    private double Number(CsvReader reader, int field, int line)
    {
        string text = reader.GetString(field);
        int column = TextColumn(reader, field);
        if (text.Length == 0)
        {
            _faults.Add(line, column, $"{_header[field]} is missing; every row has a number in every column.");
            return double.NaN;
        }

        bool comma = text.Contains(',', StringComparison.Ordinal);
        if (comma || text.Contains('.', StringComparison.Ordinal))
        {
            char sign = comma ? ',' : '.';
            if (_decimalSign == 0)
                (_decimalSign, _decimalSignLine) = (sign, line);
            if (sign != _decimalSign || (comma && text.Contains('.', StringComparison.Ordinal)))
            {
                _faults.Add(line, column, string.Create(
                    CultureInfo.InvariantCulture,
                    $"{_header[field]} is {SpectrumFile.Quoted(text)}, but the decimal sign on line {_decimalSignLine} is '{_decimalSign}'; "
                    + $"one decimal sign in a file, and no thousands separators."));
                return double.NaN;
            }
        }

        bool parsed = double.TryParse(
            comma ? text.Replace(',', '.') : text,
            NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent,
            CultureInfo.InvariantCulture,
            out double number);
        if (parsed && double.IsFinite(number))
            return number;
        _faults.Add(line, column, $"{_header[field]} is {SpectrumFile.Quoted(text)}; a finite number is needed.");
        return double.NaN;
    }

    private static int LineOf(CsvReader reader) => checked((int)reader.LineNumber);

    // Where the field's text begins in its line, in characters from 1.
    private static int TextColumn(CsvReader reader, int field)
    {
        ReadOnlySpan<byte> record = reader.RawRecord;
        int start = 0;
        for (int i = 0; i < field; i++)
            start += reader.GetRawSpan(i).Length + 1;
        while (start < record.Length && record[start] is (byte)' ')
            start++;
        return Encoding.UTF8.GetCharCount(record[..Math.Min(start, record.Length)]) + 1;
    }
}
