using System.Security.Cryptography;
using System.Text;
using Colorimetry;
using FilmOptics;

namespace Dotcoat.Commands;

/// <summary>A film file that formulate or the page writes: the user's own text with other numbers.</summary>
/// <remarks>
/// Its first line carries a check over the rest. A file without that line, or changed since, is a person's and is not
/// replaced.
/// </remarks>
internal sealed class SavedFilm
{
    private const string Mark = "# dotcoat wrote this file; check ";

    private readonly string _text;
    private readonly string _source;
    private readonly string _path;
    private readonly IReadOnlyList<string> _overrides;

    private SavedFilm(string text, string source, string path, IReadOnlyList<string> overrides) =>
        (_text, _source, _path, _overrides) = (text, source, path, overrides);

    /// <summary>Checks, before anything is computed, that the file may be written.</summary>
    /// <param name="text">Text of the film file that is solved.</param>
    /// <param name="source">That file.</param>
    /// <param name="path">The file to write.</param>
    /// <param name="overrides">What --set changed; becomes part of the text.</param>
    /// <exception cref="InputException">It may not.</exception>
    public static SavedFilm Plan(string text, string source, string path, IReadOnlyList<string> overrides)
    {
        if (!path.EndsWith(".film.yaml", StringComparison.Ordinal))
            throw Refused(path, "is not a film file's name; it has to end in .film.yaml.");
        if (File.Exists(path) && CheckOf(File.ReadAllText(path)) is null)
            throw Refused(path, "is there already and was not written by dotcoat, or was changed since; it is not replaced.");
        return new(text, source, path, overrides);
    }

    /// <summary>Writes it, whole or not at all.</summary>
    /// <param name="film">The film with its loadings.</param>
    /// <param name="cancellationToken">Heeded until the last moment.</param>
    /// <returns>The check over what was written, which tells it from a later version.</returns>
    public string Write(Film film, CancellationToken cancellationToken)
    {
        string text = _text;
        if (text.StartsWith(Mark, StringComparison.Ordinal))
            text = text[(text.IndexOf('\n', StringComparison.Ordinal) + 1)..];
        string body = FilmFile.WithLoadings(text, _source, _overrides, film, _path);
        cancellationToken.ThrowIfCancellationRequested();
        try
        {
            WholeFile.Write(_path, Encoding.UTF8.GetBytes($"{Mark}{Check(body)}\n{body}"));
            return Check(body);
        }
        catch (Exception failed) when (failed is IOException or UnauthorizedAccessException)
        {
            throw Refused(_path, $"cannot be written: {failed.Message}");
        }
    }

    /// <summary>The check of a film file that dotcoat wrote and nobody changed since; null for any other text.</summary>
    public static string? CheckOf(string text)
    {
        int end = text.IndexOf('\n', StringComparison.Ordinal);
        return end > 0 && text.StartsWith(Mark, StringComparison.Ordinal) && text[Mark.Length..end].TrimEnd() is var check && check == Check(text[(end + 1)..])
            ? check
            : null;
    }

    private static string Check(string body) => Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(body)))[..16];

    private static InputException Refused(string path, string message) => new(new InputFault(path, null, null, message));
}
