using System.Reflection;

namespace Colorimetry;

/// <summary>The tables of <c>spectra/</c> that are built into the program, so that it runs from any folder.</summary>
internal static class PublishedTables
{
    /// <summary>Reads one.</summary>
    /// <param name="name">Folder and file below <c>spectra/</c>, such as observers/cie-1931-2-degree.csv.</param>
    public static SpectrumTable Read(string name)
    {
        using Stream stream = Assembly.GetExecutingAssembly().GetManifestResourceStream(name)
            ?? throw new InvalidOperationException($"{name} is not built into the program.");
        return SpectrumFile.Read(stream, name);
    }
}
