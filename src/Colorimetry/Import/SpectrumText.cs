using System.Globalization;
using System.Text;

namespace Colorimetry;

/// <summary>The text of a spectrum file, within limits: a file that is too big or no text is refused before it is parsed.</summary>
internal static class SpectrumText
{
    /// <summary>Largest file, bytes. A 0.01 nm scan over 1000 nm with ten columns stays below it.</summary>
    public const int MostBytes = 16 * 1024 * 1024;

    /// <summary>Longest line, characters.</summary>
    public const int LongestLine = 10_000;

    /// <summary>Opens and reads a file.</summary>
    public static string FromFile(string path)
    {
        if (Directory.Exists(path))
            throw Refused(path, null, "this is a folder; a spectrum file is needed.");
        try
        {
            using var stream = new FileStream(path, FileMode.Open, FileAccess.Read, FileShare.ReadWrite);
            return FromStream(stream, path);
        }
        catch (Exception e) when (e is FileNotFoundException or DirectoryNotFoundException)
        {
            throw Refused(path, null, "there is no such file.");
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or ArgumentException or NotSupportedException)
        {
            throw Refused(path, null, $"the file cannot be read: {e.Message}");
        }
    }

    /// <summary>Reads a stream to its end or to the limit, whichever comes first.</summary>
    public static string FromStream(Stream stream, string name)
    {
        if (stream.CanSeek && stream.Length > MostBytes)
            throw TooBig(name, stream.Length);
        using var bytes = new MemoryStream();
        var chunk = new byte[64 * 1024];
        for (int read; (read = stream.Read(chunk)) > 0;)
        {
            bytes.Write(chunk, 0, read);
            if (bytes.Length > MostBytes)
                throw TooBig(name, null);
        }

        bytes.Position = 0;
        // UTF-8 unless a byte order mark says UTF-16; the mark itself is dropped.
        using var reader = new StreamReader(bytes, new UTF8Encoding(false), detectEncodingFromByteOrderMarks: true);
        string text = reader.ReadToEnd();
        Check(text, name);
        return text;
    }

    private static void Check(string text, string name)
    {
        int line = 1, lineStart = 0;
        for (int i = 0; i < text.Length; i++)
        {
            char c = text[i];
            if (c == '\n' || (c == '\r' && (i + 1 == text.Length || text[i + 1] != '\n')))
            {
                line++;
                lineStart = i + 1;
            }
            else if (c < ' ' && c is not ('\t' or '\r'))
            {
                throw new InputException(new InputFault(name, line, i - lineStart + 1, string.Create(
                    CultureInfo.InvariantCulture, $"the byte 0x{(int)c:X2} does not occur in text; this looks like a binary file, a CSV file is "
                        + $"needed.")));
            }
            else if (i - lineStart >= LongestLine)
            {
                throw Refused(name, line, string.Create(
                    CultureInfo.InvariantCulture, $"the line is longer than {LongestLine} characters, the most allowed; a CSV file with one row per "
                        + $"wavelength is needed."));
            }
        }
    }

    private static InputException TooBig(string name, long? length)
    {
        string size = length is { } bytes
            ? string.Create(CultureInfo.InvariantCulture, $"the file has {bytes} bytes")
            : "the input does not end";
        return Refused(name, null, string.Create(CultureInfo.InvariantCulture, $"{size}; a spectrum file has at most {MostBytes} bytes (16 MiB)."));
    }

    private static InputException Refused(string name, int? line, string message) => new(new InputFault(name, line, null, message));
}
