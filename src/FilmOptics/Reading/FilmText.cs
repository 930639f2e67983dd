using System.Globalization;
using System.Text;
using Colorimetry;

namespace FilmOptics.Reading;

/// <summary>Reads the text of a film file in bounded memory.</summary>
internal static class FilmText
{
    private const int MostBytes = 1 << 20;

    private static readonly UTF8Encoding StrictUtf8 = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);

    /// <summary>The text without a byte order mark.</summary>
    /// <exception cref="InputException">The file is missing, unreadable, too large or not UTF-8 text.</exception>
    public static string Read(string path)
    {
        byte[] bytes;
        int count;
        try
        {
            if (Directory.Exists(path))
                throw Refused(path, "This is a folder; a film file (NAME.film.yaml) is due.");
            bytes = new byte[MostBytes + 1];
            using var stream = File.OpenRead(path);
            count = stream.ReadAtLeast(bytes, bytes.Length, throwOnEndOfStream: false);
        }
        catch (Exception exception) when (exception is FileNotFoundException or DirectoryNotFoundException)
        {
            throw Refused(path, "The file is not there; a film file (NAME.film.yaml) is due.");
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException or ArgumentException or NotSupportedException)
        {
            throw Refused(path, $"The file cannot be read: {exception.Message}");
        }

        if (count > MostBytes)
            throw Refused(path, $"The file is over {MostBytes / 1024} KiB; a film file is a few KiB of text.");
        return Decoded(path, bytes.AsSpan(0, count));
    }

    private static string Decoded(string path, ReadOnlySpan<byte> bytes)
    {
        if (bytes is [0xEF, 0xBB, 0xBF, ..])
            bytes = bytes[3..];
        if (bytes is [0xFF, 0xFE, ..] or [0xFE, 0xFF, ..])
            throw Refused(path, "The file is UTF-16 text; save it as UTF-8.");
        int zero = bytes.IndexOf((byte)0);
        if (zero >= 0)
            throw Refused(path, string.Create(CultureInfo.InvariantCulture, $"The file is binary (byte {zero + 1} is 0); a film file is UTF-8 text."));
        try
        {
            return StrictUtf8.GetString(bytes);
        }
        catch (DecoderFallbackException exception)
        {
            int line = 1 + bytes[..Math.Clamp(exception.Index, 0, bytes.Length)].Count((byte)'\n');
            throw new InputException(new InputFault(path, line, null, "The file is not UTF-8 text here; save it as UTF-8."));
        }
    }

    private static InputException Refused(string path, string message) => new(new InputFault(path, null, null, message));
}
