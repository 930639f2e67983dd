using System.Security.Cryptography;
using System.Text;
using Colorimetry;
using FilmDesign;
using FilmOptics;

namespace Dotcoat.Commands;

/// <summary>A film file that formulate writes: the user's own text with other loadings.</summary>
/// <remarks>
/// Its first line carries a check over the rest. A file without that line, or changed since, is a person's and is not
/// replaced.
/// </remarks>
internal sealed class SavedFilm
{
    private const string Mark = "# dotcoat formulate wrote this file; check ";

    private readonly string _source;
    private readonly string _path;
    private readonly IReadOnlyList<string> _overrides;

    private SavedFilm(string source, string path, IReadOnlyList<string> overrides) => (_source, _path, _overrides) = (source, path, overrides);

    /// <summary>Checks, before anything is computed, that the file may be written.</summary>
    /// <param name="source">The film file that is solved.</param>
    /// <param name="path">The file to write.</param>
    /// <param name="overrides">What --set changed; becomes part of the text.</param>
    /// <exception cref="InputException">It may not.</exception>
    public static SavedFilm Plan(string source, string path, IReadOnlyList<string> overrides)
    {
        if (!path.EndsWith(".film.yaml", StringComparison.Ordinal))
            throw Refused(path, "is not a film file's name; it has to end in .film.yaml.");
        if (File.Exists(path) && !IsOurs(File.ReadAllText(path)))
            throw Refused(path, "is there already and was not written by formulate, or was changed since; it is not replaced.");
        return new(source, path, overrides);
    }

    /// <summary>Writes it, whole or not at all.</summary>
    public void Write(Formulation formulation, CancellationToken cancellationToken)
    {
        string text = File.ReadAllText(_source);
        if (text.StartsWith(Mark, StringComparison.Ordinal))
            text = text[(text.IndexOf('\n', StringComparison.Ordinal) + 1)..];
        string body = FilmFile.WithLoadings(text, _source, _overrides, formulation.FilmCase.Film, _path);
        cancellationToken.ThrowIfCancellationRequested();
        try
        {
            WholeFile.Write(_path, Encoding.UTF8.GetBytes($"{Mark}{Check(body)}\n{body}"));
        }
        catch (Exception failed) when (failed is IOException or UnauthorizedAccessException)
        {
            throw Refused(_path, $"cannot be written: {failed.Message}");
        }
    }

    private static bool IsOurs(string text)
    {
        int end = text.IndexOf('\n', StringComparison.Ordinal);
        return end > 0 && text.StartsWith(Mark, StringComparison.Ordinal) && text[Mark.Length..end].TrimEnd() == Check(text[(end + 1)..]);
    }

    private static string Check(string body) => Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(body)))[..16];

    private static InputException Refused(string path, string message) => new(new InputFault(path, null, null, message));
}
