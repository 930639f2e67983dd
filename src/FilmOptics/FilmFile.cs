using Colorimetry;
using FilmOptics.Reading;

namespace FilmOptics;

/// <summary>The film file, NAME.film.yaml: YAML 1.2 (JSON is YAML too). README.md lists its keys.</summary>
public static class FilmFile
{
    /// <summary>Reads and checks a film file with the spectra it names.</summary>
    /// <param name="path">The film file. Paths in it are relative to its folder.</param>
    /// <param name="overrides">KEY=VALUE as --set takes them, such as layers[0].thickness_um=80; later ones win.</param>
    /// <exception cref="InputException">All faults of the file, of its spectra and of the overrides, with file, line and column.</exception>
    public static FilmCase Load(string path, IReadOnlyList<string> overrides)
    {
        ArgumentNullException.ThrowIfNull(path);
        ArgumentNullException.ThrowIfNull(overrides);
        return Parse(FilmText.Read(path), path, overrides);
    }

    /// <summary>Reads a film file from its text.</summary>
    /// <param name="yamlText">The text.</param>
    /// <param name="path">Its file: names it in messages, and paths in the text are relative to its folder.</param>
    /// <param name="overrides">KEY=VALUE as --set takes them; later ones win.</param>
    /// <exception cref="InputException">All faults, with file, line and column.</exception>
    public static FilmCase Parse(string yamlText, string path, IReadOnlyList<string> overrides) =>
        Parse(yamlText, path, overrides, new SpectrumShelf());

    /// <summary>The same, for one who reads a film again and again with other overrides.</summary>
    /// <param name="yamlText">The text.</param>
    /// <param name="path">Its file.</param>
    /// <param name="overrides">KEY=VALUE as --set takes them; later ones win.</param>
    /// <param name="shelf">Spectra that were read before.</param>
    /// <exception cref="InputException">All faults, with file, line and column.</exception>
    public static FilmCase Parse(string yamlText, string path, IReadOnlyList<string> overrides, SpectrumShelf shelf)
    {
        ArgumentNullException.ThrowIfNull(yamlText);
        ArgumentNullException.ThrowIfNull(path);
        ArgumentNullException.ThrowIfNull(overrides);
        ArgumentNullException.ThrowIfNull(shelf);
        var faults = new FaultList(path);
        var root = NodeComposer.Compose(yamlText, new(path, 1, 1), faults);
        if (root is null)
            faults.ThrowIfAny();
        foreach (string option in overrides)
        {
            if (KeyOverride.Parse(option, faults) is { } change && root is MappingNode mapping)
                change.ApplyTo(mapping, faults);
        }

        var filmCase = new FilmReader(Path.GetDirectoryName(path) ?? "", shelf, faults).Read(root!, TitleOf(path));
        faults.ThrowIfAny();
        return filmCase ?? throw new InvalidOperationException("A film file was refused without a reason.");
    }

    /// <summary>The film file's text with a solved film's loadings in it; comments and layout stay as they are.</summary>
    /// <remarks>
    /// A loading given as wt% stays wt%, and a coat weight is set so that the thickness stays the solved one. Overrides become part
    /// of the text. Relative file names are rewritten where the new file lies in another folder.
    /// </remarks>
    /// <param name="yamlText">Text of the film file that was solved.</param>
    /// <param name="path">That file.</param>
    /// <param name="overrides">The overrides it was read with.</param>
    /// <param name="solved">The film with its solved loadings.</param>
    /// <param name="newPath">The file that the text is for.</param>
    /// <exception cref="InputException">The text is not the film's, or its layout does not let the overrides be written in.</exception>
    public static string WithLoadings(string yamlText, string path, IReadOnlyList<string> overrides, Film solved, string newPath)
    {
        ArgumentNullException.ThrowIfNull(yamlText);
        ArgumentNullException.ThrowIfNull(path);
        ArgumentNullException.ThrowIfNull(overrides);
        ArgumentNullException.ThrowIfNull(solved);
        ArgumentNullException.ThrowIfNull(newPath);
        return new SolutionText(yamlText, path, new(path)).With(overrides, solved, newPath);
    }

    /// <summary>The text of a film file, without a byte order mark.</summary>
    /// <param name="path">The film file.</param>
    /// <exception cref="InputException">It is missing, unreadable, too large or not UTF-8 text.</exception>
    public static string ReadText(string path)
    {
        ArgumentNullException.ThrowIfNull(path);
        return FilmText.Read(path);
    }

    /// <summary>Every single value that the text writes, under the key that --set takes, with its place.</summary>
    /// <param name="yamlText">The text.</param>
    /// <param name="path">Its file, for messages.</param>
    /// <exception cref="InputException">The text is no YAML that a film file may hold.</exception>
    public static IReadOnlyList<WrittenValue> Values(string yamlText, string path)
    {
        ArgumentNullException.ThrowIfNull(yamlText);
        ArgumentNullException.ThrowIfNull(path);
        var faults = new FaultList(path);
        var root = NodeComposer.Compose(yamlText, new(path, 1, 1), faults);
        faults.ThrowIfAny();
        return WrittenValues.Of(root!);
    }

    private static string TitleOf(string path)
    {
        string name = Path.GetFileName(path);
        int end = name.IndexOf(".film.", StringComparison.Ordinal);
        return end > 0 ? name[..end] : Path.GetFileNameWithoutExtension(name);
    }
}
