using System.Globalization;
using CsvHelper;

namespace Colorimetry;

/// <summary>Reads tables by wavelength or by angle from CSV text as instruments, spreadsheets and people write it.</summary>
/// <remarks>
/// <para>Accepted: comma, semicolon or tab between fields; decimal point or decimal comma, not both in one file; lines that begin with
/// <c>#</c>; empty lines; LF, CRLF or CR; UTF-8 or, with a byte order mark, UTF-16; rows in any order, at any steps.</para>
/// <para>The first line that is neither empty nor a comment names the columns. The first column is <c>wavelength_nm</c> or
/// <c>angle_deg</c>.</para>
/// <para>Refused, with file, line and column: what is no number, what is missing, NaN and infinity, a first-column value that occurs
/// twice or lies out of range, rows longer or shorter than the header, fewer than two rows or columns, more than 16 MiB, 200 000 rows or
/// 10 000 characters in a line, and anything that is no text.</para>
/// </remarks>
public static class SpectrumFile
{
    /// <summary>First column of a spectrum: wavelength in air, nm, 100 to 10 000.</summary>
    public const string WavelengthColumn = "wavelength_nm";

    /// <summary>First column of a table by direction: polar angle in air, degrees, 0 to 90.</summary>
    public const string AngleColumn = "angle_deg";

    /// <summary>Most rows of one file.</summary>
    public const int MostRows = 200_000;

    /// <summary>Reads a file.</summary>
    /// <param name="path">The file; faults name it just so.</param>
    /// <exception cref="InputException">The file cannot be read, or is refused for the reasons above.</exception>
    public static SpectrumTable Read(string path)
    {
        ArgumentException.ThrowIfNullOrEmpty(path);
        return Parse(SpectrumText.FromFile(path), path);
    }

    /// <summary>Reads a stream to its end.</summary>
    /// <param name="stream">Text as in a file; not closed.</param>
    /// <param name="name">Names it in faults.</param>
    /// <exception cref="InputException">It is refused for the reasons above.</exception>
    public static SpectrumTable Read(Stream stream, string name)
    {
        ArgumentNullException.ThrowIfNull(stream);
        ArgumentException.ThrowIfNullOrEmpty(name);
        return Parse(SpectrumText.FromStream(stream, name), name);
    }

    private static SpectrumTable Parse(string text, string path)
    {
        var faults = new FaultList(path);
        var options = new CsvReaderOptions
        {
            Separator = SeparatorOf(text),
            HasHeader = false,
            CommentPrefix = '#',
            TrimWhitespace = true,
            TrackLineNumbers = true,
            AllowLineBreaksInQuotes = false,
            FieldCountMismatch = CsvFieldCountHandling.Allow,
            MalformedData = CsvMalformedDataHandling.Recover,
            FormatProvider = CultureInfo.InvariantCulture,
            OnMalformedRecord = m => faults.Add(
                checked((int)m.LineNumber), null, $"a quotation mark out of place in {Quoted(m.RawRecord)}; quotes enclose a whole field or none."),
        };
        using var reader = CsvReader.FromText(text, options);
        RowReader? rows = null;
        while (reader.Read())
        {
            if (IsBlank(reader))
                continue;
            if (rows is null)
                rows = RowReader.FromHeader(reader, faults);
            else
                rows.Add(reader);
        }

        if (rows is null)
        {
            faults.Add(null, null, $"the file holds no rows; a header such as {WavelengthColumn},power_per_nm and at least two rows are needed.");
            throw faults.ToException();
        }

        return rows.ToTable();
    }

    // The header decides: names hold no separator, and a decimal comma cannot mislead it.
    private static char SeparatorOf(string text)
    {
        foreach (ReadOnlySpan<char> line in text.AsSpan().EnumerateLines())
        {
            ReadOnlySpan<char> content = line.Trim();
            if (content.IsEmpty || content[0] == '#')
                continue;
            return content.Contains(';') ? ';' : content.Contains('\t') ? '\t' : ',';
        }

        return ',';
    }

    // Spreadsheets leave rows of separators behind; an indented comment is a comment all the same.
    private static bool IsBlank(CsvReader reader)
    {
        if (reader.GetSpan(0).StartsWith("#"u8))
            return true;
        for (int i = 0; i < reader.FieldCount; i++)
        {
            if (!reader.IsEmpty(i))
                return false;
        }

        return true;
    }

    /// <summary>Text found in a file, short enough for a message.</summary>
    internal static string Quoted(string found) => found.Length <= 40 ? $"'{found}'" : $"'{found[..40]}…'";
}
