using System.Collections.Concurrent;
using Colorimetry;

namespace FilmOptics;

/// <summary>Spectrum files by path, each read and brought to the grid once, for a film that is read many times with other numbers.</summary>
/// <remarks>A file that changes on the disk later is not read again. Safe to use from several threads.</remarks>
public sealed class SpectrumShelf
{
    // A slider that shifts a line leaves one import for each stop; they are small, but not for ever.
    private const int MostImports = 512;

    private readonly ConcurrentDictionary<string, SpectrumTable> _tables = new(StringComparer.Ordinal);
    private readonly ConcurrentDictionary<(SpectrumTable Table, string Column, ImportOptions Options, Type Unit), object> _imports = new();

    /// <summary>Puts a table in place of a file: the path need not exist.</summary>
    /// <param name="path">What a film file's entry resolves to.</param>
    /// <param name="table">The table.</param>
    public void Put(string path, SpectrumTable table)
    {
        ArgumentNullException.ThrowIfNull(path);
        ArgumentNullException.ThrowIfNull(table);
        _tables[path] = table;
    }

    /// <summary>Whether there is such a file, or a table in its place.</summary>
    internal bool Has(string path) => _tables.ContainsKey(path) || File.Exists(path);

    /// <summary>The file as a table.</summary>
    /// <exception cref="InputException">The file is refused; it is read again the next time.</exception>
    internal SpectrumTable Table(string path) => _tables.GetOrAdd(path, SpectrumFile.Read);

    /// <summary>A column on the project grid.</summary>
    /// <exception cref="InputException">It cannot be brought there.</exception>
    internal ImportedSpectrum<TUnit> Import<TUnit>(SpectrumTable table, string column, ImportOptions options)
        where TUnit : struct, ISpectralUnit
    {
        if (_imports.Count >= MostImports)
            _imports.Clear();
        return (ImportedSpectrum<TUnit>)_imports.GetOrAdd(
            (table, column, options, typeof(TUnit)), key => SpectrumImport.ToGrid<TUnit>(key.Table, key.Column, key.Options));
    }
}
