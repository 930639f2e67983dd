using System.Collections.Concurrent;
using System.Globalization;
using System.Text;
using Colorimetry;
using Dotcoat.Inspection;
using FilmOptics;

namespace Dotcoat.Desk;

/// <summary>A spectrum file that was dropped on the page.</summary>
/// <param name="Name">The name it goes by, and is saved under beside the film file.</param>
/// <param name="Bytes">As it came.</param>
/// <param name="Quantity">"absorbance" or "emission".</param>
/// <param name="Words">What it holds, in a sentence.</param>
internal sealed record DroppedSpectrum(string Name, byte[] Bytes, string Quantity, string Words);

/// <summary>Spectra that were dropped on the page. They are tried from memory; a save puts those in use beside the film file.</summary>
internal sealed class DroppedSpectra(string folder, SpectrumShelf shelf)
{
    /// <summary>Largest dropped file, bytes: as much as a spectrum file may have.</summary>
    public const int MostBytes = 16 << 20;

    private const int MostFiles = 64;
    private const long MostBytesInAll = 64L << 20;
    private const int LongestStem = 60;

    private readonly ConcurrentDictionary<string, DroppedSpectrum> _files = new(StringComparer.Ordinal);
    private readonly Lock _gate = new();

    public bool Has(string? name) => name is not null && _files.ContainsKey(name);

    public DroppedSpectrum? Find(string name) => _files.GetValueOrDefault(name);

    /// <summary>Takes a file in, under a name that no other file of the folder has.</summary>
    /// <param name="name">The name it had on the user's machine; only a hint.</param>
    /// <param name="bytes">Its content.</param>
    /// <exception cref="InputException">It is no spectrum of absorbance or emission, or there are too many.</exception>
    public DroppedSpectrum Add(string name, byte[] bytes)
    {
        string shown = Path.GetFileName(name.Replace('\\', '/'));
        using var stream = new MemoryStream(bytes);
        var table = SpectrumFile.Read(stream, shown.Length == 0 ? "dropped file" : shown);
        string quantity = QuantityOf(table);
        var inspection = SpectrumInspection.Of(table);
        lock (_gate)
        {
            if (_files.Values.FirstOrDefault(file => file.Bytes.AsSpan().SequenceEqual(bytes)) is { } known)
                return known;
            if (_files.Count >= MostFiles || _files.Values.Sum(file => (long)file.Bytes.Length) + bytes.Length > MostBytesInAll)
                throw new InputException(new InputFault(shown, null, null, $"{MostFiles} files or {MostBytesInAll >> 20} MiB of dropped files are in use; start desk again to drop more."));
            var file = new DroppedSpectrum(FreeName(shown, bytes), bytes, quantity, Words(quantity, inspection));
            shelf.Put(Path.Combine(folder, file.Name), table);
            _files[file.Name] = file;
            return file;
        }
    }

    /// <summary>Puts one beside the film file. The same bytes may stand there already.</summary>
    /// <exception cref="InputException">Another file has the name by now.</exception>
    public void Save(string name)
    {
        var file = _files[name];
        string path = Path.Combine(folder, file.Name);
        if (!Path.Exists(path))
            WholeFile.Write(path, file.Bytes);
        else if (!IsSame(path, file.Bytes))
            throw new InputException(new InputFault(file.Name, null, null, "is there by now with other content and is not replaced; move it and save again."));
    }

    private static string QuantityOf(SpectrumTable table)
    {
        if (table.FirstColumn == SpectrumFile.WavelengthColumn)
        {
            if (table.Columns.Contains("absorbance_per_cm", StringComparer.Ordinal))
                return "absorbance";
            if (table.Columns.Contains("power_per_nm", StringComparer.Ordinal) || table.Columns.Contains("photons_per_nm", StringComparer.Ordinal))
                return "emission";
        }

        string columns = string.Join(", ", table.Columns.Prepend(table.FirstColumn));
        throw new InputException(new InputFault(
            table.Name, null, null, $"has the columns {columns}; a lot takes wavelength_nm with absorbance_per_cm, power_per_nm or photons_per_nm."));
    }

    private static string Words(string quantity, SpectrumInspection inspection) => string.Create(
        CultureInfo.InvariantCulture,
        $"{quantity}, {inspection.At[0]:0.#}–{inspection.At[^1]:0.#} nm, peak {inspection.Columns[0].Figures.PeakAt:0.#} nm");

    private string FreeName(string shown, byte[] bytes)
    {
        var stem = new StringBuilder();
        foreach (char c in Path.GetFileNameWithoutExtension(shown).Take(LongestStem))
            stem.Append(char.IsAsciiLetterOrDigit(c) || c is '-' or '_' ? char.ToLowerInvariant(c) : '-');
        string kept = stem.ToString().Trim('-') is { Length: > 0 } some && char.IsAsciiLetter(some[0]) ? some : $"spectrum-{stem}".TrimEnd('-');
        for (int i = 1; ; i++)
        {
            string name = i == 1 ? $"{kept}.csv" : string.Create(CultureInfo.InvariantCulture, $"{kept}-{i}.csv");
            string path = Path.Combine(folder, name);
            if (!_files.ContainsKey(name) && (!Path.Exists(path) || IsSame(path, bytes)))
                return name;
        }
    }

    // A link could lead out of the folder: it never counts as the same.
    private static bool IsSame(string path, byte[] bytes) =>
        new FileInfo(path) is { Exists: true, LinkTarget: null } info && info.Length == bytes.Length && File.ReadAllBytes(path).AsSpan().SequenceEqual(bytes);
}
