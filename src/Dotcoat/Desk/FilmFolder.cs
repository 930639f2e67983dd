using System.Text.RegularExpressions;

namespace Dotcoat.Desk;

/// <summary>The film file's folder: the only place that the page writes to, and no name leads out of it.</summary>
internal sealed partial class FilmFolder(string filmPath)
{
    /// <summary>The folder, in full.</summary>
    public string Path { get; } = System.IO.Path.GetDirectoryName(System.IO.Path.GetFullPath(filmPath))!;

    /// <summary>A film file in the folder.</summary>
    /// <param name="name">Its name; .film.yaml is added where it is missing.</param>
    /// <exception cref="FieldException">It is no plain file name, or a link stands there.</exception>
    public string FilmPath(string? name)
    {
        const string ending = ".film.yaml";
        string plain = Plain(name, "save-name");
        return Inside("save-name", plain.EndsWith(ending, StringComparison.Ordinal) ? plain : plain + ending);
    }

    /// <summary>The folder of a report.</summary>
    /// <param name="name">A plain name.</param>
    /// <exception cref="FieldException">It is no plain name, or a link stands in its way.</exception>
    public string ReportPath(string? name)
    {
        Inside("report-name", "reports");
        return Inside("report-name", System.IO.Path.Combine("reports", Plain(name, "report-name")));
    }

    // A link could lead anywhere.
    private string Inside(string field, string relative)
    {
        string path = System.IO.Path.Combine(Path, relative);
        if (new FileInfo(path).LinkTarget is not null)
            throw new FieldException([new(field, $"{relative} is a link and is not written through.")]);
        return path;
    }

    private static string Plain(string? name, string field)
    {
        string trimmed = name?.Trim() ?? "";
        return NamePattern().IsMatch(trimmed)
            ? trimmed
            : throw new FieldException([new(field, "A name of letters, digits, spaces, '-', '_' and '.' is due, up to 100 characters, that begins with a letter or digit.")]);
    }

    [GeneratedRegex(@"^[\p{L}\p{N}](?:[\p{L}\p{N} _.-]{0,98}[\p{L}\p{N}_-])?$", RegexOptions.CultureInvariant, matchTimeoutMilliseconds: 1000)]
    private static partial Regex NamePattern();
}
